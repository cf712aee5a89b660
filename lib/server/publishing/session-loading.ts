import { standingSpectra, toneMakers } from "@/db/queries/spectra";
import { sessionRecords } from "@/db/queries/session-record";
import type { Handle } from "@/db/client/connect";
import type { ToneMakers } from "@/lib/contracts/publication";
import { groupBy } from "@/lib/domain/group-by";
import { sessionSpectra } from "@/lib/domain/results/session-spectra";
import { computedSession, type ComputedSession } from "./snapshot";

/**
 * Sessions with their figures and spectra, computed once for all entries that rest on them.
 *
 * @param dryCorrections corrections to be taken as published, for a dry run
 */
export async function computedSessions(
  db: Handle,
  { sessionIds, dryCorrections = [] }: { sessionIds: readonly string[]; dryCorrections?: readonly string[] },
): Promise<Map<string, ComputedSession>> {
  const records = await sessionRecords(db, { sessionIds, dryCorrections });
  const spectra = groupBy(await standingSpectra(db, { sessionIds, dryCorrections }), (each) => each.sessionId);
  return new Map(
    records.map((record) => [
      record.sessionId,
      computedSession(record, sessionSpectra(record, spectra.get(record.sessionId) ?? [])),
    ]),
  );
}

/** What the tones of an entry and of its session's baseline are predicted from; null where that can't be known. */
export async function makersOf(
  db: Handle,
  { revisionIds, baselineUnitIds }: { revisionIds: readonly string[]; baselineUnitIds: readonly string[] },
): Promise<(revisionId: string, baselineUnitId: string) => { entry: ToneMakers | null; baseline: ToneMakers | null }> {
  const makers = await toneMakers(db, { revisionIds, baselineUnitIds });
  return (revisionId, baselineUnitId) => ({
    entry: makers.get(revisionId) ?? null,
    baseline: makers.get(baselineUnitId) ?? null,
  });
}
