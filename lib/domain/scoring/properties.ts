import { createRandom, type Random } from "@/lib/science/statistics/random";
import { baselineSubject, entrySubject, type MeasuredPoint } from "../results/measured-point";
import { coolingCurve } from "../results/methods/v1/cooling-curve";
import { equalNoise, reached } from "../results/methods/v1/equal-noise";
import { setSpeedPoints } from "../results/methods/v1/set-speed-points";
import { scoreRound } from "./score-round";
import { pointScore, RULES, type ScoredPoint, type ScoringRule } from "./rules";

export const PROPERTIES = ["monotone", "unit-invariant", "independent", "speed-neutral"] as const;
export type Property = (typeof PROPERTIES)[number];

/** An invented fan: L = level + 50 lg(n/1500) dB(A), ΔT = deltaTK·(n/1500)^−m at `powerW`, at some speeds. */
export type ToyFan = { readonly levelDba: number; readonly deltaTK: number; readonly m: number };

/**
 * What is tried: fans between these limits; every draw takes new ones. Levels at 1500 rpm are about the mean of the
 * rule's declared levels (38 dB(A) without any), speeds are in parts of 1500 rpm.
 */
export const TRIAL_RANGE = {
  levelOffsetDb: [-4, 4],
  deltaTK: [22, 45],
  m: [0.5, 0.8],
  speeds: [0.4, 0.6, 0.8, 1, 1.25, 1.6, 2],
  powerW: 100,
} as const;

export type Trial = {
  readonly property: Property;
  readonly draws: number;
  /** The first draw (from 1) that broke the property, with what was seen; undefined when none did. */
  readonly counterExample: { readonly draw: number; readonly what: string } | undefined;
};

/** How much a score may move when the speed does, as a share of the spread of scores between the range's ends. */
const NEUTRAL_WITHIN = 0.02;

type Scorer = (
  points: readonly ScoredPoint[],
  baseline: readonly ScoredPoint[],
  levelsDba: readonly number[],
) => number;

/**
 * Tries a rule's properties on invented rounds: monotone in both ΔT and level; unit-invariant (order of two fans in K
 * and °F, and with another zero of the decibel); independent (order of two unaffected by a third); neutral to a fan's
 * own speed. A property that holds in every draw is not proved: say "no counter-example in N draws over this range".
 * @param seed whole number from 0 @param draws rounds tried for each property, from 1
 * @throws RangeError where the declared levels lie further apart than the invented fans reach, 15 dB below their mean and 10 above
 */
export function tryProperties(rule: ScoringRule, seed: number, draws: number): Trial[] {
  const score = scorerOf(rule);
  return PROPERTIES.map((property, i) => {
    const random = createRandom(seed + i);
    for (let draw = 1; draw <= draws; draw++) {
      const what = CHECKS[property](score, random, rule);
      if (what !== undefined) return { property, draws, counterExample: { draw, what } };
    }
    return { property, draws, counterExample: undefined };
  });
}

/** A score of which lower is better, by the formulas that score rounds. */
function scorerOf(rule: ScoringRule): Scorer {
  const sign = RULES[rule.kind].better === "lower" ? 1 : -1;
  return (points, baseline, levelsDba) => {
    const { kind } = rule;
    if (kind !== "equal-noise")
      return (sign * points.reduce((sum, point) => sum + pointScore(kind, point, rule.m).score, 0)) / points.length;
    const own = coolingCurve(setSpeedPoints(entrySubject("trial", "fan"), points.map(exact), "engineering"));
    const below = coolingCurve(setSpeedPoints(baselineSubject("trial"), baseline.map(exact), "engineering"));
    const readings = levelsDba.map((level) => equalNoise(own, below, level)).filter(reached);
    if (readings.length < levelsDba.length)
      throw new RangeError("the declared levels lie too far apart for the trial's fans to reach them all");
    return readings.reduce((sum, { ratio }) => sum + ratio, 0) / readings.length;
  };
}

function exact({ levelDba, deltaTK, powerW }: ScoredPoint, i: number): MeasuredPoint {
  const none = { uLevelOwnDb: 0, uLevelMountDb: 0, uLevelOffsetDb: 0, uDeltaTOwnK: 0, uDeltaTMountK: 0 };
  const nothingShared = { uDeltaTOffsetK: 0, uDeltaTGainRel: 0, dof: null };
  const point = { setSpeedRpm: i + 1, mount: 1, levelReadDba: levelDba, backgroundDba: null, deltaTK, powerW };
  return { ...point, ...none, ...nothingShared };
}

function between(random: Random, [low, high]: readonly [number, number]): number {
  return low + (high - low) * random.uniform();
}

