import {
  snapshotSchema,
  type EqualNoise,
  type Figure,
  type Snapshot,
  type SnapshotPoint,
  type Spectra,
} from "@/lib/contracts/publication";
import type { RoundContext, RoundEntryRow } from "@/db/queries/round-context";
import { effectiveDof, standardUncertainty, type Effect } from "@/lib/domain/results/effects";
import { equalCooling, equalNoise, reached } from "@/lib/domain/results/methods/v1/equal-noise";
import { readDeltaT, risesWithLevel } from "@/lib/domain/results/methods/v1/cooling-curve";
import { METHOD_V1 } from "@/lib/domain/results/methods/v1/parameters";
import { dofOrNull, roundResult } from "@/lib/domain/results/rounding";
import {
  sessionFigures,
  protocolPositionIds,
  type SessionFigures,
  type SubjectFigures,
} from "@/lib/domain/results/session-figures";
import type { SessionRecord } from "@/lib/domain/results/session-record";
import type { SessionSpectra } from "@/lib/domain/results/session-spectra";

import { figureBudgets, headlineBudget } from "./snapshot-budgets";

/** What surrounds an entry's figures in its snapshot. */
export interface SnapshotContext {
  round: RoundContext;
  entry: RoundEntryRow;
  microphoneDistanceMm: number;
  /** What the tones are predicted from; frozen beside the spectra. */
  makers: Spectra["makers"];
  /** False where a snapshot is made again that was published before budgets of all figures were kept. */
  withBudgets?: boolean;
}

/** A session with its figures, those of each other microphone position alone, and its spectra. */
export interface ComputedSession {
  record: SessionRecord;
  figures: SessionFigures;
  others: { name: string; figures: SessionFigures }[];
  spectra: SessionSpectra;
}

/** Computes a session once, for all entries that are published from it. */
export function computedSession(record: SessionRecord, spectra: SessionSpectra): ComputedSession {
  const protocol = protocolPositionIds(record);
  const others = record.positions
    .filter((position) => !protocol.includes(position.id))
    .map(({ id, name }) => ({ name, figures: sessionFigures(record, [id]) }));
  return { record, figures: sessionFigures(record), others, spectra };
}

export function figureOf(value: number, effects: readonly Effect[], factor = 1): Figure {
  return {
    value: roundResult(value),
    u: roundResult(factor * standardUncertainty(effects)),
    dof: dofOrNull(effectiveDof(effects)),
  };
}

/**
 * An entry's snapshot from its session's figures. The same readings give the same snapshot, digit by digit.
 * @throws Error when the entry or the baseline has no figures: the gates before review keep that out
 */
