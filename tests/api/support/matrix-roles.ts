import { randomBytes } from "node:crypto";
import type { Knex } from "knex";
import { signedOut, signIn, signInAs, type Session } from "../../setup/session";

/** Who is tried on every route. "owner" owns the designs that the facts name; "borrower" was lent the round in review. */
export const matrixRoles = ["signedOut", "member", "owner", "operator", "host", "borrower", "closed"] as const;
export type MatrixRole = (typeof matrixRoles)[number];
export type MatrixSessions = Record<MatrixRole, Session>;

/** A session of each. The demo has no borrower and no closed account, so both are added to the server under test. */
export async function matrixSessions(owner: Knex): Promise<MatrixSessions> {
  const borrower = await addMember(owner);
  const leaving = await addMember(owner);
  const round = await owner("round").where({ state: "in_review" }).first("id");
  if (!round) throw new Error("The demo has no round in review to lend.");
  const host = await owner("person").where({ role: "host" }).first("id");
  await owner("review_loan")
    .insert({ round_id: round.id, person_id: borrower.id, by_person: host.id })
    .onConflict("round_id")
    .merge();
  const sessions = {
    signedOut: signedOut(),
    member: await signInAs("member"),
    owner: await signInAs("designer"),
    operator: await signInAs("operator"),
    host: await signInAs("host"),
    borrower: await signIn(borrower.email),
    closed: await signIn(leaving.email),
  };
  // Only the row is closed; the session's cookie stays as good as it was.
  await owner("person").where({ id: leaving.id }).update({ closed_at: owner.fn.now() });
  return sessions;
}

/** A member with the demo's password. */
async function addMember(owner: Knex): Promise<{ id: string; email: string }> {
  const handle = `matrix-${randomBytes(4).toString("hex")}`;
  const email = `${handle}@people.example`;
  const [added] = await owner("person")
    .insert({
      email,
      handle,
      password_hash: owner("person").select("password_hash").where({ email: "member@alder.example" }),
      email_verified_at: owner.fn.now(),
    })
    .returning("id");
  return { id: String(added?.id), email };
}
