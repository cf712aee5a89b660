import { coverageFactor95 } from "@/lib/science/statistics/uncertainty";
import { combineEffects, effectiveDof, standardUncertainty, type Effect } from "./effects";
import { baselineSubject, entrySubject, type MeasuredPoint } from "./measured-point";
import { coolingCurve, type CoolingCurve } from "./methods/v1/cooling-curve";
import {
  equalCooling,
  equalNoise,
  reached,
  type EqualCoolingReading,
  type EqualNoiseReading,
  type NotReached,
} from "./methods/v1/equal-noise";
import { setSpeedPoints, type SetSpeedPoint } from "./methods/v1/set-speed-points";

/** What is laid over a baseline: entries with their sessions, each session with its own baseline's points. */
export type LayOverInput = {
  readonly entries: readonly {
    readonly id: string;
    readonly sessionId: string;
    readonly points: readonly MeasuredPoint[];
  }[];
  readonly sessions: readonly {
    readonly id: string;
    readonly grade: "engineering" | "survey";
    readonly baselinePoints: readonly MeasuredPoint[];
  }[];
};

export type LaidSubject = { readonly points: readonly SetSpeedPoint[]; readonly curve: CoolingCurve | undefined };
export type LaidEntry = LaidSubject & {
  readonly id: string;
  readonly sessionId: string;
  readonly baseline: LaidSubject;
};

/** Points and curves of every entry and of its session's baseline; an entry whose session is missing is left out. */
export function layOver({ entries, sessions }: LayOverInput): LaidEntry[] {
  const subject = (points: readonly SetSpeedPoint[]): LaidSubject => ({ points, curve: coolingCurve(points) });
  const bySession = new Map(
    sessions.map((session) => [
      session.id,
      { ...session, laid: subject(setSpeedPoints(baselineSubject(session.id), session.baselinePoints, session.grade)) },
    ]),
  );
  return entries.flatMap((entry): LaidEntry[] => {
    const session = bySession.get(entry.sessionId);
    if (!session) return [];
    const points = setSpeedPoints(entrySubject(session.id, entry.id), entry.points, session.grade);
    return [{ ...subject(points), id: entry.id, sessionId: session.id, baseline: session.laid }];
  });
}

/** A difference with its 95 % half-width; a tie is what the data can't separate: the interval holds 0. */
export type Difference = {
  readonly a: string;
  readonly b: string;
  readonly value: number;
  readonly u: number;
  readonly dof: number;
  readonly half95: number;
  readonly tie: boolean;
};

function differenceOf(a: string, b: string, value: number, ofA: readonly Effect[], ofB: readonly Effect[]): Difference {
  const effects = combineEffects([
    { factor: 1, effects: ofA },
    { factor: -1, effects: ofB },
  ]);
  const u = standardUncertainty(effects);
  const dof = effectiveDof(effects);
  const half95 = coverageFactor95(dof) * u;
  return { a, b, value, u, dof, half95, tie: Math.abs(value) <= half95 };
}

export type AtLevel = {
  readonly levelDba: number;
  readonly readings: readonly { readonly id: string; readonly reading: EqualNoiseReading | NotReached }[];
  /** Ratio to the baseline of a less that of b, for every two that reach the level. */
  readonly pairs: readonly Difference[];
};

/**
 * Everything at one level: each entry against its session's baseline, and every two against each other as ratios, with
 * what they share (session, baseline, offsets) cancelled. Within one session the baseline's own error falls out.
 */
export function atLevel(laid: readonly LaidEntry[], levelDba: number): AtLevel {
  const readings = laid.map((entry) => ({
    id: entry.id,
    reading: equalNoise(entry.curve, entry.baseline.curve, levelDba),
  }));
  const reaching = readings.flatMap(({ id, reading }) => (reached(reading) ? [{ id, reading }] : []));
  const pairs = reaching.flatMap(({ id: a, reading: ofA }, i) =>
    reaching
      .slice(i + 1)
      .map(({ id: b, reading: ofB }) => differenceOf(a, b, ofA.ratio - ofB.ratio, ofA.ratioEffects, ofB.ratioEffects)),
  );
  return { levelDba, readings, pairs };
}

/** The other way: how much louder or quieter each entry is where it cools as its baseline does at a level. */
export function atEqualCooling(
  laid: readonly LaidEntry[],
  levelDba: number,
): { readonly id: string; readonly reading: EqualCoolingReading | undefined }[] {
  return laid.map((entry) => ({ id: entry.id, reading: equalCooling(entry.curve, entry.baseline.curve, levelDba) }));
}

/** Levels that a slider may take: from the lowest that one entry and its baseline share to the highest. */
export function commonLevels(laid: readonly LaidEntry[]): { low: number; high: number } | undefined {
  const shared = laid.flatMap(({ curve, baseline }) => {
    if (!curve || !baseline.curve) return [];
    const low = Math.max(curve.resistance.xMin, baseline.curve.resistance.xMin);
    const high = Math.min(curve.resistance.xMax, baseline.curve.resistance.xMax);
    return low < high ? [{ low, high }] : [];
  });
  if (shared.length === 0) return undefined;
  return { low: Math.min(...shared.map((each) => each.low)), high: Math.max(...shared.map((each) => each.high)) };
}
