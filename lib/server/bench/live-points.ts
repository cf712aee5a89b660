import type { LivePoint } from "@/lib/contracts/bench-session";
import { roundResult } from "@/lib/domain/results/rounding";
import { sessionFigures, type SubjectFigures } from "@/lib/domain/results/session-figures";
import type { SessionRecord } from "@/lib/domain/results/session-record";

/** A session's figures as far as its runs go: the baseline's points first, then each entry's, by rising set speed. */
export function livePoints(record: SessionRecord): LivePoint[] {
  const { baseline, entries } = sessionFigures(record);
  return [...(baseline ? [baseline] : []), ...entries].flatMap(pointsOf);
}

function pointsOf({ subject, points, against }: SubjectFigures): LivePoint[] {
  return points.map((point) => {
    const over = against.get(point.setSpeedRpm);
    return {
      entryId: subject.entryId,
      setSpeed: point.setSpeedRpm,
      mounts: point.mounts,
      levelDba: roundResult(point.correctedDba),
      correctionDb: roundResult(point.correctionDb),
      atMost: point.upperBound,
      deltaTK: roundResult(point.deltaTK),
      resistanceKPerW: roundResult(point.resistanceKPerW),
      levelDifferenceDb: over ? roundResult(over.levelDifferenceDb.value) : null,
      resistanceRatio: over ? roundResult(over.resistanceRatio.value) : null,
    };
  });
}
