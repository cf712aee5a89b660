import { combineEffects, type Effect } from "../results/effects";
import { entrySubject, baselineSubject, type MeasuredPoint, type Subject } from "../results/measured-point";
import { coolingCurve, type CoolingCurve } from "../results/methods/v1/cooling-curve";
import { equalNoise, reached, type EqualNoiseReading, type NotReached } from "../results/methods/v1/equal-noise";
import { setSpeedPoints, type SetSpeedPoint } from "../results/methods/v1/set-speed-points";
import type { Bridge, RoundGrade, RoundInput, RoundSession } from "./round-input";
import { pointScore, type PointRuleKind, type ScoringRule } from "./rules";

/** A subject ready to be scored: its averaged points and its curve, undefined for fewer than two levels. */
export type PreparedSubject = {
  readonly subject: Subject;
  readonly measured: readonly MeasuredPoint[];
  readonly points: readonly SetSpeedPoint[];
  readonly curve: CoolingCurve | undefined;
};

export type Score = {
  readonly value: number;
  readonly effects: readonly Effect[];
  /** A level that rests on a bound is in it. */
  readonly upperBound: boolean;
  /** What the correction of bounds has gained in score, 0 or more: such an entry can't win by less. */
  readonly boundAllowance: number;
};

export type ScoredEntry = PreparedSubject & {
  readonly id: string;
  readonly sessionId: string;
  readonly equalNoise: readonly (EqualNoiseReading | NotReached)[];
  /** The bridge over which the score goes, where the session ran another baseline unit. */
  readonly bridge?: Bridge;
  readonly score?: Score;
  /** Why there is no score: "not reached at 30, 35 dB(A)" or "other baseline". */
  readonly whyNotRanked?: string;
};

export type PreparedSession = {
  readonly id: string;
  readonly unit: string;
  readonly baseline: PreparedSubject;
  readonly entries: readonly ScoredEntry[];
};

/** Scores every entry of a round by its rule, each against the baseline of its own session; order as given. */
export function scoreSessions(input: RoundInput): PreparedSession[] {
  const unit = input.baselineUnit ?? input.sessions[0]?.baseline.unit ?? "";
  return input.sessions.map((session) => {
    const baseline = prepare(baselineSubject(session.id), session.baseline.points, input.grade);
    const entries = session.entries.map((entry) => {
      const prepared = prepare(entrySubject(session.id, entry.id), entry.points, input.grade);
      return scoreEntry(input, session, unit, baseline, { ...prepared, id: entry.id });
    });
    return { id: session.id, unit: session.baseline.unit, baseline, entries };
  });
}

function prepare(subject: Subject, measured: readonly MeasuredPoint[], grade: RoundGrade): PreparedSubject {
  const points = setSpeedPoints(subject, measured, grade);
  return { subject, measured, points, curve: coolingCurve(points) };
}

function scoreEntry(
  input: RoundInput,
  session: RoundSession,
  unit: string,
  baseline: PreparedSubject,
  entry: PreparedSubject & { readonly id: string },
): ScoredEntry {
  const { rule } = input;
  const readings = rule.levelsDba.map((level) => equalNoise(entry.curve, baseline.curve, level));
  const scored = { ...entry, sessionId: session.id, equalNoise: readings };
  const own = session.baseline.unit === unit;
  const bridge = own
    ? undefined
    : input.bridges?.find((b) => b.fromUnit === session.baseline.unit && b.toUnit === unit);
  if (!own && (bridge === undefined || rule.kind !== "equal-noise"))
    return { ...scored, whyNotRanked: "other baseline" };
  if (rule.kind !== "equal-noise") return { ...scored, score: scoreOfPoints(rule.kind, rule, entry.points) };
  const missed = readings.filter((reading) => !reached(reading));
  if (missed.length > 0) {
    const levels = missed.map(({ levelDba }) => levelDba).join(", ");
    return { ...scored, whyNotRanked: `not reached at ${levels} dB(A)` };
  }
  const score = scoreOfReadings(readings.filter(reached));
  return bridge ? { ...scored, bridge, score: overBridge(score, bridge) } : { ...scored, score };
}

/** Default score: the mean of the ratios at the declared levels, and the mean of their effects. */
function scoreOfReadings(readings: readonly EqualNoiseReading[]): Score {
  const factor = 1 / readings.length;
  return {
    value: readings.reduce((sum, { ratio }) => sum + ratio, 0) * factor,
    effects: combineEffects(readings.map(({ ratioEffects }) => ({ factor, effects: ratioEffects }))),
    upperBound: readings.some(({ upperBound }) => upperBound),
    boundAllowance: readings.reduce((sum, { boundAllowance }) => sum + boundAllowance * factor, 0),
  };
}

/** A point rule takes one set speed's point as it is; of several set speeds it is the mean of the points' scores. */
function scoreOfPoints(kind: PointRuleKind, rule: ScoringRule, points: readonly SetSpeedPoint[]): Score {
  const factor = 1 / points.length;
  const scores = points.map((point) => {
    const levelDba = point.correctedDba;
    return { point, ...pointScore(kind, { levelDba, deltaTK: point.deltaTK, powerW: point.powerW }, rule.m) };
  });
  return {
    value: scores.reduce((sum, { score }) => sum + score, 0) * factor,
    effects: combineEffects(
      scores.flatMap(({ point, byLevel, byDeltaT }) => [
        { factor: byLevel * factor, effects: point.levelEffects },
        { factor: byDeltaT * factor, effects: point.deltaTEffects },
      ]),
    ),
    upperBound: points.some(({ upperBound }) => upperBound),
    boundAllowance: scores.reduce(
      (sum, { point, byLevel }) => sum + (point.upperBound ? Math.abs(byLevel) * point.correctionDb * factor : 0),
      0,
    ),
  };
}

/** Name of the source of error that a bridge brings. */
export function bridgeSource(bridge: Bridge): string {
  return `bridge from ${bridge.fromUnit} to ${bridge.toUnit}`;
}

function overBridge(score: Score, bridge: Bridge): Score {
  const effect: Effect = {
    source: bridgeSource(bridge),
    kind: "bridge",
    quantity: "ratio",
    owner: bridge.fromUnit,
    size: score.value * bridge.u,
    dof: bridge.dof ?? Infinity,
  };
  return {
    ...score,
    value: score.value * bridge.ratio,
    effects: combineEffects([
      { factor: bridge.ratio, effects: score.effects },
      { factor: 1, effects: [effect] },
    ]),
    boundAllowance: score.boundAllowance * bridge.ratio,
  };
}
