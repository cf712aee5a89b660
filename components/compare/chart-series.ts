import type { CoolingSeries } from "@/components/charts/cooling-model";
import { curveWithIntervals, pointsWithIntervals } from "@/lib/domain/results/compare-figures";
import type { LaidSubject } from "@/lib/domain/results/lay-over";

const curveSteps = 60;

/** A subject as the chart draws it: points with 95 % half-widths both ways, and the method's own curve between them with its own. */
export function seriesOf(key: string, name: string, subject: LaidSubject): CoolingSeries {
  const curve = curveWithIntervals(subject, curveSteps).map(({ levelDba, deltaTK }) => ({
    levelDba,
    cooling: deltaTK.value,
    coolingU95: deltaTK.half95,
  }));
  return {
    key,
    name,
    points: pointsWithIntervals(subject).map((point) => ({
      levelDba: point.levelDba.value,
      levelU95Db: point.levelDba.half95,
      cooling: point.deltaTK.value,
      coolingU95: point.deltaTK.half95,
      speedRpm: point.setSpeedRpm,
      upperBound: point.levelDba.upperBound,
    })),
    ...(curve.length > 0 && { curve }),
  };
}
