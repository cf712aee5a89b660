import { appDb } from "@/db/client/handles";
import { benchVersionOf, insertSession } from "@/db/queries/bench-sessions";
import { seasonMisfits } from "@/db/queries/host-benches";
import type { StartBenchSession } from "@/lib/contracts/control";
import { ExpectedError } from "@/lib/domain/expected-error";
import { note, type Asked } from "../audit/audit";
import { demandNoOpenSession, demandTicked } from "../bench/session-start";
import { demand } from "../permission";

/**
 * Starts a session without a round: ten remounts that qualify a bench version, or both units of a bridge. By the host;
 * operators work it like any other. One session is open on a bench.
 * @throws ExpectedError malformed while a caution is not ticked or the parts don't fit the bench version
 */
export async function startBenchSession(
  asked: Asked,
  { benchVersionId, at, ...input }: { benchVersionId: string; at: Date } & StartBenchSession,
): Promise<{ sessionId: string }> {
  const { actor } = asked;
  demand(actor, "bench.manage");
  demandTicked(input.checklist);
  return appDb().transaction(async (tx) => {
    const bench = await benchVersionOf(tx, { benchVersionId }).catch(() => undefined);
    if (!bench) throw new ExpectedError("not_found", "There is no such bench version.");
    const units = [input.baselineUnitId, ...(input.bridgeUnitId ? [input.bridgeUnitId] : [])];
    for (const baselineUnitId of units) {
      const misfits = await seasonMisfits(tx, { ...input, benchVersionId, baselineUnitId });
      if (misfits.length > 0) throw new ExpectedError("malformed", "The session's parts don't fit together.", misfits);
    }
    if (input.bridgeUnitId === input.baselineUnitId) {
      throw new ExpectedError("malformed", "A bridge is between two units.", [
        { path: "bridgeUnitId", message: "is the same unit" },
      ]);
    }
    await demandNoOpenSession(tx, bench.benchId);
    const sessionId = await insertSession(tx, {
      benchId: bench.benchId,
      benchVersionId,
      protocolVersionId: input.protocolVersionId,
      budgetVersionId: input.budgetVersionId,
      baselineUnitId: input.baselineUnitId,
      bridgeUnitId: input.bridgeUnitId ?? null,
      purpose: input.purpose,
      roundId: null,
      operatorId: actor.personId,
      checklist: input.checklist,
      at,
    });
    await note(tx, asked, {
      action: "session.start",
      subjectKind: "session",
      subjectId: sessionId,
      after: { purpose: input.purpose },
    });
    return { sessionId };
  });
}
