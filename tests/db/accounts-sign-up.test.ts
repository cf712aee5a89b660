import { describe, expect, it } from "vitest";
import { checkCredentials } from "@/lib/auth/credentials";
import { sendVerificationAgain, signUp, verifyEmail } from "@/lib/server/accounts/sign-up";
import { setUpDatabase } from "../setup/database";
import { setUpLetters, tokenOf } from "../setup/letters";
import { makePerson, testPassword } from "../factories/people";

const db = setUpDatabase();
const letters = setUpLetters();
const requestId = "test";
const signInAs = (email: string) => checkCredentials({ email, password: testPassword, address: "198.51.100.7" });

describe("signing up", () => {
  it("lets nobody in before the letter's token was spent, and the token works once", async () => {
    const email = "marl@people.example";
    await signUp({ email, handle: "marl", password: testPassword });
    expect(await signInAs(email)).toEqual({ ok: false, why: "not_verified" });
    const token = tokenOf(await letters.newest(email, "Confirm your address"));
    await verifyEmail({ token, requestId });
    expect(await signInAs(email)).toMatchObject({ ok: true });
    await expect(verifyEmail({ token, requestId })).rejects.toMatchObject({ code: "gone" });
  });

  it("keeps only hashes of password and token", async () => {
    const email = "tarn@people.example";
    await signUp({ email, handle: "tarn", password: testPassword });
    const token = tokenOf(await letters.newest(email, "Confirm your address"));
    const rows = JSON.stringify([await db.owner("person").select(), await db.owner("mail_token").select()]);
    expect(rows).not.toContain(testPassword);
    expect(rows).not.toContain(token);
  });

  it("answers the same for a known address, tells its owner by mail and changes nothing", async () => {
    const known = await makePerson(db.owner, "osier");
    const fresh = await signUp({ email: "new@people.example", handle: "newcomer", password: testPassword });
    const again = await signUp({ email: "OSIER@people.example", handle: "osier-two", password: `${testPassword}!` });
    expect(again).toEqual(fresh);
    await letters.newest("osier@people.example", "have an account");
    expect(await signInAs(known.email)).toMatchObject({ ok: true, personId: known.personId });
    expect(await db.owner("person").where({ handle: "osier-two" })).toEqual([]);
  });

  it("tells a taken handle and a poor password by their fields", async () => {
    await makePerson(db.owner, "quill");
    const input = { email: "x@people.example", handle: "quill", password: testPassword };
    await expect(signUp(input)).rejects.toMatchObject({ code: "already_there", fields: [{ path: "handle" }] });
    await expect(signUp({ ...input, handle: "mills", password: "slow mills turn" })).rejects.toMatchObject({
      code: "malformed",
      fields: [{ path: "password" }],
    });
  });

  it("sends one address five letters an hour at most, whoever asks", async () => {
    const email = "flooded@people.example";
    for (let n = 0; n < 5; n += 1) await sendVerificationAgain({ email });
    await expect(sendVerificationAgain({ email })).rejects.toMatchObject({ code: "too_many" });
  });

  it("takes no token that has run out", async () => {
    const email = "late@people.example";
    await signUp({ email, handle: "late", password: testPassword });
    const token = tokenOf(await letters.newest(email, "Confirm your address"));
    await db.owner("mail_token").update({
      created_at: db.owner.raw("now() - interval '5 days'"),
      expires_at: db.owner.raw("now() - interval '1 second'"),
    });
    await expect(verifyEmail({ token, requestId })).rejects.toMatchObject({ code: "gone" });
  });
});
