import { effectiveDof, standardUncertainty } from "@/lib/domain/results/effects";
import { readDeltaT, readResistance } from "@/lib/domain/results/methods/v1/cooling-curve";
import { equalCooling, equalNoise, reached } from "@/lib/domain/results/methods/v1/equal-noise";
import { dofOrNull, roundResult } from "@/lib/domain/results/rounding";
import { sessionFigures, splitFigure } from "@/lib/domain/results/session-figures";
import type { SessionRecord } from "@/lib/domain/results/session-record";

/** Everything that method 1 makes of a session, rounded as it is stored. */
export function methodV1Figures(session: SessionRecord, levelsDba: readonly number[]) {
  const { baseline, entries, leftOut } = sessionFigures(session);
  const subjects = [baseline, ...entries].flatMap((each) => (each ? [each] : []));
  return {
    leftOut,
    subjects: subjects.map(({ subject, points, curve, against }) => ({
      key: subject.key,
      points: points.map((point) => ({
        setSpeedRpm: point.setSpeedRpm,
        mounts: point.mounts,
        upperBound: point.upperBound,
        correctionDb: roundResult(point.correctionDb),
        level: splitFigure(point.correctedDba, point.levelEffects),
        deltaT: splitFigure(point.deltaTK, point.deltaTEffects),
        resistance: splitFigure(point.resistanceKPerW, point.deltaTEffects, 1 / point.powerW),
      })),
      against: [...against].map(([setSpeedRpm, figures]) => ({
        setSpeedRpm,
        levelIsBound: figures.levelIsBound,
        levelDifference: splitFigure(figures.levelDifferenceDb.value, figures.levelDifferenceDb.effects),
        deltaTDifference: splitFigure(figures.deltaTDifferenceK.value, figures.deltaTDifferenceK.effects),
        ratio: splitFigure(figures.resistanceRatio.value, figures.resistanceRatio.effects),
      })),
      readings: levelsDba.map((levelDba) => {
        const resistance = curve && readResistance(curve, levelDba);
        const deltaT = curve && readDeltaT(curve, levelDba);
        const equal = equalNoise(curve, baseline?.curve, levelDba);
        const cooling = equalCooling(curve, baseline?.curve, levelDba);
        return {
          levelDba,
          resistance: resistance ? splitFigure(resistance.value, resistance.effects) : null,
          deltaT: deltaT ? splitFigure(deltaT.value, deltaT.effects) : null,
          equalNoise: reached(equal)
            ? {
                ratio: splitFigure(equal.ratio, equal.ratioEffects),
                deltaT: splitFigure(equal.deltaTK, equal.deltaTEffects),
                difference: splitFigure(equal.differenceK, equal.differenceEffects),
                upperBound: equal.upperBound,
              }
            : equal.why,
          equalCooling: cooling
            ? {
                entryLevelDba: roundResult(cooling.entryLevelDba),
                differenceDb: roundResult(cooling.differenceDb),
                u: roundResult(standardUncertainty(cooling.effects)),
                dof: dofOrNull(effectiveDof(cooling.effects)),
              }
            : null,
        };
      }),
    })),
  };
}
