import type { Handle } from "@/db/client/connect";
import { roundsOfEntry, takeOutRow } from "@/db/queries/host-entries";
import { returnSignedRound } from "../review/return-to-review";

/** Takes an entry out of every round before its hour; a signed one goes back to review. */
export async function takeOutOfRounds(
  tx: Handle,
  { entryId, reason, at }: { entryId: string; reason: string; at: Date },
): Promise<void> {
  for (const roundId of await roundsOfEntry(tx, { entryId })) {
    await returnSignedRound(tx, { roundId, reason: `An entry was taken out: ${reason}`, at });
    await takeOutRow(tx, { roundId, entryId, reason, at });
  }
}
