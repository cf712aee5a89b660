import type { Handle } from "@/db/client/connect";
import { moveRound } from "@/db/queries/moves";
import { lockRound, setPublishAt } from "@/db/queries/schedule";
import type { RoundState } from "@/lib/domain/seasons/round-moves";

/**
 * What follows from a change in anything that was signed: a signed or scheduled round goes back to review with the
 * reason, and its hour is taken away. The round's row stays locked until the caller's transaction ends.
 * @returns the state that the round was in; undefined when there is none
 */
export async function returnSignedRound(
  tx: Handle,
  { roundId, reason, at }: { roundId: string; reason: string; at: Date },
): Promise<RoundState | undefined> {
  const state = await lockRound(tx, { roundId });
  if (state !== "signed" && state !== "scheduled") return state;
  await setPublishAt(tx, { roundId, publishAt: null });
  await moveRound(tx, { roundId, from: state, to: "in_review", byPerson: null, reason, at });
  return state;
}
