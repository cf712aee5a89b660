import { sampleSd, mean as meanOf } from "@/lib/science/statistics/descriptive";
import { effectiveDof, standardUncertainty, type Effect } from "../results/effects";
import type { MeasuredPoint } from "../results/measured-point";
import { sessionPoints } from "../results/methods/v1/session-points";
import { setSpeedPoints } from "../results/methods/v1/set-speed-points";
import { dofOrNull, roundResult } from "../results/rounding";
import { protocolPositionIds } from "../results/session-figures";
import type { SessionRecord } from "../results/session-record";

/** Remounts of the baseline that qualify a bench before its first season (product's rule). */
export const QUALIFYING_MOUNTS = 10;

/** What mounts of one unit at one set speed show of one quantity, in its unit (dB(A) and dB, or K/W). */
export type Repeatability = {
  readonly value: number;
  /** Standard deviation of the means of mounts; null for fewer than two. */
  readonly sBetween: number | null;
  /** Standard deviation of repeats within a mount, pooled; null where no mount was run twice. */
  readonly sWithin: number | null;
  /** Standard uncertainty of the value, shared parts with it; its degrees of freedom, null for infinitely many. */
  readonly u: number;
  readonly dof: number | null;
};

export type QualifiedPoint = {
  readonly setSpeed: number;
  readonly mounts: number;
  readonly runs: number;
  readonly levelIsBound: boolean;
  readonly levelDba: Repeatability;
  readonly resistanceKpw: Repeatability;
};

/**
 * Repeatability and agreed values from one sitting with many mounts of the session's baseline unit, by rising set speed.
 * The value is the mean over mounts (levels as energies, background-corrected); between and within mounts by one-way
 * analysis of variance (ISO 5725-2:1994, 7.4; clause from memory); u from the bench's budget or the mounts' own spread,
 * whichever is larger, over the mounts, with calibrator, offsets and gain, which mounting again doesn't reduce.
 * Empty while no run of the baseline is done.
 */
export function qualificationOutcome(record: SessionRecord): QualifiedPoint[] {
  const { subjects } = sessionPoints(record, protocolPositionIds(record));
  const own = subjects.find((subject) => subject.baselineUnitId === record.baselineUnitId);
  if (!own) return [];
  const named = { sessionId: record.sessionId, key: `baseline ${record.baselineUnitId}` };
  return setSpeedPoints(named, own.points, record.grade).map((point) => {
    const here = own.points.filter((each) => each.setSpeedRpm === point.setSpeedRpm);
    const spread = (of: (measured: MeasuredPoint) => number) => mountSpread(here, of);
    return {
      setSpeed: point.setSpeedRpm,
      mounts: point.mounts,
      runs: here.length,
      levelIsBound: point.upperBound,
      levelDba: figure(
        point.correctedDba,
        spread((each) => each.levelReadDba),
        point.levelEffects,
        1,
      ),
      resistanceKpw: figure(
        point.resistanceKPerW,
        spread((each) => each.deltaTK / each.powerW),
        point.deltaTEffects,
        1 / point.powerW,
      ),
    };
  });
}

function figure(
  value: number,
  { sBetween, sWithin }: Pick<Repeatability, "sBetween" | "sWithin">,
  effects: readonly Effect[],
  factor: number,
): Repeatability {
  return {
    value: roundResult(value),
    sBetween,
    sWithin,
    u: roundResult(factor * standardUncertainty(effects)),
    dof: dofOrNull(effectiveDof(effects)),
  };
}

/** Spread of the mounts' means, and within mounts √(Σ(x − x̄_mount)² / Σ(n_mount − 1)). */
export function mountSpread(
  points: readonly MeasuredPoint[],
  of: (measured: MeasuredPoint) => number,
): Pick<Repeatability, "sBetween" | "sWithin"> {
  const groups = new Map<number, number[]>();
  for (const point of points) groups.set(point.mount, [...(groups.get(point.mount) ?? []), of(point)]);
  const means = [...groups.values()].map((values) => meanOf(values) ?? Number.NaN);
  let squares = 0;
  let divisor = 0;
  for (const values of groups.values()) {
    const s = sampleSd(values);
    if (s === undefined) continue;
    squares += s ** 2 * (values.length - 1);
    divisor += values.length - 1;
  }
  const between = sampleSd(means);
  return {
    sBetween: between === undefined ? null : roundResult(between),
    sWithin: divisor > 0 ? roundResult(Math.sqrt(squares / divisor)) : null,
  };
}

/** What an outcome lacks to qualify a bench for these set speeds, in words; empty when it does. */
export function whyNotQualified(
  outcome: readonly Pick<QualifiedPoint, "setSpeed" | "mounts">[],
  setSpeeds: readonly number[],
): string[] {
  return setSpeeds.flatMap((setSpeed) => {
    const mounts = outcome.find((point) => point.setSpeed === setSpeed)?.mounts ?? 0;
    return mounts >= QUALIFYING_MOUNTS ? [] : [`${QUALIFYING_MOUNTS - mounts} more mounts at ${setSpeed}`];
  });
}
