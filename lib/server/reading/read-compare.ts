import { appDb, publicDb } from "@/db/client/handles";
import { sessionRecords } from "@/db/queries/session-record";
import { shownBaselineTraits, shownBridges, shownRanks } from "@/db/queries/shown/compare";
import { entriesByIds } from "@/db/queries/shown/entries";
import { shownBaselineUnits, shownEntriesByIds, shownPublications, shownRevisions } from "@/db/queries/shown/sheet";
import { compareMost, type ComparedHead, type ComparedTrait } from "@/lib/contracts/compare";
import { snapshotSchema, type Snapshot } from "@/lib/contracts/publication";
import { entryToken } from "@/lib/domain/designs/entry-token";
import { ExpectedError } from "@/lib/domain/expected-error";
import { groupBy } from "@/lib/domain/group-by";
import { comparabilityOf, type Comparability } from "@/lib/domain/results/compare-levels";
import type { LayOverInput } from "@/lib/domain/results/lay-over";
import type { MeasuredPoint } from "@/lib/domain/results/measured-point";
import { sessionPoints } from "@/lib/domain/results/methods/v1/session-points";
import { protocolPositionIds } from "@/lib/domain/results/session-figures";
import { comparedTraits } from "./compare-traits";
import { drawnTraits } from "./drawn-traits";
import { indexItem } from "./list-designs";

/** Public entries side by side, with the measured points that laying them over their baselines takes. */
export type CompareSheet = {
  comparability: Comparability;
  missing: number;
  entries: ComparedHead[];
  traits: ComparedTrait[];
  /** Entries by id, in the order of `entries`. */
  laid: LayOverInput;
};

/**
 * One to four public entries with all that laying them over their baselines takes: the measured points themselves, so
 * that the page reads any level with the very functions that made the published figures.
 *
 * @param entryIds those that are not public now are left out and counted
 * @throws ExpectedError not_found when none is public
 */
