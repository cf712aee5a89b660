import { publicDb } from "@/db/client/handles";
import {
  shownAttachments,
  shownProtocol,
  shownRanksOfEntry,
  shownSpecimens,
  shownWithdrawals,
  type EntryRankRow,
} from "@/db/queries/shown/sheet-parts";
import type { SheetEntryRow } from "@/db/queries/shown/sheet";
import type { Snapshot, SnapshotPoint } from "@/lib/contracts/publication";
import type { RawRuns } from "@/lib/contracts/raw-runs";
import { sheetSchema, type Sheet, type SheetPoint, type SheetRank } from "@/lib/contracts/sheet";
import { ExpectedError } from "@/lib/domain/expected-error";
import { stated } from "@/lib/domain/results/stated";
import { formatDate } from "@/lib/format/dates";
import { readRawRuns, readSheet, type SheetAnswer } from "./read-sheet";
import { sessionFileOf } from "./session-files";
import { sheetSpectra } from "./sheet-spectra";
import { sheetTraits } from "./sheet-traits";

const iso = (at: Date): string => at.toISOString();

/** Which entry of a design: the newest public one unless an entry or a revision's letter is given. */
export interface SheetAsked {
  slug: string;
  entryId?: string;
  letter?: string;
}

async function answerFor({ slug, entryId, letter }: SheetAsked): Promise<SheetAnswer> {
  const newest = await readSheet({ slug, entryId });
  const wanted = letter === undefined ? undefined : newest.history.find((entry) => entry.letter === letter);
  if ((letter !== undefined && !wanted) || (entryId !== undefined && newest.current.entryId !== entryId)) {
    throw new ExpectedError("not_found", "This design has no such public entry.");
  }
  return wanted && wanted.entryId !== newest.current.entryId ? readSheet({ slug, entryId: wanted.entryId }) : newest;
}

/**
 * A design's public page as people and programs read it: the frozen figures with their 95 % half-widths, and what
 * surrounds them.
 *
 * @throws ExpectedError not_found where nothing of it is public, gone with the reason where it was withdrawn
 */
export async function readSheetPage(asked: SheetAsked): Promise<Sheet> {
  const answer = await answerFor(asked).catch(async (error: unknown) => {
    if (!(error instanceof ExpectedError) || error.code !== "gone") throw error;
    const [stub] = await shownWithdrawals(publicDb(), { slug: asked.slug });
    throw new ExpectedError(
      "gone",
      stub ? `${stub.name} was withdrawn on ${formatDate(stub.at)}. ${stub.reason}` : error.detail,
    );
  });
  const { design, current, snapshot, history } = answer;
  const db = publicDb();
  const [protocol, ranks, specimens, files] = await Promise.all([
    shownProtocol(db, { protocolVersionId: current.protocolVersionId }),
    shownRanksOfEntry(db, {
      entryId: current.entryId,
      seasonId: current.seasonId,
      ruleVersionId: snapshot.ruleVersionId,
    }),
    shownSpecimens(db, { specimenIds: snapshot.specimenIds }),
    shownAttachments(db, { revisionId: current.revisionId }),
  ]);
  const revision = answer.revisions.revisions.find((each) => each.id === current.revisionId);
  if (!protocol || !revision) throw new Error(`the entry ${current.entryId} is public without protocol or revision`);
  const unit = answer.baselineUnit;
  return sheetSchema.parse({
    number: design.number,
    slug: design.slug,
    name: design.name,
    summary: design.summary,
    designers: design.designers ?? [],
    entryId: current.entryId,
    letter: current.letter,
    season: { slug: current.seasonSlug, title: current.seasonTitle, number: current.seasonNumber },
    round: current.roundNumber,
    bench: {
      name: current.benchName,
      version: current.benchNumber,
      microphoneDistanceMm: snapshot.microphoneDistanceMm,
    },
    protocol: {
      name: protocol.name,
      version: protocol.version,
      heatLoadW: protocol.heatLoadW,
      backgroundGrade: protocol.backgroundGrade,
      positions: protocol.positions,
      setting: protocol.setting,
    },
    baseline: unit ? { slug: unit.slug, name: unit.name, serial: unit.serial } : null,
    methodVersion: current.methodVersion,
    publishedAt: iso(current.publishedAt),
    firstPublishedAt: iso(current.firstPublishedAt),
    corrected: current.corrections,
    publication: { number: answer.publication.number, sha256: answer.publication.sha256 },
    olderPublications: answer.older.map((each) => ({ ...each, publishedAt: iso(each.publishedAt) })),
    revision: { licence: revision.licence, changes: revision.changes, printNotes: revision.print_notes },
    traits: sheetTraits(answer.revisions, current.revisionId),
    ...figuresOf(snapshot),
    ranks: ranksOf(ranks, current.roundId),
    specimens,
    files: files.map(({ takenDownAt, reason, ...file }) => ({
      ...file,
      takenDown: takenDownAt ? { at: iso(takenDownAt), reason: reason ?? "" } : null,
    })),
    history: history.map((entry) => historyLine(entry, answer.units)),
    corrections: answer.corrections.map((each) => ({ ...each, publishedAt: iso(each.publishedAt) })),
    questions: answer.questions.map((each) => ({ ...each, answeredAt: iso(each.answeredAt) })),
  });
}

