import { groupBy } from "../group-by";
import { uncertaintyOfKind, effectiveDof, type Effect } from "./effects";
import { againstBaseline, type AgainstBaseline } from "./methods/v1/against-baseline";
import { coolingCurve, type CoolingCurve } from "./methods/v1/cooling-curve";
import { sessionPoints, type LeftOut, type SessionSubject } from "./methods/v1/session-points";
import { setSpeedPoints, type SetSpeedPoint } from "./methods/v1/set-speed-points";
import { baselineSubject, entrySubject } from "./measured-point";
import { dofOrNull, roundResult } from "./rounding";
import type { SessionRecord } from "./session-record";

/** A figure split into what cancels against the baseline and what does not; rounded as it is stored. */
export type SplitFigure = {
  readonly value: number;
  readonly uOwnRun: number;
  readonly uOwnMount: number;
  readonly uSharedOffset: number;
  readonly uSharedGain: number;
  readonly dof: number | null;
};

export type SubjectFigures = {
  readonly subject: SessionSubject;
  readonly points: readonly SetSpeedPoint[];
  readonly curve: CoolingCurve | undefined;
  /** By set speed; absent where the baseline has no point there, and for the baseline itself. */
  readonly against: ReadonlyMap<number, AgainstBaseline>;
  /** Readings that each set speed's figures come from. */
  readonly readingIds: ReadonlyMap<number, readonly string[]>;
};

export type SessionFigures = {
  readonly sessionId: string;
  readonly baseline: SubjectFigures | undefined;
  readonly entries: readonly SubjectFigures[];
  readonly leftOut: readonly LeftOut[];
};

/** Splits a figure's effects by kind (JCGM 100:2008, 5.1.2); `factor` turns the effects into the figure's unit. */
export function splitFigure(value: number, effects: readonly Effect[], factor = 1): SplitFigure {
  const part = (kind: Effect["kind"]) => roundResult(factor * uncertaintyOfKind(effects, kind));
  return {
    value: roundResult(value),
    uOwnRun: part("own_run"),
    uOwnMount: part("own_mount"),
    uSharedOffset: part("shared_offset"),
    uSharedGain: part("shared_gain"),
    dof: dofOrNull(effectiveDof(effects)),
  };
}

/**
 * The figures of a session at the protocol's positions, or at one position alone: points by set speed, curves, and each
 * entry against the session's own baseline unit. Other baseline units that ran (a bridge) are left to the bridge.
 */
export function sessionFigures(session: SessionRecord, positionIds = protocolPositionIds(session)): SessionFigures {
  const { subjects, leftOut } = sessionPoints(session, positionIds);
  const figures = subjects.map((subject) => subjectFigures(session, subject));
  const baseline = figures.find(({ subject }) => subject.baselineUnitId === session.baselineUnitId);
  const entries = figures
    .filter(({ subject }) => subject.entryId !== null)
    .map((entry) => ({ ...entry, against: againstEach(entry, baseline) }));
  return { sessionId: session.sessionId, baseline, entries, leftOut };
}

/** Ids of the protocol's positions on this bench version, in the protocol's order. */
export function protocolPositionIds(session: SessionRecord): string[] {
  return session.protocolPositions.flatMap((name) => session.positions.find((each) => each.name === name)?.id ?? []);
}

function subjectFigures(session: SessionRecord, subject: SessionSubject): SubjectFigures {
  const named = subject.entryId ? entrySubject(session.sessionId, subject.entryId) : baselineSubject(session.sessionId);
  const points = setSpeedPoints(named, subject.points, session.grade);
  const indices = groupBy(subject.points.keys(), (i) => subject.points[i]?.setSpeedRpm ?? 0);
  const readingIds = new Map(
    [...indices].map(([setSpeed, at]) => [setSpeed, at.flatMap((i) => subject.origins[i]?.readingIds ?? [])]),
  );
  return { subject, points, curve: coolingCurve(points), against: new Map(), readingIds };
}

function againstEach(entry: SubjectFigures, baseline: SubjectFigures | undefined): Map<number, AgainstBaseline> {
  return new Map(
    entry.points.flatMap((point) => {
      const below = baseline?.points.find((each) => each.setSpeedRpm === point.setSpeedRpm);
      return below ? [[point.setSpeedRpm, againstBaseline(point, below)] as const] : [];
    }),
  );
}