export async function readCompare({ entryIds }: { entryIds: readonly string[] }): Promise<CompareSheet> {
  const db = publicDb();
  const ids = [...new Set(entryIds)].slice(0, compareMost);
  const found = await shownEntriesByIds(db, { entryIds: ids });
  const entries = ids.flatMap((id) => found.find((entry) => entry.entryId === id) ?? []);
  if (entries.length === 0) throw new ExpectedError("not_found", "None of these entries is public.");
  const publicIds = entries.map((entry) => entry.entryId);
  const unitIds = [...new Set(entries.map((entry) => entry.baselineUnitId))];
  const [publications, listed, ranks, revisions, units, baselines] = await Promise.all([
    shownPublications(db, { entryIds: publicIds }),
    entriesByIds(db, { entryIds: publicIds }),
    shownRanks(db, { entryIds: publicIds }),
    shownRevisions(db, { revisionIds: entries.map((entry) => entry.revisionId) }),
    shownBaselineUnits(db, { unitIds }),
    shownBaselineTraits(db, { unitIds }),
  ]);
  const snapshots = new Map(
    publications.filter(({ current }) => current).map((row) => [row.entryId, snapshotSchema.parse(row.snapshot)]),
  );
  const items = new Map(listed.map(indexItem).map((item) => [item.entryId, item]));
  const ranksOf = groupBy(ranks, (row) => row.entryId);
  const complete = entries.map((entry) => {
    const [snapshot, item] = [snapshots.get(entry.entryId), items.get(entry.entryId)];
    const revision = revisions.revisions.find((each) => each.id === entry.revisionId);
    const trait = revisions.traits.find((each) => each.revision_id === entry.revisionId);
    const unit = units.find((each) => each.unitId === entry.baselineUnitId);
    if (!snapshot || !item || !revision || !trait || !unit)
      throw new Error(`the entry ${entry.entryId} is public without its publication, revision, traits or baseline`);
    const rotors = revisions.rotors.filter((rotor) => rotor.revision_id === entry.revisionId);
    return { entry, snapshot, item, revision, trait, rotors, unit };
  });
  const toUnit = complete[0]?.entry.baselineUnitId ?? "";
  const levelDba = complete[0]?.snapshot.headlineDba ?? Number.NaN;
  const bridges = unitIds.length > 1 ? await shownBridges(db, { toUnit, levelDba }) : [];
  const bridgeFrom = (unitId: string) => bridges.find((bridge) => bridge.fromUnit === unitId) ?? null;
  const carried = unitIds.every((unitId) => unitId === toUnit || bridgeFrom(unitId));
  const comparability = comparabilityOf(entries);
  return {
    comparability: comparability === "not-comparable" && carried ? "ratios" : comparability,
    missing: ids.length - entries.length,
    entries: complete.map(({ entry, snapshot, item, revision, trait, rotors, unit }): ComparedHead => ({
      token: entryToken({ slug: item.slug, letter: item.letter, seasonSlug: item.seasonSlug }),
      entryId: item.entryId,
      slug: item.slug,
      name: item.name,
      letter: item.letter,
      designers: item.designers,
      seasonSlug: item.seasonSlug,
      seasonTitle: item.seasonTitle,
      roundNumber: item.roundNumber,
      headlineDba: snapshot.headlineDba,
      levelsDba: snapshot.levelsDba,
      bench: `${entry.benchName}, version ${entry.benchNumber}`,
      distanceMm: snapshot.microphoneDistanceMm,
      sessionId: snapshot.sessionId,
      baselineUnit: `${unit.name}, unit ${unit.serial}`,
      bridge: carried ? bridgeFrom(entry.baselineUnitId) : null,
      methodVersion: snapshot.methodVersion,
      corrections: item.corrections,
      printNotes: revision.print_notes,
      licence: revision.licence,
      drawnFrom: drawnTraits(trait, rotors),
      stages: trait.stages,
      spectra: comparedSpectra(snapshot),
      ranks: (ranksOf.get(item.entryId) ?? []).map((row) => ({
        rule: row.ruleName,
        of: row.roundId === null ? "season" : "round",
        rank: row.rank,
        rankLow: row.rankLow,
        rankHigh: row.rankHigh,
        ranked: row.of,
        whyNotRanked: row.whyNotRanked,
      })),
    })),
    traits: comparedTraits(
      complete.map(({ trait, rotors, item }) => ({
        trait,
        rotors,
        licence: item.licence,
        designers: item.designers,
      })),
      baselines.map((each) => each.blades),
    ),
    laid: await measuredPoints(complete.map(({ snapshot }) => snapshot)),
  };
}

/** Spectra at the protocol's positions alone: others never stand for the level. */
function comparedSpectra({ spectra }: Snapshot): ComparedHead["spectra"] {
  const ofProtocol = (each: { ofProtocol: boolean }) => each.ofProtocol;
  const entry = spectra?.entry.filter(ofProtocol) ?? [];
  return entry.length === 0 ? null : { entry, baseline: spectra?.baseline.filter(ofProtocol) ?? [] };
}

/** The points of these entries alone and of their sessions' baselines; what else a session ran stays inside. */
async function measuredPoints(snapshots: readonly Snapshot[]): Promise<LayOverInput> {
  const sessionIds = [...new Set(snapshots.map((snapshot) => snapshot.sessionId))];
  const records = await sessionRecords(appDb(), { sessionIds });
  const points = new Map<string, readonly MeasuredPoint[]>();
  const sessions = records.map((record) => {
    const { subjects } = sessionPoints(record, protocolPositionIds(record));
    for (const subject of subjects)
      if (subject.entryId) points.set(`${record.sessionId} ${subject.entryId}`, subject.points);
    const baseline = subjects.find((subject) => subject.baselineUnitId === record.baselineUnitId);
    return { id: record.sessionId, grade: record.grade, baselinePoints: baseline?.points ?? [] };
  });
  return {
    sessions,
    entries: snapshots.map(({ entryId, sessionId }) => ({
      id: entryId,
      sessionId,
      points: points.get(`${sessionId} ${entryId}`) ?? [],
    })),
  };
}
