import { encode } from "next-auth/jwt";
import { beforeAll, describe, expect, it } from "vitest";
import { actorFromToken } from "@/lib/auth/actor";
import { checkCredentials } from "@/lib/auth/credentials";
import { adoptEnvironment } from "@/lib/env/env";
import { closeAccount } from "@/lib/server/accounts/leave";
import { askForReset, changePassword, resetPassword } from "@/lib/server/accounts/password";
import { changeRole } from "@/lib/server/accounts/people";
import { makePerson, testPassword } from "../factories/people";
import { setUpDatabase } from "../setup/database";
import { setUpLetters, tokenOf } from "../setup/letters";

const db = setUpDatabase();
const letters = setUpLetters();
const secret = "a secret of thirty-two characters or more";
const requestId = "test";
const address = "198.51.100.7";
const newPassword = "herons stand in shallow water";

beforeAll(() => {
  adoptEnvironment({ NEXTAUTH_SECRET: secret });
});

const sessionOf = (personId: string, sessionVersion = 1) => encode({ token: { personId, sessionVersion }, secret });

describe("a session", () => {
  it("stands for the stored row: handle and role as they are now", async () => {
    const person = await makePerson(db.owner, "osier", "operator");
    const token = await sessionOf(person.personId);
    expect(await actorFromToken(token)).toEqual({ personId: person.personId, handle: "osier", role: "operator" });
    await db.owner("person").where({ id: person.personId }).update({ handle: "osier-now" });
    expect(await actorFromToken(token)).toMatchObject({ handle: "osier-now" });
  });

  it("ends with a changed role, password or a closed account, at the next look", async () => {
    const host = await makePerson(db.owner, "host", "host");
    const [one, two, three] = await Promise.all(
      ["r-one", "r-two", "r-three"].map((name) => makePerson(db.owner, name)),
    );
    if (!one || !two || !three) throw new Error("unreachable");
    const tokens = await Promise.all([one, two, three].map(({ personId }) => sessionOf(personId)));
    for (const token of tokens) expect(await actorFromToken(token)).toMatchObject({ role: "member" });
    await changeRole(host, { personId: one.personId, role: "operator", was: "member" }, requestId);
    await changePassword(two, { currentPassword: testPassword, password: newPassword }, requestId);
    await closeAccount(three, { currentPassword: testPassword }, requestId);
    for (const token of tokens) expect(await actorFromToken(token)).toEqual({ role: "anonymous" });
    const closed = { email: three.email, password: testPassword, address };
    expect(await checkCredentials(closed)).toEqual({ ok: false, why: "wrong" });
  });

  it("is nobody's when it was signed by another secret, is garbled, or names nobody", async () => {
    const { personId } = await makePerson(db.owner, "tarn");
    const forged = await encode({
      token: { personId, sessionVersion: 1 },
      secret: "another secret of thirty-two characters",
    });
    const stranger = await sessionOf("00000000-0000-7000-8000-000000000000");
    const incomplete = await encode({ token: { personId }, secret });
    for (const token of [forged, "nonsense", undefined, "", stranger, incomplete, await sessionOf(personId, 2)]) {
      expect(await actorFromToken(token)).toEqual({ role: "anonymous" });
    }
  });
});

describe("a forgotten password", () => {
  it("is set anew by the newest letter's token, once, and ends old sessions", async () => {
    const person = await makePerson(db.owner, "marl");
    const token = await sessionOf(person.personId);
    await askForReset({ email: "MARL@people.example" });
    const letter = tokenOf(await letters.newest(person.email, "Set a new password"));
    await expect(resetPassword({ token: letter, password: "short", requestId })).rejects.toMatchObject({
      code: "malformed",
    });
    await resetPassword({ token: letter, password: newPassword, requestId });
    expect(await actorFromToken(token)).toEqual({ role: "anonymous" });
    expect(await checkCredentials({ email: person.email, password: testPassword, address })).toMatchObject({
      ok: false,
    });
    expect(await checkCredentials({ email: person.email, password: newPassword, address })).toMatchObject({ ok: true });
    await expect(resetPassword({ token: letter, password: testPassword, requestId })).rejects.toMatchObject({
      code: "gone",
    });
    await letters.newest(person.email, "was changed");
  });

  it("is asked for with the same answer where there is no account, and nothing is sent", async () => {
    expect(await askForReset({ email: "nobody@people.example" })).toBeUndefined();
    const known = await makePerson(db.owner, "quill");
    await askForReset({ email: known.email });
    await letters.newest(known.email, "Set a new password");
    expect(await letters.count("nobody@people.example")).toBe(0);
  });
});

describe("guessing", () => {
  it("is stopped on the account after ten failures, for the right password too, and from any address", async () => {
    const { email } = await makePerson(db.owner, "guessed");
    const wrong = { ok: false, why: "wrong" };
    for (let n = 0; n < 10; n += 1) {
      expect(await checkCredentials({ email, password: "not this one", address: `198.51.100.${n}` })).toEqual(wrong);
    }
    const blocked = { ok: false, why: "too_many" };
    expect(await checkCredentials({ email, password: testPassword, address: "203.0.113.9" })).toEqual(blocked);
    expect(await checkCredentials({ email: email.toUpperCase(), password: testPassword, address })).toEqual(blocked);
  });

  it("looks the same for an address that nobody has", async () => {
    const email = "nobody-at-all@people.example";
    const answers = [];
    for (let n = 0; n < 11; n += 1) answers.push(await checkCredentials({ email, password: "not this one", address }));
    expect(answers.map((each) => !each.ok && each.why)).toEqual([...Array<string>(10).fill("wrong"), "too_many"]);
  });

  it("can't slip past the count by many tries at once", async () => {
    const { email } = await makePerson(db.owner, "crowded");
    const tries = Array.from({ length: 25 }, () =>
      checkCredentials({ email, password: "not this one", address: "203.0.113.50" }),
    );
    const looked = (await Promise.all(tries)).filter((each) => !each.ok && each.why === "wrong");
    expect(looked.length).toBeLessThanOrEqual(10);
  });

  it("is stopped from one address over all accounts after a hundred failures", async () => {
    await db.owner("sign_in_attempt").insert(
      Array.from({ length: 100 }, (_, n) => ({
        account_key: `someone-${n}`,
        address: "203.0.113.77",
        succeeded: false,
      })),
    );
    const { email } = await makePerson(db.owner, "bystander");
    const from = (each: string) => checkCredentials({ email, password: testPassword, address: each });
    expect(await from("203.0.113.77")).toEqual({ ok: false, why: "too_many" });
    expect(await from("203.0.113.78")).toMatchObject({ ok: true });
  });
});
