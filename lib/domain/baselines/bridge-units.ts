import { effectiveDof, standardUncertainty, type Effect } from "../results/effects";
import { againstBaseline } from "../results/methods/v1/against-baseline";
import { coolingCurve } from "../results/methods/v1/cooling-curve";
import { equalNoise, reached } from "../results/methods/v1/equal-noise";
import { sessionPoints } from "../results/methods/v1/session-points";
import { setSpeedPoints } from "../results/methods/v1/set-speed-points";
import { dofOrNull, roundResult } from "../results/rounding";
import { protocolPositionIds } from "../results/session-figures";
import type { SessionRecord } from "../results/session-record";

/**
 * How one baseline unit stands to another that ran in the same session: ΔT/P as the ratio first ÷ second, level as the
 * difference first − second, dB. A ratio to the first times this ratio is one to the second.
 */
export type UnitBridge = {
  readonly quantity: "level_dba" | "thermal_resistance_kpw";
  readonly setSpeed: number | null;
  readonly levelDba: number | null;
  readonly ratio: number | null;
  readonly difference: number | null;
  readonly u: number;
  readonly dof: number | null;
};

/**
 * Bridges a session's own unit to another that ran in it: the ratio at each of the levels that both reach (what scoring
 * takes), and ratio and level difference at each set speed that both ran. Shared parts cancel as against a baseline
 * (JCGM 100:2008, 5.2.2 with F.1.2.3); degrees of freedom by eq. G.2b. Empty where either didn't run.
 * @param levelsDba levels at which ratios are wanted, dB(A)
 */
export function bridgeUnits(record: SessionRecord, toUnitId: string, levelsDba: readonly number[]): UnitBridge[] {
  const { subjects } = sessionPoints(record, protocolPositionIds(record));
  const pointsOf = (unitId: string) => {
    const subject = subjects.find((each) => each.baselineUnitId === unitId);
    const named = { sessionId: record.sessionId, key: `baseline ${unitId}` };
    return subject ? setSpeedPoints(named, subject.points, record.grade) : [];
  };
  const from = pointsOf(record.baselineUnitId);
  const to = pointsOf(toUnitId);
  const [fromCurve, toCurve] = [coolingCurve(from), coolingCurve(to)];
  const none = { setSpeed: null, levelDba: null, ratio: null, difference: null };
  const sure = (effects: readonly Effect[]) => ({
    u: roundResult(standardUncertainty(effects)),
    dof: dofOrNull(effectiveDof(effects)),
  });
  const atLevels = levelsDba.flatMap((levelDba): UnitBridge[] => {
    const reading = equalNoise(fromCurve, toCurve, levelDba);
    if (!reached(reading)) return [];
    const ratio = roundResult(reading.ratio);
    return [{ ...none, quantity: "thermal_resistance_kpw", levelDba, ratio, ...sure(reading.ratioEffects) }];
  });
  const atSpeeds = from.flatMap((point): UnitBridge[] => {
    const other = to.find((each) => each.setSpeedRpm === point.setSpeedRpm);
    if (!other) return [];
    const { resistanceRatio, levelDifferenceDb, levelIsBound } = againstBaseline(point, other);
    const ratio: UnitBridge = {
      ...none,
      quantity: "thermal_resistance_kpw",
      setSpeed: point.setSpeedRpm,
      ratio: roundResult(resistanceRatio.value),
      ...sure(resistanceRatio.effects),
    };
    if (levelIsBound) return [ratio];
    const difference: UnitBridge = {
      ...none,
      quantity: "level_dba",
      setSpeed: point.setSpeedRpm,
      difference: roundResult(levelDifferenceDb.value),
      ...sure(levelDifferenceDb.effects),
    };
    return [ratio, difference];
  });
  return [...atLevels, ...atSpeeds];
}
