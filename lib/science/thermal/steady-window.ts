import { at } from "../statistics/descriptive";
import { R_LIMIT_99, varianceRatio } from "./variance-ratio";
import { seriesCharacter, smallestStep } from "./series-character";
import { findTransient, type Transient } from "./transient";

/** What a window must hold. */
export interface SteadyRule {
  /** Largest rest of the approach that may be left, K. */
  readonly epsilonK: number;
  /** Shortest window, s, beside τ/2. */
  readonly windowMinS: number;
  /** Largest change of the ambient within the window, K. */
  readonly ambientDriftMaxK: number;
  /** Largest relative change of a rotor's speed within the window. */
  readonly speedDriftMaxRel: number;
  /** Samples in a row with R below its 99 % point. */
  readonly quietRun: number;
}

/** House rule (derived: residual = τ·slope), sized for ±0.1 K. */
export const HOUSE_RULE: SteadyRule = {
  epsilonK: 0.1,
  windowMinS: 120,
  ambientDriftMaxK: 0.2,
  speedDriftMaxRel: 0.005,
  quietRun: 30,
};

export type Clause = "window" | "slope" | "variance-ratio" | "fit" | "ambient-drift" | "speed-drift";

/** A record, one value a row, times ascending in s; no NaN. */
export interface SteadyRecord {
  readonly timeS: Float64Array;
  readonly deltaTK: Float64Array;
  readonly ambientC: Float64Array;
  readonly speedRpm?: Float64Array;
}

export interface SteadyResult {
  /** First row of the window (it ends at the record's last); undefined when none holds all clauses. */
  readonly from: number | undefined;
  /** Clauses broken by the shortest window that may be; empty when one was found. */
  readonly broken: readonly Clause[];
  readonly transient: Transient | undefined;
  /** τ of the fit, or where no approach shows, the window itself, so that its whole drift counts, s. */
  readonly tauS: number;
  /** Why the variance ratio was left out; undefined when it was used. */
  readonly withoutRatio: "quantised" | "autocorrelated" | "few-samples" | undefined;
  /** The display's step over the whole record where it is quantised, K; undefined otherwise or if it never moves. */
  readonly step: number | undefined;
}

/**
 * The longest window ending at the record's last sample that holds all clauses: (i) |b| + 2·s_b ≤ ε/τ; (ii) R below
 * its 99 % point over the first `quietRun` samples of the window; (iii) mean within ε of the fit's final value;
 * (iv) ambient drift, (v) speed drift by their slopes; window ≥ max(windowMinS, τ/2). Where the last quarter of the
 * record is quantised or autocorrelated, or too short for R, (ii) is left out and s_b is widened by the lag-1
 * correlation. Rule derived for this bench; R: Cao and Rhinehart (see variance-ratio).
 */
export function findSteadyWindow(record: SteadyRecord, rule: SteadyRule = HOUSE_RULE): SteadyResult {
  const { timeS, deltaTK } = record;
  const n = timeS.length;
  const transient = findTransient(timeS, deltaTK);
  const tail = Math.max(0, n - Math.max(60, Math.ceil(n / 4)));
  const character = seriesCharacter(timeS.subarray(tail), deltaTK.subarray(tail));
  const few = n < 2 * rule.quietRun;
  const withoutRatio = character.quantised
    ? "quantised"
    : character.autocorrelated
      ? "autocorrelated"
      : few
        ? "few-samples"
        : undefined;
  const widen = character.autocorrelated ? Math.sqrt((1 + character.lagOne) / (1 - character.lagOne)) : 1;
  const quiet = withoutRatio === undefined ? quietAhead(deltaTK, rule.quietRun) : undefined;
  const own = new BackwardLine(timeS, deltaTK);
  const ambient = new BackwardLine(timeS, record.ambientC);
  const speed = record.speedRpm && new BackwardLine(timeS, record.speedRpm);
  let from: number | undefined;
  let broken: Clause[] = ["window"];
  let shortestSeen = false;
  for (let s = n - 1; s >= 0; s--) {
    own.add(s);
    ambient.add(s);
    speed?.add(s);
    const spanS = at(timeS, n - 1) - at(timeS, s);
    const tauS = transient?.fit.tau ?? spanS;
    if (n - s < 4 || spanS < rule.windowMinS || (transient && spanS < tauS / 2)) continue;
    if (shortestSeen && quiet && quiet[s] !== 1) continue;
    const failed: Clause[] = [];
    if (!(Math.abs(own.slope) + 2 * widen * own.seSlope <= rule.epsilonK / tauS)) failed.push("slope");
    if (quiet && quiet[s] !== 1) failed.push("variance-ratio");
    if (transient && !(Math.abs(own.mean - transient.fit.final) <= rule.epsilonK)) failed.push("fit");
    if (!(Math.abs(ambient.slope) * spanS <= rule.ambientDriftMaxK)) failed.push("ambient-drift");
    if (speed && !(Math.abs(speed.slope) * spanS <= rule.speedDriftMaxRel * Math.abs(speed.mean)))
      failed.push("speed-drift");
    if (failed.length === 0) from = s;
    if (!shortestSeen) [broken, shortestSeen] = [failed, true];
  }
  const window = from === undefined ? 0 : at(timeS, n - 1) - at(timeS, from);
  const tauS = transient?.fit.tau ?? window;
  const step = character.quantised ? smallestStep(deltaTK) : undefined;
  return { from, broken: from === undefined ? broken : [], transient, tauS, withoutRatio, step };
}

/** 1 where this sample and the next `run` − 1 all have R below its 99 % point. R runs over the whole record. */
function quietAhead(values: Float64Array, run: number): Uint8Array {
  const ratios = varianceRatio(values);
  const quiet = new Uint8Array(values.length);
  let inRow = 0;
  for (let i = values.length - 1; i >= 0; i--) {
    inRow = at(ratios, i) < R_LIMIT_99 ? inRow + 1 : 0;
    quiet[i] = inRow >= run ? 1 : 0;
  }
  return quiet;
}

/** Least-squares line over the rows from one to the last, as rows are added backwards (updated about the means). */
class BackwardLine {
  private count = 0;
  private tMean = 0;
  private sxx = 0;
  private sxy = 0;
  private syy = 0;
  mean = 0;

  constructor(
    private readonly times: Float64Array,
    private readonly values: Float64Array,
  ) {}

  add(index: number): void {
    this.count += 1;
    const dt = at(this.times, index) - this.tMean;
    const dy = at(this.values, index) - this.mean;
    this.tMean += dt / this.count;
    this.mean += dy / this.count;
    const share = (this.count - 1) / this.count;
    this.sxx += dt * dt * share;
    this.sxy += dt * dy * share;
    this.syy += dy * dy * share;
  }

  get slope(): number {
    return this.sxx > 0 ? this.sxy / this.sxx : 0;
  }

  get seSlope(): number {
    if (!(this.sxx > 0) || this.count < 3) return Infinity;
    return Math.sqrt(Math.max(0, this.syy - this.slope * this.sxy) / (this.count - 2) / this.sxx);
  }
}
