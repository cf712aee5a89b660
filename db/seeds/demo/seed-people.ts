import type { Knex } from "knex";
import { handles } from "./names";

/** The accounts of the demo that can sign in; every other invented person has no password. */
export const demoAccounts = [
  { email: "host@alder.example", handle: "alderkeeper", role: "host" },
  { email: "operator@alder.example", handle: "benchwright", role: "operator" },
  { email: "reviewer@alder.example", handle: "secondlook", role: "operator" },
  { email: "designer@alder.example", handle: "quillwork", role: "member" },
  { email: "member@alder.example", handle: "wrenreader", role: "member" },
] as const;

export const demoPassword = "alder-bench-demo";

/** @returns ids by handle */
export async function seedPeople(db: Knex, passwordHash: string): Promise<Map<string, string>> {
  const verified = new Date("2024-12-05T10:00:00Z");
  const others = handles.filter((handle) => !demoAccounts.some((account) => account.handle === handle));
  const rows: { id: string; handle: string }[] = await db("person")
    .insert([
      ...demoAccounts.map((account) => ({
        ...account,
        password_hash: passwordHash,
        email_verified_at: verified,
        created_at: verified,
      })),
      ...others.map((handle) => ({
        email: `${handle}@alder.example`,
        handle,
        role: "member",
        password_hash: null,
        email_verified_at: verified,
        created_at: verified,
      })),
    ])
    .returning(["id", "handle"]);
  return new Map(rows.map((row) => [row.handle, row.id]));
}