export function buildSnapshot(
  session: ComputedSession,
  { round, entry, microphoneDistanceMm, makers, withBudgets = true }: SnapshotContext,
): Snapshot {
  const { record, figures } = session;
  const own = figures.entries.find(({ subject }) => subject.entryId === entry.entryId);
  const { baseline } = figures;
  if (!own || !baseline)
    throw new Error(`no figures for the entry ${entry.entryId} in the session ${record.sessionId}`);
  const readings = round.levelsDba.map((level) => equalNoise(own.curve, baseline.curve, level));
  const headline = equalNoise(own.curve, baseline.curve, round.headlineDba);
  const cooling = equalCooling(own.curve, baseline.curve, round.headlineDba);
  const spectra = session.spectra.get(entry.entryId);
  return snapshotSchema.parse({
    schemaVersion: 1,
    entryId: entry.entryId,
    revisionId: entry.revisionId,
    designId: entry.designId,
    seasonId: round.seasonId,
    roundId: round.roundId,
    sessionId: record.sessionId,
    benchVersionId: record.benchVersionId,
    protocolVersionId: record.protocolVersionId,
    budgetVersionId: record.budgetVersionId,
    baselineUnitId: record.baselineUnitId,
    ruleVersionId: round.ruleVersionId,
    methodVersion: METHOD_V1.version,
    ownerIds: entry.ownerIds,
    specimenIds: [
      ...new Set(
        record.runs.flatMap((run) => (run.entryId === entry.entryId && run.specimenId ? [run.specimenId] : [])),
      ),
    ],
    microphoneDistanceMm,
    levelsDba: round.levelsDba,
    headlineDba: round.headlineDba,
    points: pointsOf(session, own),
    baselinePoints: pointsOf(session, baseline),
    against: [...own.against].map(([setSpeed, against]) => ({
      setSpeed,
      levelDifferenceDb: figureOf(against.levelDifferenceDb.value, against.levelDifferenceDb.effects),
      levelIsBound: against.levelIsBound,
      deltaTDifferenceK: figureOf(against.deltaTDifferenceK.value, against.deltaTDifferenceK.effects),
      resistanceRatio: figureOf(against.resistanceRatio.value, against.resistanceRatio.effects),
    })),
    equalNoise: readings.map((reading): EqualNoise =>
      reached(reading)
        ? {
            levelDba: reading.levelDba,
            ratio: figureOf(reading.ratio, reading.ratioEffects),
            deltaT: figureOf(reading.deltaTK, reading.deltaTEffects),
            difference: figureOf(reading.differenceK, reading.differenceEffects),
            upperBound: reading.upperBound,
          }
        : reading,
    ),
    equalCooling: cooling
      ? { levelDba: round.headlineDba, differenceDb: figureOf(cooling.differenceDb, cooling.effects) }
      : null,
    budget: reached(headline)
      ? headlineBudget(
          record,
          headline.differenceEffects,
          (own.curve && readDeltaT(own.curve, round.headlineDba)?.effects) ?? [],
        )
      : [],
    notes: notesOf(own, record),
    leftOutRuns: figures.leftOut.filter(({ runId }) =>
      record.runs.some((run) => run.runId === runId && run.entryId === entry.entryId),
    ),
    ...(withBudgets && { budgets: figureBudgets(record, own, cooling) }),
    ...(spectra && {
      spectra: { version: 1, makers, entry: spectra, baseline: session.spectra.get(record.baselineUnitId) ?? [] },
    }),
  });
}

function pointsOf(session: ComputedSession, figures: SubjectFigures): SnapshotPoint[] {
  return figures.points.map((point) => {
    const measured = figures.subject.points.filter((each) => each.setSpeedRpm === point.setSpeedRpm);
    return {
      setSpeed: point.setSpeedRpm,
      speedsRpm: (figures.subject.speedsRpm.get(point.setSpeedRpm) ?? []).map(roundResult),
      levelReadDba: roundResult(point.correctedDba + point.correctionDb),
      backgroundDba: measured[0]?.backgroundDba == null ? null : roundResult(measured[0].backgroundDba),
      level: {
        ...figureOf(point.correctedDba, point.levelEffects),
        upperBound: point.upperBound,
        correctionDb: roundResult(point.correctionDb),
      },
      deltaT: figureOf(point.deltaTK, point.deltaTEffects),
      resistance: figureOf(point.resistanceKPerW, point.deltaTEffects, 1 / point.powerW),
      powerW: roundResult(point.powerW),
      runs: measured.length,
      mounts: point.mounts,
      readingIds: [...(figures.readingIds.get(point.setSpeedRpm) ?? [])],
      otherPositions: session.others.flatMap(({ name, figures: there }) => {
        const same = [there.baseline, ...there.entries].find((each) => each?.subject.key === figures.subject.key);
        const level = same?.points.find((each) => each.setSpeedRpm === point.setSpeedRpm);
        return level ? [{ name, levelDba: roundResult(level.correctedDba), u: figureOf(0, level.levelEffects).u }] : [];
      }),
    };
  });
}

function notesOf(own: SubjectFigures, record: SessionRecord): Snapshot["notes"] {
  const notes: Snapshot["notes"] = [];
  if (own.curve && risesWithLevel(own.curve))
    notes.push({ code: "not-monotone", message: "ΔT/P rises with level between two points: kept as measured." });
  if (own.points.some((point) => point.upperBound))
    notes.push({
      code: "upper-bound",
      message: "The background was too near at some set speeds: those levels are bounds, shown with ≤.",
    });
  const specimens = new Set(
    record.runs.filter((run) => run.entryId === own.subject.entryId).map((run) => run.specimenId),
  );
  if (specimens.size === 1)
    notes.push({ code: "one-copy", message: "One printed copy was measured: copy-to-copy spread is not included." });
  return notes;
}
