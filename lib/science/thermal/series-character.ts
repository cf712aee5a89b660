import { at, ascending } from "../statistics/descriptive";
import { lagOneCorrelation } from "../statistics/autocorrelation";
import { fitLine } from "../statistics/line-fit";

/** Why the variance ratio can't be used on a series. */
export interface SeriesCharacter {
  readonly quantised: boolean;
  readonly autocorrelated: boolean;
  /** Lag-1 correlation about a straight line; 0 where it can't be had. */
  readonly lagOne: number;
}

/** House rule, no source: above these the two variances of the ratio no longer measure the same noise. */
const EQUAL_STEPS_MAX = 0.3;
const LAG_ONE_MAX = 0.3;

/**
 * How a series behaves around a straight line: quantised when more than 30 % of its steps are nothing, autocorrelated
 * when its lag-1 correlation is above 0.3 and above two standard errors (2/√n). Any unit; times in s.
 */
export function seriesCharacter(times: ArrayLike<number>, values: ArrayLike<number>): SeriesCharacter {
  const n = values.length;
  const moving = moves(values);
  const quantised = n > 1 && moving.length < (1 - EQUAL_STEPS_MAX) * (n - 1);
  const fit = fitLine(times, values);
  const rest = new Float64Array(n);
  for (let i = 0; fit && i < n; i++) rest[i] = at(values, i) - fit.intercept - fit.slope * at(times, i);
  const lagOne = lagOneCorrelation(rest) ?? 0;
  const autocorrelated = !quantised && lagOne > Math.max(LAG_ONE_MAX, 2 / Math.sqrt(n));
  return { quantised, autocorrelated, lagOne };
}

/** Sizes of the steps from one value to the next, without those that are nothing (but for rounding). */
function moves(values: ArrayLike<number>): Float64Array {
  let scale = 0;
  for (let i = 0; i < values.length; i++) scale = Math.max(scale, Math.abs(at(values, i)));
  const steps = new Float64Array(Math.max(0, values.length - 1));
  let count = 0;
  for (let i = 1; i < values.length; i++) {
    const step = Math.abs(at(values, i) - at(values, i - 1));
    if (step > 1e-9 * scale) steps[count++] = step;
  }
  return steps.subarray(0, count);
}

/** A display's step as the smallest move of its series, in its unit; undefined when nothing ever moves. */
export function smallestStep(values: ArrayLike<number>): number | undefined {
  return ascending(moves(values))[0];
}
