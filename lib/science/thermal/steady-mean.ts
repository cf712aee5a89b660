import { effectiveSampleSize, lagOneCorrelation } from "../statistics/autocorrelation";
import { at, mean, sampleSd } from "../statistics/descriptive";
import { fitLine } from "../statistics/line-fit";
import { typeBResolution } from "../statistics/uncertainty";

/** Mean rise over a steady window and what is not known of it, K. */
export interface SteadyMean {
  readonly deltaTK: number;
  /** hypot(scatter, residual, resolution). */
  readonly uDeltaTK: number;
  readonly uScatterK: number;
  /** Rest of the approach that the gate leaves: τ·|slope|, or |mean − fitted final value| where that is more. */
  readonly residualK: number;
  readonly uResolutionK: number;
  readonly effectiveSamples: number;
  readonly slopeKPerS: number;
}

/**
 * Mean of a window with u² = s²/n_eff + rest² + step²/12: n_eff from the lag-1 correlation, the rest of a first-order
 * approach (derived: τ·slope at the end; a window much longer than τ hides its start from the slope, not from the fit) and, where the series is quantised, its step (JCGM 100:2008, F.2.2.1).
 * Times s, rises K, τ s, step and fitted final value K or undefined. Undefined for fewer than three samples.
 */
export function steadyMean(
  timeS: Float64Array,
  deltaTK: Float64Array,
  tauS: number,
  stepK: number | undefined,
  finalK?: number,
): SteadyMean | undefined {
  const centre = mean(deltaTK);
  const s = sampleSd(deltaTK);
  const line = fitLine(timeS, deltaTK);
  if (centre === undefined || s === undefined || line === undefined || deltaTK.length < 3) return undefined;
  const effectiveSamples = effectiveSampleSize(deltaTK.length, lagOneCorrelation(deltaTK) ?? 0);
  const uScatterK = s / Math.sqrt(effectiveSamples);
  const residualK = Math.max(tauS * Math.abs(line.slope), finalK === undefined ? 0 : Math.abs(centre - finalK));
  const uResolutionK = stepK === undefined ? 0 : typeBResolution(stepK);
  return {
    deltaTK: centre,
    uDeltaTK: Math.hypot(uScatterK, residualK, uResolutionK),
    uScatterK,
    residualK,
    uResolutionK,
    effectiveSamples,
    slopeKPerS: line.slope,
  };
}

/** Change of a series over its window by its straight line, signed, in its unit; undefined for fewer than two rows. */
export function driftOver(timeS: Float64Array, values: Float64Array): number | undefined {
  const line = fitLine(timeS, values);
  return line && line.slope * (at(timeS, timeS.length - 1) - at(timeS, 0));
}
