import { studentTTwoSided } from "@/lib/science/statistics/distributions";
import { coverageDof, coverageFactor95 } from "@/lib/science/statistics/uncertainty";
import { combineEffects, effectiveDof, standardUncertainty, type Effect } from "./effects";
import type { LaidEntry } from "./lay-over";
import { readDeltaT } from "./methods/v1/cooling-curve";
import {
  equalCooling,
  equalNoise,
  reached,
  type EqualCoolingReading,
  type EqualNoiseReading,
  type NotReached,
} from "./methods/v1/equal-noise";

/** A figure with the half-width of its 95 % coverage interval (k by its effective degrees of freedom). */
export type Estimate = { readonly value: number; readonly half95: number };
/**
 * A difference; a tie where the interval holds 0, or where the lead is within a bound's correction. `p` is two-sided, of
 * no difference at all: t = |value|/u with the degrees of freedom of the interval. Each is that of its own pair alone.
 */
export type Contrast = Estimate & { readonly tie: boolean; readonly p: number };

export type ComparedEntry = {
  readonly id: string;
  readonly levelDba: number;
  /** Why nothing is read off at the level; the other figures are undefined then. */
  readonly why?: NotReached["why"];
  /** ΔT/P at the level over the baseline's, %. Its contrast is to 100 %. */
  readonly ratioPercent?: Contrast;
  /** The ratio times the baseline's ΔT at the level, K. */
  readonly deltaTK?: Estimate;
  /** That less the baseline's ΔT, K. */
  readonly differenceK?: Contrast;
  /** The entry's level is only known as "at most" here, and so are its figures. */
  readonly upperBound?: boolean;
  /** Its level where it cools as its baseline does at this level, less this level, dB; where there is one such. */
  readonly coolingDb?: Contrast;
  /** The baseline's own ΔT at the level in the entry's session, K; undefined outside its range. */
  readonly baselineDeltaTK?: Estimate;
};

/** Figures of a less those of b, in percentage points of the baseline's ΔT/P, in K and in dB. */
export type ComparedPair = {
  readonly a: string;
  readonly b: string;
  readonly percent?: Contrast;
  readonly deltaTK?: Contrast;
  readonly coolingDb?: Contrast;
};

/** What a ratio to one baseline unit is multiplied by to be one to another, from sessions that ran both. */
export type UnitBridge = {
  readonly fromUnit: string;
  readonly ratio: number;
  readonly u: number;
  readonly dof: number | null;
};

export type CompareFigures = { readonly entries: readonly ComparedEntry[]; readonly pairs: readonly ComparedPair[] };

function estimate(value: number, effects: readonly Effect[]): Estimate {
  return { value, half95: coverageFactor95(effectiveDof(effects)) * standardUncertainty(effects) };
}

/** @param allowance how much of a lead below zero, in the value's unit, is a bound's correction; negative for above */
function contrast(value: number, effects: readonly Effect[], allowance = 0): Contrast {
  const read = estimate(value, effects);
  const u = standardUncertainty(effects);
  const withinBound = allowance * -Math.sign(value) > Math.abs(value);
  // Without any uncertainty a difference is one for certain, and none is none.
  const p = u > 0 ? studentTTwoSided(value / u, coverageDof(effectiveDof(effects))) : value === 0 ? 1 : 0;
  return { ...read, tie: Math.abs(value) <= read.half95 || withinBound, p };
}

const less = (a: readonly Effect[], b: readonly Effect[]) =>
  combineEffects([
    { factor: 1, effects: a },
    { factor: -1, effects: b },
  ]);

const times = (factor: number, effects: readonly Effect[]) => combineEffects([{ factor, effects }]);

type Read = {
  readonly bridge: UnitBridge | undefined;
  readonly laid: LaidEntry;
  readonly levelDba: number;
  readonly noise: EqualNoiseReading | NotReached;
  readonly cooling: EqualCoolingReading | undefined;
};

function comparedEntry({ laid, levelDba, noise, cooling }: Read): ComparedEntry {
  const below = laid.baseline.curve && readDeltaT(laid.baseline.curve, levelDba);
  const base = {
    id: laid.id,
    levelDba,
    ...(below && { baselineDeltaTK: estimate(below.value, below.effects) }),
    ...(cooling && { coolingDb: contrast(cooling.differenceDb, cooling.effects) }),
  };
  if (!reached(noise)) return { ...base, why: noise.why };
  const { boundAllowance } = noise;
  const baselineK = noise.deltaTK / noise.ratio;
  return {
    ...base,
    ratioPercent: {
      ...contrast(100 * (noise.ratio - 1), times(100, noise.ratioEffects), 100 * boundAllowance),
      value: 100 * noise.ratio,
    },
    deltaTK: estimate(noise.deltaTK, noise.deltaTEffects),
    differenceK: contrast(noise.differenceK, noise.differenceEffects, boundAllowance * baselineK),
    upperBound: noise.upperBound,
  };
}

