import { ewma, ewmaLimits, individualsChart, movingRangeConstants } from "@/lib/science/statistics/control-chart";
import { sampleSd, mean } from "@/lib/science/statistics/descriptive";
import { studentTQuantile } from "@/lib/science/statistics/distributions";
import { BASELINE_RULES, completes } from "@/lib/science/statistics/run-rules";

export type ControlQuantity = "level_dba" | "thermal_resistance_kpw" | "calibrator_db";

/** From this many sessions on a phase has limits of its own; before, they are called trial (common practice, no source). */
export const RUNS_FOR_LIMITS = 20;
/** A trial limit needs a spread: two sessions before. */
const RUNS_FOR_TRIAL = 2;
const LAMBDA = 0.2;
/** Width for λ = 0.2 with one false alarm in about 500 runs (J. M. Lucas, M. S. Saccucci, Technometrics 32 (1990) 1). */
const EWMA_WIDTH = 2.962;
const COVERAGE = 0.95;

/** Centre and standard deviation that limits are drawn by, in the unit of the values. */
export type Limits = { readonly centre: number; readonly sigma: number };

/** What a session read of one quantity, and whether the chart held it against its phase. */
export type EarlierPoint = { readonly value: number; readonly out: boolean };

export type ControlKind = "none" | "trial" | "frozen";

/** A session's value on its control charts. Everything in the unit of the values; null where it can't be known yet. */
export type ControlPoint = {
  readonly kind: ControlKind;
  readonly value: number;
  /** Sessions of the phase before this one. */
  readonly before: number;
  readonly centre: number | null;
  readonly sigma: number | null;
  readonly lower: number | null;
  readonly upper: number | null;
  readonly movingRange: number | null;
  readonly rangeUpper: number | null;
  readonly ewma: number | null;
  readonly ewmaLower: number | null;
  readonly ewmaUpper: number | null;
  /** What it breaks, in words; empty when it is in control. */
  readonly out: readonly string[];
};

/**
 * The standard deviation below which a chart's spread is not believed: that of a display's step, a/√12
 * (JCGM 100:2008, F.2.2.1), so that a bench that reads the same figure many times isn't held by the next step.
 */
export function sigmaFloor(quantity: ControlQuantity, heatLoadW: number): number {
  const step = 0.1;
  return (quantity === "thermal_resistance_kpw" ? step / heatLoadW : step) / Math.sqrt(12);
}

/** Frozen limits from the first twenty sessions of a phase that were not out; undefined while there are fewer. */
export function limitsOf(phase: readonly EarlierPoint[], floor: number): Limits | undefined {
  const counted = phase.filter((point) => !point.out).slice(0, RUNS_FOR_LIMITS);
  if (counted.length < RUNS_FOR_LIMITS) return undefined;
  const chart = individualsChart(counted.map((point) => point.value));
  return chart && { centre: chart.centre, sigma: Math.max(chart.sigma, floor) };
}

/**
 * Holds a session's value against those before it in its phase.
 *
 * With frozen limits: centre ± 3σ (NIST/SEMATECH e-Handbook 6.3.2.2), the run rules of `BASELINE_RULES`, and the EWMA
 * with λ = 0.2 (6.3.2.4). Without: the t-prediction interval for the next value, x̄ ± t·s·√(1 + 1/n), called trial. Its
 * 95 % are over all series that the session is held against together (Bonferroni), so that a bench with many set speeds
 * isn't held more often for it.
 *
 * A session that was out is drawn and then left out of spread, rules and weighted mean, so that one whose cause was found
 * and put right doesn't hold those after it; where the cause stays, each next one is out by itself.
 *
 * @param earlier of the same phase, the oldest first
 * @param frozen limits of the phase, when it has them
 * @param series how many values of the session are held against charts, from 1
 * @param floor see `sigmaFloor`
 */
export function controlPoint(
  earlier: readonly EarlierPoint[],
  value: number,
  { frozen, series, floor }: { frozen?: Limits; series: number; floor: number },
): ControlPoint {
  const last = earlier.at(-1);
  const counted = earlier.filter((point) => !point.out).map((point) => point.value);
  const base = {
    value,
    before: earlier.length,
    movingRange: last ? Math.abs(value - last.value) : null,
  };
  return { ...base, ...(frozen ? held(counted, value, frozen, floor) : trial(counted, value, series, floor)) };
}

const rangeLimit = (sigma: number): number => {
  const { d2, d4 } = movingRangeConstants();
  return d4 * d2 * sigma;
};

function averages(counted: readonly number[], value: number, { centre, sigma }: Limits) {
  const all = ewma([...counted, value], LAMBDA, centre);
  const { lower, upper } = ewmaLimits(centre, sigma, LAMBDA, EWMA_WIDTH, counted.length + 1);
  return { ewma: all[all.length - 1] ?? null, ewmaLower: lower, ewmaUpper: upper };
}

function held(counted: readonly number[], value: number, limits: Limits, floor: number) {
  const { centre, sigma } = limits;
  // Half a display's step from the centre is on it, and ends a run on one side: else a figure that a display can only
  // round one way would run there for ever.
  const halfStep = (floor * Math.sqrt(12)) / 2;
  const toZ = (each: number) => (Math.abs(each - centre) <= halfStep + 1e-12 ? 0 : (each - centre) / sigma);
  const z = [...counted, value].map(toZ);
  const weighted = averages(counted, value, limits);
  const out: string[] = BASELINE_RULES.filter((rule) => completes(rule, z, z.length - 1));
  if (weighted.ewma !== null && (weighted.ewma < weighted.ewmaLower || weighted.ewma > weighted.ewmaUpper))
    out.push("weighted mean outside its limits");
  return {
    kind: "frozen" as const,
    centre,
    sigma,
    lower: centre - 3 * sigma,
    upper: centre + 3 * sigma,
    rangeUpper: rangeLimit(sigma),
    ...weighted,
    out,
  };
}

function trial(counted: readonly number[], value: number, series: number, floor: number) {
  const centre = mean(counted);
  const s = sampleSd(counted);
  if (counted.length < RUNS_FOR_TRIAL || centre === undefined || s === undefined) {
    const none = { lower: null, upper: null, rangeUpper: null, ewma: null, ewmaLower: null, ewmaUpper: null };
    return { kind: "none" as const, centre: null, sigma: null, ...none, out: [] };
  }
  const sigma = Math.max(s, floor);
  const t = studentTQuantile(1 - (1 - COVERAGE) / (2 * series), counted.length - 1);
  const half = t * sigma * Math.sqrt(1 + 1 / counted.length);
  const lower = centre - half;
  const upper = centre + half;
  return {
    kind: "trial" as const,
    centre,
    sigma,
    lower,
    upper,
    rangeUpper: rangeLimit(sigma),
    ...averages(counted, value, { centre, sigma }),
    out: value < lower || value > upper ? ["outside the trial limits"] : [],
  };
}
