import type { MeasuredPoint } from "@/lib/domain/results/measured-point";

/** A measured point that nothing is uncertain about; a test says what matters to it. */
export function measuredPoint(changes: Partial<MeasuredPoint> = {}): MeasuredPoint {
  return {
    setSpeedRpm: 1500,
    mount: 1,
    levelReadDba: 35,
    backgroundDba: null,
    uLevelOwnDb: 0,
    uLevelMountDb: 0,
    uLevelOffsetDb: 0,
    deltaTK: 30,
    uDeltaTOwnK: 0,
    uDeltaTMountK: 0,
    uDeltaTOffsetK: 0,
    uDeltaTGainRel: 0,
    powerW: 100,
    dof: null,
    ...changes,
  };
}

/** Points at rising set speeds from lists of level and ΔT. */
export function measuredCurve(
  levelsDba: readonly number[],
  deltaTsK: readonly number[],
  changes: Partial<MeasuredPoint> = {},
): MeasuredPoint[] {
  return levelsDba.map((levelReadDba, i) =>
    measuredPoint({ ...changes, setSpeedRpm: 600 + 300 * i, levelReadDba, deltaTK: deltaTsK[i] ?? Number.NaN }),
  );
}
