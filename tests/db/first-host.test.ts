import { expect, it } from "vitest";
import { adoptEnvironment } from "@/lib/env/env";
import { signUp, verifyEmail } from "@/lib/server/accounts/sign-up";
import { testPassword } from "../factories/people";
import { setUpDatabase } from "../setup/database";
import { setUpLetters, tokenOf } from "../setup/letters";

const db = setUpDatabase();
const letters = setUpLetters();

async function join(handle: string): Promise<void> {
  const email = `${handle}@people.example`;
  await signUp({ email, handle, password: testPassword });
  await verifyEmail({ token: tokenOf(await letters.newest(email, "Confirm your address")), requestId: "test" });
}

const roleOf = async (handle: string) => (await db.owner("person").where({ handle }).first("role"))?.role;

it("makes only the address that the settings name host, once confirmed, and only while there is none", async () => {
  await join("osier");
  adoptEnvironment({ FIRST_HOST_EMAIL: "Keeper@people.example" });
  await join("marl");
  await signUp({ email: "keeper@people.example", handle: "keeper", password: testPassword });
  expect(await roleOf("keeper")).toBe("member");
  const letter = await letters.newest("keeper@people.example", "Confirm your address");
  await verifyEmail({ token: tokenOf(letter), requestId: "test" });
  expect([await roleOf("osier"), await roleOf("marl"), await roleOf("keeper")]).toEqual(["member", "member", "host"]);
  adoptEnvironment({ FIRST_HOST_EMAIL: "second@people.example" });
  await join("second");
  expect(await roleOf("second")).toBe("member");
  expect(await db.owner("audit").where({ action: "person.first_host" }).select("subject_kind")).toHaveLength(1);
});