/** The ratio as one to the common baseline unit: over the bridge, whose uncertainty is one source more. */
function commonRatio({ ratio, ratioEffects, boundAllowance }: EqualNoiseReading, bridge: UnitBridge | undefined) {
  if (!bridge) return { ratio, effects: ratioEffects, boundAllowance };
  const own: Effect = {
    source: `bridge from ${bridge.fromUnit}`,
    kind: "bridge",
    quantity: "ratio",
    owner: bridge.fromUnit,
    size: ratio * bridge.u,
    dof: bridge.dof ?? Infinity,
  };
  return {
    ratio: ratio * bridge.ratio,
    effects: combineEffects([
      { factor: bridge.ratio, effects: ratioEffects },
      { factor: 1, effects: [own] },
    ]),
    boundAllowance: boundAllowance * bridge.ratio,
  };
}

function comparedPair(a: Read, b: Read): ComparedPair {
  const pair = { a: a.laid.id, b: b.laid.id };
  const dB = a.cooling &&
    b.cooling && {
      coolingDb: contrast(a.cooling.differenceDb - b.cooling.differenceDb, less(a.cooling.effects, b.cooling.effects)),
    };
  if (!reached(a.noise) || !reached(b.noise)) return { ...pair, ...dB };
  const allowance = a.noise.boundAllowance - b.noise.boundAllowance;
  const baselineK = a.noise.deltaTK / a.noise.ratio;
  const [ofA, ofB] = [commonRatio(a.noise, a.bridge), commonRatio(b.noise, b.bridge)];
  return {
    ...pair,
    ...dB,
    percent: contrast(
      100 * (ofA.ratio - ofB.ratio),
      times(100, less(ofA.effects, ofB.effects)),
      100 * (ofA.boundAllowance - ofB.boundAllowance),
    ),
    deltaTK: contrast(
      a.noise.deltaTK - b.noise.deltaTK,
      less(a.noise.deltaTEffects, b.noise.deltaTEffects),
      allowance * baselineK,
    ),
  };
}

/**
 * Every entry against its session's baseline and every two against each other, at a level each (one for all where they
 * share an axis; each season's headline level where they don't). Parts that two figures share are cancelled by their
 * sources; what is not reached has its reason and no figure.
 *
 * @param levelOf level in dB(A) by entry id
 * @param bridgeOf by entry id, where its session ran another baseline unit than the common one; acts on the percentages
 *   between entries alone
 */
export function compareFigures(
  laid: readonly LaidEntry[],
  levelOf: (id: string) => number,
  bridgeOf: (id: string) => UnitBridge | undefined = () => undefined,
): CompareFigures {
  const reads = laid.map((entry): Read => {
    const levelDba = levelOf(entry.id);
    return {
      laid: entry,
      bridge: bridgeOf(entry.id),
      levelDba,
      noise: equalNoise(entry.curve, entry.baseline.curve, levelDba),
      cooling: equalCooling(entry.curve, entry.baseline.curve, levelDba),
    };
  });
  return {
    entries: reads.map(comparedEntry),
    pairs: reads.flatMap((a, i) => reads.slice(i + 1).map((b) => comparedPair(a, b))),
  };
}

/** Points of a subject with 95 % half-widths of level (dB) and ΔT (K), as a chart shows them; ascending set speed. */
export function pointsWithIntervals({ points }: Pick<LaidEntry, "points">) {
  return points.map((point) => ({
    setSpeedRpm: point.setSpeedRpm,
    levelDba: { ...estimate(point.correctedDba, point.levelEffects), upperBound: point.upperBound },
    deltaTK: estimate(point.deltaTK, point.deltaTEffects),
    powerW: point.powerW,
    resistanceKPerW: estimate(point.resistanceKPerW, times(1 / point.powerW, point.deltaTEffects)),
    mounts: point.mounts,
  }));
}

/**
 * ΔT along a subject's curve as the method reads it, K, with the 95 % half-width at each level: what levels and ΔT of
 * the points around it leave open there. From the lowest level to the highest in even steps; none without a curve.
 */
export function curveWithIntervals({ curve }: Pick<LaidEntry, "curve">, steps: number) {
  if (!curve) return [];
  const { xMin, xMax } = curve.deltaT;
  return Array.from({ length: steps + 1 }, (_, step) => {
    const levelDba = step === steps ? xMax : xMin + ((xMax - xMin) * step) / steps;
    const read = readDeltaT(curve, levelDba);
    return read && { levelDba, deltaTK: estimate(read.value, read.effects) };
  }).filter((each) => each !== undefined);
}
