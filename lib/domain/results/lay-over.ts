import { baselineSubject, entrySubject, type MeasuredPoint } from "./measured-point";
import { coolingCurve, type CoolingCurve } from "./methods/v1/cooling-curve";
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
