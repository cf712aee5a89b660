import type { CoolingSeries } from "@/components/charts/cooling-model";
import { pointsWithIntervals } from "@/lib/domain/results/compare-figures";
import type { LaidSubject } from "@/lib/domain/results/lay-over";

const curveSteps = 60;

/** A subject as the chart draws it: points with 95 % half-widths both ways, and the method's own curve between them. */
export function seriesOf(key: string, name: string, subject: LaidSubject): CoolingSeries {
  const { curve } = subject;
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
    ...(curve && { curve: sampled(curve.deltaT) }),
  };
}

function sampled(line: { xMin: number; xMax: number; value(x: number): number | undefined }) {
  return Array.from({ length: curveSteps + 1 }, (_, step) => {
    const levelDba = step === curveSteps ? line.xMax : line.xMin + ((line.xMax - line.xMin) * step) / curveSteps;
    return { levelDba, cooling: line.value(levelDba) };
  }).flatMap(({ levelDba, cooling }) => (cooling === undefined ? [] : [{ levelDba, cooling }]));
}
