import { appDb } from "@/db/client/handles";
import { moveEntries, moveRound } from "@/db/queries/moves";
import { insertReview } from "@/db/queries/review";
import { roundContext } from "@/db/queries/round-context";
import type { Handle } from "@/db/client/connect";
import { isPerson, type Person } from "@/lib/domain/accounts/actor";
import { ExpectedError } from "@/lib/domain/expected-error";
import { note, type Asked } from "../audit/audit";
import { personObstacle, roundObstacles, signingRefusals } from "./obstacles";
import { roundDigest } from "./round-digest";

/** @throws ExpectedError when the actor may not sign this round, with the reason in words */
export async function demandSigner(db: Handle, { actor }: Asked, roundId: string): Promise<Person> {
  if (!isPerson(actor)) throw new ExpectedError("not_signed_in", signingRefusals.signed_out);
  const refusal = await personObstacle(db, actor, roundId);
  if (refusal) throw new ExpectedError("forbidden", refusal);
  return actor;
}

/**
 * Signs a round in review: stores the digest over all that was signed and moves the round on.
 *
 * @param expectedSha256 the digest of what the reviewer had on screen; when it moved on since, nothing is signed
 * @throws ExpectedError forbidden, moved_on, also while a session is held or open
 */
export async function signRound(
  asked: Asked,
  { roundId, remark, expectedSha256, at }: { roundId: string; remark: string; expectedSha256?: string; at: Date },
  db: Handle = appDb(),
): Promise<{ reviewId: string; sha256: string }> {
  return db.transaction(async (tx) => {
    const round = await roundContext(tx, { roundId, lock: true });
    const reviewer = await demandSigner(tx, asked, roundId);
    const obstacles = await roundObstacles(tx, round);
    if (obstacles.length > 0) throw new ExpectedError("moved_on", obstacles.join(" "));
    const sha256 = await roundDigest(tx, round);
    if (expectedSha256 !== undefined && expectedSha256 !== sha256) {
      throw new ExpectedError("moved_on", "Something in the round changed since you opened it. Look at it again.");
    }
    const reviewId = await insertReview(tx, {
      roundId,
      reviewerId: reviewer.personId,
      verdict: "signed",
      note: remark,
      signedSha256: sha256,
      entries: [],
      at,
    });
    await moveRound(tx, { roundId, from: "in_review", to: "signed", byPerson: reviewer.personId, at });
    await note(tx, asked, { action: "round.sign", subjectKind: "round", subjectId: roundId, after: { sha256 } });
    return { reviewId, sha256 };
  });
}

/**
 * Sends entries of a round in review back to the bench, each with a reason; the round is being measured again.
 * @throws ExpectedError forbidden, moved_on, malformed for an entry that is not of the round
 */
export async function sendBack(
  asked: Asked,
  {
    roundId,
    remark,
    entries,
    at,
  }: { roundId: string; remark: string; entries: readonly { entryId: string; reason: string }[]; at: Date },
  db: Handle = appDb(),
): Promise<{ reviewId: string }> {
  return db.transaction(async (tx) => {
    const round = await roundContext(tx, { roundId, lock: true });
    const reviewer = await demandSigner(tx, asked, roundId);
    if (round.state !== "in_review") throw new ExpectedError("moved_on", `The round is ${round.state}, not in review.`);
    for (const { entryId } of entries) {
      if (!round.entries.some((entry) => entry.entryId === entryId)) {
        throw new ExpectedError("malformed", "One of the entries is not of this round.", [
          { path: "entries", message: "names an entry that is not of this round" },
        ]);
      }
    }
    const reviewId = await insertReview(tx, {
      roundId,
      reviewerId: reviewer.personId,
      verdict: "sent_back",
      note: remark,
      signedSha256: null,
      entries,
      at,
    });
    await moveEntries(
      tx,
      entries.map(({ entryId, reason }) => ({
        entryId,
        from: "in_review",
        to: "on_the_bench",
        byPerson: reviewer.personId,
        byRight: "reviewer",
        reason,
        at,
      })),
    );
    await moveRound(tx, {
      roundId,
      from: "in_review",
      to: "measuring",
      byPerson: reviewer.personId,
      reason: remark,
      at,
    });
    await note(tx, asked, { action: "round.send_back", subjectKind: "round", subjectId: roundId, after: { entries } });
    return { reviewId };
  });
}