function drawFan(random: Random, { levelsDba }: ScoringRule): ToyFan {
  const middleDba = levelsDba.length === 0 ? 38 : levelsDba.reduce((sum, level) => sum + level, 0) / levelsDba.length;
  return {
    levelDba: middleDba + between(random, TRIAL_RANGE.levelOffsetDb),
    deltaTK: between(random, TRIAL_RANGE.deltaTK),
    m: between(random, TRIAL_RANGE.m),
  };
}

/** The fan's points at its speeds, all of them changed by `speed`. */
function pointsOf(fan: ToyFan, speed = 1): ScoredPoint[] {
  return TRIAL_RANGE.speeds.map((part) => ({
    levelDba: fan.levelDba + 50 * Math.log10(part * speed),
    deltaTK: fan.deltaTK * (part * speed) ** -fan.m,
    powerW: TRIAL_RANGE.powerW,
  }));
}

const order = (a: number, b: number): number =>
  Math.abs(a - b) <= 1e-9 * Math.max(1, Math.abs(a)) ? 0 : Math.sign(a - b);

type Check = (score: Scorer, random: Random, rule: ScoringRule) => string | undefined;

const CHECKS: Readonly<Record<Property, Check>> = {
  monotone: (score, random, rule) => {
    const [fan, base] = [drawFan(random, rule), pointsOf(drawFan(random, rule))];
    const [quieter, cooler] = [random.uniform() * 2, 1 - random.uniform() * 0.1];
    const points = pointsOf(fan);
    const before = score(points, base, rule.levelsDba);
    const better = points.map((p) => ({ ...p, levelDba: p.levelDba - quieter, deltaTK: p.deltaTK * cooler }));
    const after = score(better, base, rule.levelsDba);
    return order(after, before) > 0 ? `${quieter.toFixed(2)} dB quieter and cooler, but scored worse` : undefined;
  },
  "unit-invariant": (score, random, rule) => {
    const [a, b, base] = [drawFan(random, rule), drawFan(random, rule), drawFan(random, rule)].map((fan) =>
      pointsOf(fan),
    );
    const zeroDb = between(random, [-30, 30]);
    const orderIn = (size: number, zero: number) => {
      const inUnits = (points: readonly ScoredPoint[] = []) =>
        points.map((p) => ({ ...p, deltaTK: p.deltaTK * size, levelDba: p.levelDba + zero }));
      const levels = rule.levelsDba.map((level) => level + zero);
      return order(score(inUnits(a), inUnits(base), levels), score(inUnits(b), inUnits(base), levels));
    };
    const plain = orderIn(1, 0);
    if (orderIn(1.8, 0) !== plain) return "the order of two fans is another in °F";
    return orderIn(1, zeroDb) !== plain
      ? `the order is another with the decibel's zero ${zeroDb.toFixed(1)} dB off`
      : undefined;
  },
  independent: (_score, random, rule) => {
    const [a, b, third, base] = [0, 1, 2, 3].map(() => pointsOf(drawFan(random, rule)).map(exact));
    const ranksWith = (others: Readonly<Record<string, readonly MeasuredPoint[]>>) => {
      const entries = Object.entries({ a: a ?? [], b: b ?? [], ...others }).map(([id, points]) => ({ id, points }));
      const session = { id: "trial", baseline: { unit: "trial", points: base ?? [] }, entries };
      const { ranked } = scoreRound({ sessions: [session], rule, grade: "engineering", seed: 0, draws: 1 });
      return order(ranked.get("a")?.rank ?? Number.NaN, ranked.get("b")?.rank ?? Number.NaN);
    };
    return ranksWith({}) !== ranksWith({ third: third ?? [] }) ? "a third fan turns the order of two" : undefined;
  },
  "speed-neutral": (score, random, rule) => {
    const fan = { ...drawFan(random, rule), ...(rule.m === undefined ? {} : { m: rule.m }) };
    const base = pointsOf({ ...fan, levelDba: fan.levelDba + between(random, [-2, 2]) });
    const speed = between(random, [0.85, 1.18]);
    const [before, after] = [1, speed].map((each) => score(pointsOf(fan, each), base, rule.levelsDba));
    const [low, high] = TRIAL_RANGE.deltaTK.map((deltaTK) =>
      score(pointsOf({ ...fan, deltaTK }), base, rule.levelsDba),
    );
    const moved = Math.abs((after ?? 0) - (before ?? 0)) / Math.abs((high ?? 0) - (low ?? 0));
    return moved > NEUTRAL_WITHIN
      ? `the same fan at ${speed.toFixed(2)} times the speed scores ${(100 * moved).toFixed(0)} % of the range apart`
      : undefined;
  },
};
