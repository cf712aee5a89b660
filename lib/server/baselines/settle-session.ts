import type { Handle } from "@/db/client/connect";
import {
  benchesOfSeason,
  insertAgreedValues,
  insertBridges,
  levelsOfUnits,
  qualifiedSpeeds,
  settledAlready,
  type AgreedValueRow,
} from "@/db/queries/agreed";
import { protocolOf, sessionHead } from "@/db/queries/bench-sessions";
import { holdsOfSession } from "@/db/queries/holds";
import { sessionRecords } from "@/db/queries/session-record";
import { bridgeUnits } from "@/lib/domain/baselines/bridge-units";
import { QUALIFYING_MOUNTS, qualificationOutcome, whyNotQualified } from "@/lib/domain/baselines/qualify";

/**
 * What comes of a qualification or bridging session once it is closed and nothing holds it: agreed values with their
 * uncertainty, or the bridge between its two units. Does nothing for a round's session, while a hold stands, while
 * mounts are missing, or a second time.
 */
export async function settleSession(tx: Handle, { sessionId, at }: { sessionId: string; at: Date }): Promise<void> {
  const session = await sessionHead(tx, { sessionId });
  if (!session || session.purpose === "round" || session.endedAt === null) return;
  const held = (await holdsOfSession(tx, { sessionId })).some((hold) => hold.liftedAt === null);
  if (held || (await settledAlready(tx, { sessionId }))) return;
  if (session.bridgeUnitId !== null) {
    await bridgeSession(tx, { sessionId, toUnitId: session.bridgeUnitId, at });
    return;
  }
  const [record] = await sessionRecords(tx, { sessionIds: [sessionId] });
  if (!record) return;
  const protocol = await protocolOf(tx, { protocolVersionId: session.protocolVersionId });
  const outcome = qualificationOutcome(record);
  if (whyNotQualified(outcome, protocol.setSpeeds).length > 0) return;
  await insertAgreedValues(tx, {
    baselineUnitId: session.baselineUnitId,
    benchVersionId: session.benchVersionId,
    from: at,
    reason: `Qualification: mean over ${Math.min(...outcome.map((point) => point.mounts))} mounts in session ${session.number}.`,
    sessionIds: [sessionId],
    values: outcome.flatMap(({ setSpeed, levelIsBound, levelDba, resistanceKpw }): AgreedValueRow[] => [
      ...(levelIsBound ? [] : [{ quantity: "level_dba" as const, setSpeed, value: levelDba.value, u: levelDba.u }]),
      { quantity: "thermal_resistance_kpw", setSpeed, value: resistanceKpw.value, u: resistanceKpw.u },
    ]),
  });
}

/** Bridges a session's own unit to another that ran in it, at the levels that seasons of either unit declare. */
export async function bridgeSession(
  tx: Handle,
  { sessionId, toUnitId, at }: { sessionId: string; toUnitId: string; at: Date },
): Promise<void> {
  const [record] = await sessionRecords(tx, { sessionIds: [sessionId] });
  if (!record) return;
  const levelsDba = await levelsOfUnits(tx, { unitIds: [record.baselineUnitId, toUnitId] });
  await insertBridges(tx, {
    fromUnitId: record.baselineUnitId,
    toUnitId,
    benchVersionId: record.benchVersionId,
    sessionId,
    at,
    bridges: bridgeUnits(record, toUnitId, levelsDba),
  });
}

/** Why a season can't open yet for want of bench qualification, a sentence a bench version; empty when it can. */
export async function unqualifiedBenches(db: Handle, { seasonId }: { seasonId: string }): Promise<string[]> {
  const benches = await benchesOfSeason(db, { seasonId });
  const words: string[] = [];
  for (const { benchVersionId, bench, setSpeeds, setting } of benches) {
    const there = await qualifiedSpeeds(db, { benchVersionId });
    const lacking = setSpeeds.filter((speed) => !there.includes(speed));
    if (lacking.length === 0) continue;
    const unit = setting === "rpm" ? "rpm" : "% drive";
    words.push(
      `${bench} is not qualified at ${lacking.join(", ")} ${unit}: it lacks ${QUALIFYING_MOUNTS} baseline remounts there. Start a qualification session under Benches and protocols.`,
    );
  }
  return words;
}
