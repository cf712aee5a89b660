import { benjaminiHochberg } from "@/lib/science/statistics/multiple-comparisons";
import { distributionsOf, spreadOf, type Distribution, type Spread } from "./distribution";
import { fitEffects, type EffectsFit } from "./effects";
import { shownValue, type OutcomeKey } from "./outcomes";
import { pairEffects, type PairEffect } from "./pair-effects";
import { chainsOf, pairsOf, type Derivation, type Pair, type PairCounts } from "./pairs";
import type { StudyEntry } from "./study-entry";
import { jointTraits, traitKeys, type TraitKey } from "./traits";
import { twoTraits, type TwoTraits } from "./two-traits";

export interface StudyAsked {
  /** None: every trait. One or two: those. */
  readonly traits: readonly TraitKey[];
  readonly outcome: OutcomeKey;
}

export type ShownPair = Omit<Pair, "designer" | "delta">;

export interface StudyResult {
  readonly entries: number;
  readonly designers: number;
  readonly seasons: readonly number[];
  readonly overall: Spread;
  readonly pairEffects: readonly PairEffect[];
  /** At most `PAIRS_SHOWN`, those measured together first, then the newest; never chosen by their outcome. */
  readonly pairs: readonly ShownPair[];
  readonly pairCounts: PairCounts & { readonly pairs: number };
  /** Indexes into `pairs`; only chains that are shown whole. */
  readonly chains: readonly (readonly number[])[];
  readonly fit: EffectsFit;
  readonly modelTraits: readonly TraitKey[];
  readonly distributions: readonly Distribution[];
  /** Entries against another baseline unit than most: not on the distributions' scale. */
  readonly otherBaseline: number;
  readonly two?: TwoTraits;
  /** How many p-values were adjusted together. */
  readonly tried: number;
}

export const PAIRS_SHOWN = 200;
/** Seed of the study's draws: fixed, so that the same entries always give the same figures. */
export const STUDY_SEED = 20_260;

const together = { round: 0, cell: 1, no: 2 } as const;

/**
 * The whole study of some entries. Pairs of the traits asked for, the regression on them (on all common traits where
 * none is asked for), and how the outcomes are spread over their levels. Every p on the page is adjusted together.
 */
export function study(
  asked: StudyAsked,
  entries: readonly StudyEntry[],
  derivations: readonly Derivation[],
): StudyResult {
  const { outcome } = asked;
  const shown = asked.traits.length > 0 ? asked.traits : traitKeys;
  const found = pairsOf(derivations, entries, outcome);
  const own = found.pairs.filter(({ trait }) => shown.includes(trait));
  const season = new Map(entries.map((entry) => [entry.entryId, entry.seasonNumber]));
  const newest = (pair: Pair) => season.get(pair.toEntryId) ?? 0;
  const pairs = own
    .toSorted((a, b) => together[a.together] - together[b.together] || newest(b) - newest(a))
    .slice(0, PAIRS_SHOWN);
  const modelTraits = asked.traits.length > 0 ? asked.traits : jointTraits;
  const fit = fitEffects(modelTraits, outcome, entries, STUDY_SEED);
  const oneScale = withCommonBaseline(entries);
  const [first, second] = asked.traits;
  const two = first && second ? twoTraits([first, second], outcome, { entries, oneScale }, STUDY_SEED) : undefined;
  const raw = { pairEffects: pairEffects(own, outcome), fit, two };
  return {
    entries: entries.length,
    designers: new Set(entries.map(({ designer }) => designer)).size,
    seasons: [...new Set(entries.map(({ seasonNumber }) => seasonNumber))].sort((a, b) => a - b),
    overall: spreadOf(oneScale.flatMap((entry) => shownValue(outcome, entry) ?? [])),
    ...adjusted(raw),
    pairs: pairs.map(({ designer: _designer, delta: _delta, ...pair }) => pair),
    pairCounts: { ...found.counts, pairs: own.length },
    chains: chainsOf(pairs),
    modelTraits,
    distributions: distributionsOf(shown, outcome, oneScale),
    otherBaseline: entries.length - oneScale.length,
  };
}

/** The entries against the baseline unit that most were measured against (of equals the first by id). */
function withCommonBaseline(entries: readonly StudyEntry[]): StudyEntry[] {
  const counts = new Map<string, number>();
  for (const { baselineUnitId } of entries) counts.set(baselineUnitId, (counts.get(baselineUnitId) ?? 0) + 1);
  const [most] = [...counts].sort(([a, m], [b, n]) => n - m || (a < b ? -1 : 1));
  return entries.filter(({ baselineUnitId }) => baselineUnitId === most?.[0]);
}

interface Raw {
  readonly pairEffects: readonly PairEffect[];
  readonly fit: EffectsFit;
  readonly two: TwoTraits | undefined;
}

/** Puts q beside every p of the page, all of them one family. */
function adjusted({ pairEffects: ofPairs, fit, two }: Raw) {
  const everyP: number[] = [];
  const note = <T extends { readonly p?: number }>(each: T) => {
    if (each.p !== undefined) everyP.push(each.p);
  };
  ofPairs.forEach(note);
  fit.effects.forEach(note);
  two?.within.forEach(({ effects }) => effects.forEach(note));
  const q = benjaminiHochberg(everyP);
  let next = 0;
  const withQ = <T extends { readonly p?: number }>(each: T) =>
    each.p === undefined ? each : { ...each, q: q[next++] };
  return {
    pairEffects: ofPairs.map(withQ),
    fit: { ...fit, effects: fit.effects.map(withQ) },
    ...(two
      ? { two: { ...two, within: two.within.map((each) => ({ ...each, effects: each.effects.map(withQ) })) } }
      : {}),
    tried: everyP.length,
  };
}
