import { groupBy } from "@/lib/domain/group-by";
import { mean, median } from "@/lib/science/statistics/descriptive";
import { MINIMUM } from "@/lib/science/statistics/minimum-counts";
import { flipSigns } from "@/lib/science/statistics/resampling";
import { pairedTest } from "@/lib/science/statistics/two-samples";
import { shownEffect, type OutcomeKey } from "./outcomes";
import type { Pair } from "./pairs";
import { traitOf, type TraitKey } from "./traits";

/** What the pairs of one change have in common; in the outcome's unit. */
export interface PairEffect {
  readonly key: string;
  readonly trait: TraitKey;
  /** Choices: from and to. Measures: pairs are turned so that the trait grows, by this much in the middle. */
  readonly from?: string;
  readonly to?: string;
  readonly growth?: number;
  readonly pairs: number;
  readonly designers: number;
  /** Pairs in which the figure fell, that is became better. */
  readonly better: number;
  readonly sameRound: number;
  readonly sameCell: number;
  readonly estimate?: number;
  readonly low?: number;
  readonly high?: number;
  readonly p?: number;
  readonly q?: number;
  readonly test?: "signs" | "t";
  readonly why?: "too-few";
}

/** Up to so many designers all flips of signs are run through; above, t. */
const FLIPS_UP_TO = 16;

interface Turned {
  readonly key: string;
  readonly pair: Pair;
  /** On the model's scale, as the trait grows. */
  readonly delta: number;
  readonly from?: string;
  readonly to?: string;
  readonly growth?: number;
}

function turned(pair: Pair): Turned {
  const { trait, fromValue, toValue, delta } = pair;
  if (traitOf(trait).kind === "measure") {
    const growth = Number(toValue) - Number(fromValue);
    return { key: trait, pair, delta: growth < 0 ? -delta : delta, growth: Math.abs(growth) };
  }
  const [from, to] = [String(fromValue), String(toValue)];
  const asItWas = rank(from) < rank(to) || (rank(from) === rank(to) && from < to);
  return asItWas
    ? { key: `${trait}:${from}>${to}`, pair, delta, from, to }
    : { key: `${trait}:${to}>${from}`, pair, delta: -delta, from: to, to: from };
}

/** "none" and "without" come first, so that a change is said as something added. */
const rank = (level: string) => (level === "none" || level === "without" ? 0 : 1);

/**
 * Mean change over pairs, each designer's pairs averaged first since they aren't independent; 95 % interval by t over
 * designers, p by every flip of their signs (t above sixteen). Under six designers no mean is given: five pairs can't
 * reach p = 0.05.
 */
export function pairEffects(pairs: readonly Pair[], outcome: OutcomeKey): PairEffect[] {
  return [...groupBy(pairs.map(turned), ({ key }) => key)]
    .map(([key, group]) => effectOf(key, group, outcome))
    .sort((a, b) => b.designers - a.designers || (a.key < b.key ? -1 : 1));
}

function effectOf(key: string, group: readonly Turned[], outcome: OutcomeKey): PairEffect {
  const [first] = group;
  const averages = [...groupBy(group, ({ pair }) => pair.designer).values()].map(
    (own) => mean(own.map(({ delta }) => delta)) ?? Number.NaN,
  );
  const base = {
    key,
    trait: first?.pair.trait ?? "blades",
    ...(first?.growth === undefined
      ? { from: first?.from, to: first?.to }
      : { growth: median(group.map(({ growth }) => growth ?? Number.NaN)) }),
    pairs: group.length,
    designers: averages.length,
    better: group.filter(({ delta }) => delta < 0).length,
    sameRound: group.filter(({ pair }) => pair.together === "round").length,
    sameCell: group.filter(({ pair }) => pair.together === "cell").length,
  } satisfies Partial<PairEffect>;
  const test = averages.length < MINIMUM.pairs ? undefined : pairedTest(averages);
  if (!test) return { ...base, why: "too-few" };
  const flips = averages.length <= FLIPS_UP_TO ? flipSigns(averages) : undefined;
  return {
    ...base,
    estimate: shownEffect(outcome, test.difference),
    low: shownEffect(outcome, test.low),
    high: shownEffect(outcome, test.high),
    p: flips?.p ?? test.p,
    test: flips ? "signs" : "t",
  };
}
