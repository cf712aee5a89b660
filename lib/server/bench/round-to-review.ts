import { appDb } from "@/db/client/handles";
import { moveRound } from "@/db/queries/moves";
import { openHolds, openSessions } from "@/db/queries/review";
import { roundContext } from "@/db/queries/round-context";
import { ExpectedError } from "@/lib/domain/expected-error";
import { readyForReview, type RoundState } from "@/lib/domain/seasons/round-moves";
import { note, type Asked } from "../audit/audit";
import { demand } from "../permission";
import { demandRoundWork } from "./bench-access";

/**
 * Hands a round over to review: each of its entries is in review or was taken out, no session is open, no hold stands.
 * @throws ExpectedError moved_on with what is missing
 */
export async function roundToReview(
  asked: Asked,
  { roundId, at }: { roundId: string; at: Date },
): Promise<{ state: RoundState }> {
  const { actor } = asked;
  demand(actor, "bench.read");
  return appDb().transaction(async (tx) => {
    const round = await roundContext(tx, { roundId, lock: true });
    await demandRoundWork(tx, asked, roundId);
    if (round.state !== "measuring") {
      throw new ExpectedError("moved_on", `The round is ${round.state.replace("_", " ")}, not being measured.`);
    }
    const left = round.entries.filter((entry) => entry.state !== "in_review").length;
    if (!readyForReview(round.entries.map(({ state }) => ({ state, takenOut: false })))) {
      throw new ExpectedError("moved_on", `${left} of ${round.entries.length} entries are not in review yet.`);
    }
    if ((await openSessions(tx, { roundId })).length > 0) {
      throw new ExpectedError("moved_on", "A session of this round is still open at the bench.");
    }
    const [held] = await openHolds(tx, { roundId });
    if (held) throw new ExpectedError("moved_on", `A session of this round is held: ${held.reason}`);
    await moveRound(tx, { roundId, from: "measuring", to: "in_review", byPerson: actor.personId, at });
    await note(tx, asked, {
      action: "round.to_review",
      subjectKind: "round",
      subjectId: roundId,
      before: "measuring",
      after: "in_review",
    });
    return { state: "in_review" };
  });
}
