import { ewma, ewmaLimits, individualsChart, predictionLimits, type ChartLimits } from "./control-chart";
import { at } from "./descriptive";
import { BASELINE_RULES, runRuleFlags, type RunRule } from "./run-rules";

/** From this many runs on a phase has limits of its own; before, they are called trial (common practice, no source). */
export const RUNS_FOR_LIMITS = 20;
const LAMBDA = 0.2;
/** Width for λ = 0.2 with one false alarm in about 500 runs (J. M. Lucas, M. S. Saccucci, Technometrics 32 (1990) 1). */
const EWMA_WIDTH = 2.962;

/** A stretch of runs without a documented change, e.g. of sensor or baseline unit. */
export interface ChartPhase {
  readonly values: readonly number[];
  /** Limits frozen before, e.g. from a season's first twenty runs; left out: from the values themselves. */
  readonly frozen?: ChartLimits;
}

export interface PhaseResult {
  readonly kind: "none" | "trial" | "limits";
  readonly limits: ChartLimits | undefined;
  readonly ewma: Float64Array | undefined;
  readonly ewmaLimits: { lower: number; upper: number } | undefined;
  /** Indices in the phase (from 0) that are out, and by what. */
  readonly out: readonly {
    index: number;
    reason: RunRule | "outside the trial limits" | "moving average outside its limits";
  }[];
}

/**
 * Each phase on its own, so that a documented change draws a break. Under three runs nothing can be said; under twenty
 * each run is held against the 95 % prediction from those before it (trial); from twenty on, or with frozen limits,
 * against individuals limits, the run rules and the EWMA. Values in one unit, in order of time.
 */
export function chartPhases(phases: readonly ChartPhase[], rules: readonly RunRule[] = BASELINE_RULES): PhaseResult[] {
  return phases.map(({ values, frozen }) => {
    const limits = frozen ?? (values.length >= RUNS_FOR_LIMITS ? individualsChart(values) : undefined);
    return limits ? held(values, limits, rules) : trial(values);
  });
}

function held(values: readonly number[], limits: ChartLimits, rules: readonly RunRule[]): PhaseResult {
  const z = values.map((value) => (limits.sigma > 0 ? (value - limits.centre) / limits.sigma : 0));
  const out: PhaseResult["out"][number][] = [];
  for (const [reason, indices] of runRuleFlags(z, rules)) for (const index of indices) out.push({ index, reason });
  const averages = ewma(values, LAMBDA, limits.centre);
  const bounds = ewmaLimits(limits.centre, limits.sigma, LAMBDA, EWMA_WIDTH);
  values.forEach((_, index) => {
    const average = at(averages, index + 1);
    if (average < bounds.lower || average > bounds.upper)
      out.push({ index, reason: "moving average outside its limits" });
  });
  return { kind: "limits", limits, ewma: averages, ewmaLimits: bounds, out: out.sort((a, b) => a.index - b.index) };
}

function trial(values: readonly number[]): PhaseResult {
  const none = { ewma: undefined, ewmaLimits: undefined };
  if (values.length < 2) return { kind: "none", limits: undefined, ...none, out: [] };
  const out: PhaseResult["out"][number][] = [];
  for (let index = 2; index < values.length; index++) {
    const before = predictionLimits(values.slice(0, index));
    const value = at(values, index);
    if (before && (value < before.lower || value > before.upper))
      out.push({ index, reason: "outside the trial limits" });
  }
  const next = predictionLimits(values);
  const limits = next && { centre: next.centre, sigma: next.s, lower: next.lower, upper: next.upper };
  return { kind: "trial", limits, ...none, out };
}

/** B − A of readings in the order A, B, B, A: a linear drift cancels exactly (value from memory: double substitution). */
export function abba([a1, b1, b2, a2]: readonly [number, number, number, number]): number {
  return (b1 + b2) / 2 - (a1 + a2) / 2;
}

/** Two single results of one bench should differ by less, 95 %: 2.8·s_r (ISO 5725-6), unit of s_r. */
export function repeatabilityLimit(sRepeat: number): number {
  return 2.8 * sRepeat;
}

/** Whether a calibrator's readings before and after are close enough, dB (0.5 dB: ISO 3744:2010, 5.2; value from memory). */
export function calibratorHolds(beforeDb: number, afterDb: number, limitDb = 0.5): boolean {
  return Math.abs(afterDb - beforeDb) <= limitDb + 1e-9;
}