/** What a snapshot froze, each figure with its 95 % half-width. */
function figuresOf(snapshot: Snapshot) {
  const levels = snapshot.points.map(({ level }) => level);
  const lowest = levels.reduce((low, level) => (level.value < low.value ? level : low), {
    value: Infinity,
    upperBound: false,
  });
  return {
    headlineDba: snapshot.headlineDba,
    equalNoise: snapshot.equalNoise.map((reading) =>
      "why" in reading
        ? { levelDba: reading.levelDba, reached: null, why: reading.why }
        : {
            levelDba: reading.levelDba,
            reached: {
              ratio: stated(reading.ratio),
              deltaTK: stated(reading.deltaT),
              differenceK: stated(reading.difference),
              upperBound: reading.upperBound,
            },
            why: null,
          },
    ),
    equalCooling: snapshot.equalCooling && {
      levelDba: snapshot.equalCooling.levelDba,
      differenceDb: stated(snapshot.equalCooling.differenceDb),
    },
    levelRangeDba: {
      low: lowest.value,
      lowIsBound: lowest.upperBound,
      high: Math.max(...levels.map((level) => level.value)),
    },
    points: snapshot.points.map(sheetPoint),
    baselinePoints: snapshot.baselinePoints.map(sheetPoint),
    against: snapshot.against.map((each) => ({
      setSpeed: each.setSpeed,
      levelIsBound: each.levelIsBound,
      levelDifferenceDb: stated(each.levelDifferenceDb),
      deltaTDifferenceK: stated(each.deltaTDifferenceK),
      resistanceRatio: stated(each.resistanceRatio),
    })),
    budget: snapshot.budget,
    budgets: snapshot.budgets ?? null,
    spectra: sheetSpectra(snapshot),
    notes: snapshot.notes,
    leftOutRuns: snapshot.leftOutRuns,
  };
}

/** A point of a snapshot as it is told; also what the baseline's pages show. */
export function sheetPoint({ readingIds: _ids, level, deltaT, resistance, ...point }: SnapshotPoint): SheetPoint {
  return {
    ...point,
    levelDba: stated(level),
    upperBound: level.upperBound,
    correctionDb: level.correctionDb,
    deltaTK: stated(deltaT),
    resistanceKpw: stated(resistance),
  };
}

function ranksOf(rows: readonly EntryRankRow[], roundId: string): Sheet["ranks"] {
  const told = ({ roundId: inRound, number, asOf, ...row }: EntryRankRow | undefined = noRank): SheetRank | null =>
    number === 0 ? null : { scope: inRound ? "round" : "season", standing: number, asOf: iso(asOf), ...row };
  const ofRound = rows.filter((row) => row.roundId === roundId);
  const ofSeason = rows.filter((row) => row.roundId === null);
  return { then: told(ofRound[0]), now: told(ofRound.at(-1)), season: told(ofSeason.at(-1)) };
}

const noRank: EntryRankRow = {
  roundId: null,
  number: 0,
  asOf: new Date(0),
  rank: null,
  low: null,
  high: null,
  whyNotRanked: null,
  of: 0,
};

function historyLine(entry: SheetEntryRow, units: SheetAnswer["units"]): Sheet["history"][number] {
  return {
    entryId: entry.entryId,
    letter: entry.letter,
    season: entry.seasonSlug,
    seasonTitle: entry.seasonTitle,
    round: entry.roundNumber,
    bench: `${entry.benchName}, version ${entry.benchNumber}`,
    headlineDba: entry.headlineDba,
    levelDifferenceDb: entry.levelDifferenceDb,
    resistancePercent: 100 * entry.resistanceRatio,
    equalNoisePercent: entry.equalNoisePercent,
    baselineSerial: units.find((unit) => unit.unitId === entry.baselineUnitId)?.serial ?? null,
    roundRank: entry.roundRank,
    roundOf: entry.roundOf,
    whyNotRanked: entry.whyNotRanked,
  };
}

/** Every raw reading behind an entry's figures and the baseline's of its session. */
export async function readRawRunsPage(asked: { slug: string; entryId?: string }): Promise<RawRuns> {
  const { sessionId, runs, baselineRuns, readings, files } = await readRawRuns(asked);
  const told = (subject: "entry" | "baseline") => (run: (typeof runs)[number]) => ({
    ...run,
    subject,
    beganAt: iso(run.beganAt),
  });
  return {
    sessionId,
    runs: [...runs.map(told("entry")), ...baselineRuns.map(told("baseline"))],
    readings: readings.map((reading) => ({ ...reading, takenAt: iso(reading.takenAt) })),
    files: files.map(sessionFileOf),
  };
}
