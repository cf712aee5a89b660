import { coolingCurve } from "../results/methods/v1/cooling-curve";
import { equalNoise, reached } from "../results/methods/v1/equal-noise";

/** A set speed as far as reaching a level goes: dB(A) at the bench's microphone, K, K/W, W. */
export type ReachPoint = {
  readonly setSpeedRpm: number;
  readonly levelDba: number;
  readonly correctionDb: number;
  readonly upperBound: boolean;
  readonly deltaTK: number;
  readonly powerW: number;
};

export type LevelReach = "reached" | "entry-not-reached" | "baseline-not-reached";

/**
 * Whether an entry and its session's baseline reach each level, in the order of the levels, by the method's own
 * reading of the curves. A baseline that rests on a bound there counts as not reaching it.
 * @param levelsDba dB(A) at the bench's microphone; empty gives an empty list
 */
export function levelsReached(
  entry: readonly ReachPoint[],
  baseline: readonly ReachPoint[],
  levelsDba: readonly number[],
): LevelReach[] {
  const [own, below] = [curveOf(entry), curveOf(baseline)];
  return levelsDba.map((levelDba) => {
    const reading = equalNoise(own, below, levelDba);
    if (reached(reading)) return "reached";
    return reading.why === "entry-not-reached" ? "entry-not-reached" : "baseline-not-reached";
  });
}

function curveOf(points: readonly ReachPoint[]) {
  return coolingCurve(
    points.map((point) => ({
      setSpeedRpm: point.setSpeedRpm,
      mounts: 1,
      correctedDba: point.levelDba,
      correctionDb: point.correctionDb,
      upperBound: point.upperBound,
      levelEffects: [],
      deltaTK: point.deltaTK,
      deltaTEffects: [],
      resistanceKPerW: point.deltaTK / point.powerW,
      powerW: point.powerW,
    })),
  );
}
