import { createRandom } from "@/lib/science/statistics/random";
import { simulateRanks } from "@/lib/science/statistics/ranking";
import type { Effect } from "../results/effects";
import { sourceOf, type SetSpeedPoint } from "../results/methods/v1/set-speed-points";
import { drawReader, type DrawReader } from "./draw-curve";
import type { RoundInput } from "./round-input";
import { pointScore, RULES, type PointRuleKind, type ScoringRule } from "./rules";
import { bridgeSource, type PreparedSession, type PreparedSubject, type ScoredEntry } from "./score-entry";

/** Ranks in simulated rounds of one ranked entry; low and high are the 2.5 and 97.5 % points. */
export type RankSpread = { readonly low: number; readonly high: number; readonly pFirst: number };

/**
 * The sources of error in the order in which each simulated round draws them, one standard normal a source, also
 * where its size is 0 or its entry isn't ranked:
 * session by session as given: level offset, ΔT offset, ΔT gain; then the baseline, then the entries as given, each:
 * its mounts by rising number, level then ΔT; its points as given, level own then ΔT own; last, the bridges as given.
 */
export function sourcesInOrder(input: RoundInput, sessions: readonly PreparedSession[]): string[] {
  return [
    ...sessions.flatMap((session) => [
      sourceOf.offset(session.id, "level"),
      sourceOf.offset(session.id, "delta_t"),
      sourceOf.gain(session.id),
      ...[session.baseline, ...session.entries].flatMap(sourcesOfSubject),
    ]),
    ...(input.bridges ?? []).map(bridgeSource),
  ];
}

function sourcesOfSubject({ subject, measured }: PreparedSubject): string[] {
  const mounts = [...new Set(measured.map(({ mount }) => mount))].sort((a, b) => a - b);
  return [
    ...mounts.flatMap((mount) => [sourceOf.mount(subject, mount, "level"), sourceOf.mount(subject, mount, "delta_t")]),
    ...measured.flatMap((_, i) => [sourceOf.own(subject, i, "level"), sourceOf.own(subject, i, "delta_t")]),
  ];
}

/**
 * Ranks of the ranked entries over `input.draws` simulated rounds, in the order of `ranked`.
 *
 * Generator: `createRandom(seed)`; its normals in the order of `sourcesInOrder`. In each round every set-speed point
 * is moved by its effects × draws (level and ΔT; the averaging over mounts stays linear), the curves of baselines and
 * entries are laid anew through the moved points (sorted and merged as the figures' are) and read at the declared
 * levels, and every score is formed as the figure's is. So all entries of a session share its baseline's draw, its
 * offsets and its gain. Where error moves a curve's end past a declared level the curve goes on straight with the
 * slope of its end; where it merges a curve into one knot that knot's value holds; ΔT is held above a millionth of
 * itself. An entry on a bound is ranked with its allowance added, as in the standing.
 */
export function simulateRound(
  input: RoundInput,
  sessions: readonly PreparedSession[],
  ranked: readonly ScoredEntry[],
): RankSpread[] {
  const { rule } = input;
  const sources = sourcesInOrder(input, sessions);
  const index = new Map(sources.map((source, i) => [source, i]));
  const random = createRandom(input.seed);
  const z = new Float64Array(sources.length);
  const sign = RULES[rule.kind].better === "lower" ? 1 : -1;
  const baselines = sessions.map(({ baseline }) => movable(baseline.points, index));
  const sessionAt = new Map(sessions.map(({ id }, i) => [id, i]));
  const entries = ranked.map((entry) => ({
    points: movable(entry.points, index),
    session: sessionAt.get(entry.sessionId) ?? -1,
    allowance: entry.score?.boundAllowance ?? 0,
    bridge: entry.bridge,
    bridgeAt: entry.bridge ? (index.get(bridgeSource(entry.bridge)) ?? -1) : -1,
  }));
  const read = drawReader(rule.levelsDba);
  const below = sessions.map(() => new Float64Array(rule.levelsDba.length));
  const above = new Float64Array(rule.levelsDba.length);
  return simulateRanks(ranked.length, input.draws, (values) => {
    for (let i = 0; i < z.length; i++) z[i] = random.normal();
    if (rule.kind === "equal-noise")
      below.forEach((out, i) => readMoved(read, baselines[i] ?? { list: [], xs: out, ys: out }, z, out));
    entries.forEach((entry, i) => {
      const bridge = entry.bridge ? entry.bridge.ratio + entry.bridge.u * (z[entry.bridgeAt] ?? 0) : 1;
      const score =
        rule.kind === "equal-noise"
          ? meanRatio(readMoved(read, entry.points, z, above), below[entry.session])
          : meanPointScore(rule.kind, rule, entry.points, z);
      values[i] = sign * score * bridge + entry.allowance;
    });
  });
}

/** The draws that move a value, and by how much each. */
type Shifts = { readonly at: Int32Array; readonly size: Float64Array };
type MovablePoint = SetSpeedPoint & { readonly levelShifts: Shifts; readonly deltaTShifts: Shifts };

/** Points with buffers for their moved coordinates. */
type MovablePoints = { readonly list: readonly MovablePoint[]; readonly xs: Float64Array; readonly ys: Float64Array };

function movable(points: readonly SetSpeedPoint[], index: ReadonlyMap<string, number>): MovablePoints {
  const shifts = (effects: readonly Effect[]): Shifts => {
    const moving = effects.filter(({ size }) => size !== 0);
    const at = moving.map(({ source }) => {
      const drawn = index.get(source);
      if (drawn === undefined) throw new RangeError(`a source of error isn't drawn: ${source}`);
      return drawn;
    });
    return { at: Int32Array.from(at), size: Float64Array.from(moving, ({ size }) => size) };
  };
  const list = points.map((point) => ({
    ...point,
    levelShifts: shifts(point.levelEffects),
    deltaTShifts: shifts(point.deltaTEffects),
  }));
  return { list, xs: new Float64Array(list.length), ys: new Float64Array(list.length) };
}

function moved(value: number, { at, size }: Shifts, z: Float64Array): number {
  let sum = value;
  for (let i = 0; i < at.length; i++) sum += (size[i] ?? 0) * (z[at[i] ?? 0] ?? 0);
  return sum;
}

function movedDeltaT(point: MovablePoint, z: Float64Array): number {
  return Math.max(moved(point.deltaTK, point.deltaTShifts, z), 1e-6 * point.deltaTK);
}

function readMoved(read: DrawReader, points: MovablePoints, z: Float64Array, out: Float64Array): Float64Array {
  points.list.forEach((point, i) => {
    points.xs[i] = moved(point.correctedDba, point.levelShifts, z);
    points.ys[i] = movedDeltaT(point, z) / point.powerW;
  });
  read(points.xs, points.ys, points.list.length, out);
  return out;
}

function meanRatio(above: Float64Array, below: Float64Array | undefined): number {
  return above.reduce((sum, value, i) => sum + value / (below?.[i] ?? Number.NaN), 0) / above.length;
}

function meanPointScore(kind: PointRuleKind, rule: ScoringRule, points: MovablePoints, z: Float64Array): number {
  const scores = points.list.map((point) => {
    const levelDba = moved(point.correctedDba, point.levelShifts, z);
    return pointScore(kind, { levelDba, deltaTK: movedDeltaT(point, z), powerW: point.powerW }, rule.m).score;
  });
  return scores.reduce((sum, score) => sum + score, 0) / scores.length;
}
