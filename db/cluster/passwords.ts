import { randomBytes } from "node:crypto";
import { chmodSync, existsSync, readFileSync, writeFileSync } from "node:fs";
import path from "node:path";
import { z } from "zod";

const schema = z.object({
  admin: z.string().min(32),
  owner: z.string().min(32),
  app: z.string().min(32),
  public: z.string().min(32),
});

/** The passwords of the local cluster's roles. */
export type Passwords = z.infer<typeof schema>;

/** Reads the folder's passwords, or makes them; only the folder's owner can read the file. */
export function clusterPasswords(folder: string): Passwords {
  const file = path.join(folder, "database-passwords.json");
  if (existsSync(file)) {
    chmodSync(file, 0o600);
    return schema.parse(JSON.parse(readFileSync(file, "utf8")));
  }
  const fresh = () => randomBytes(24).toString("base64url");
  const made = { admin: fresh(), owner: fresh(), app: fresh(), public: fresh() };
  writeFileSync(file, JSON.stringify(made, undefined, 2), { mode: 0o600, flag: "wx" });
  return made;
}
