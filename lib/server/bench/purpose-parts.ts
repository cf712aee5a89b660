import type { Handle } from "@/db/client/connect";
import { levelsOfUnits, settledAlready } from "@/db/queries/agreed";
import type { SessionHead } from "@/db/queries/bench-sessions";
import type { BenchSession } from "@/lib/contracts/bench-session";
import { bridgeUnits } from "@/lib/domain/baselines/bridge-units";
import { QUALIFYING_MOUNTS, qualificationOutcome, whyNotQualified } from "@/lib/domain/baselines/qualify";
import type { SessionRecord } from "@/lib/domain/results/session-record";

/** What a qualification or a bridging session gives so far; nothing for a round's session. */
export async function purposeParts(
  db: Handle,
  session: SessionHead,
  record: SessionRecord,
  setSpeeds: readonly number[],
): Promise<Pick<BenchSession, "qualification" | "bridge">> {
  if (session.purpose === "qualification") {
    const points = qualificationOutcome(record);
    const lacks = whyNotQualified(points, setSpeeds);
    const settled = await settledAlready(db, { sessionId: session.id });
    return { qualification: { mounts: QUALIFYING_MOUNTS, points, lacks, settled }, bridge: null };
  }
  if (session.bridgeUnitId === null) return { qualification: null, bridge: null };
  const levelsDba = await levelsOfUnits(db, { unitIds: [session.baselineUnitId, session.bridgeUnitId] });
  return { qualification: null, bridge: bridgeUnits(record, session.bridgeUnitId, levelsDba) };
}
