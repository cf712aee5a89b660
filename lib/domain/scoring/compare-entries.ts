import { compactLetters } from "@/lib/science/statistics/letters";
import { holm } from "@/lib/science/statistics/multiple-comparisons";
import { pOfDifference } from "@/lib/science/statistics/ranking";
import { combineEffects, effectiveDof, standardUncertainty } from "../results/effects";
import type { Score } from "./score-entry";

/** Entries count as told apart below this Holm-adjusted p. */
export const SEPARATION_ALPHA = 0.05;

export type Compared = { readonly id: string; readonly score: Score };

export type PairComparison = {
  readonly a: string;
  readonly b: string;
  /** Score of a less score of b. */
  readonly difference: number;
  readonly u: number;
  readonly dof: number;
  /** Two-sided, against t with `dof`. */
  readonly p: number;
  readonly pHolm: number;
  /** Not told apart: the adjusted p isn't below 0.05, or the lead is less than the correction of a bound. */
  readonly tie: boolean;
};

/**
 * Every pair of ranked entries, a before b in the order given. Sources that both share (the session's baseline,
 * offsets, gain) act with their difference; degrees of freedom by Welch–Satterthwaite over what is left; p adjusted
 * over all pairs by Holm (Scand. J. Stat. 6 (1979) 65).
 */
export function comparePairs(entries: readonly Compared[], better: "lower" | "higher"): PairComparison[] {
  const pairs = entries.flatMap((a, i) => entries.slice(i + 1).map((b) => ({ a, b, ...differenceOf(a, b) })));
  const adjusted = holm(pairs.map(({ p }) => p));
  return pairs.map(({ a, b, difference, u, dof, p }, i) => {
    const pHolm = adjusted[i] ?? 1;
    const leadOfA = better === "lower" ? -difference : difference;
    const allowance = (a.score.boundAllowance - b.score.boundAllowance) * Math.sign(leadOfA);
    const withinBound = allowance > Math.abs(leadOfA);
    return { a: a.id, b: b.id, difference, u, dof, p, pHolm, tie: !(pHolm < SEPARATION_ALPHA) || withinBound };
  });
}

function differenceOf(a: Compared, b: Compared): { difference: number; u: number; dof: number; p: number } {
  const effects = combineEffects([
    { factor: 1, effects: a.score.effects },
    { factor: -1, effects: b.score.effects },
  ]);
  const difference = a.score.value - b.score.value;
  const u = standardUncertainty(effects);
  const dof = effectiveDof(effects);
  return { difference, u, dof, p: pOfDifference(difference, u, dof) };
}

/** A display of more letters than this tells nobody anything; a long standing then goes without. */
const LETTERS_MOST = 200;

/**
 * Letters by entry id: who shares a letter isn't told apart. Empty where it would take more than two hundred letters.
 * @param idsByRank best first, so that "a" is the lead's
 */
export function lettersOf(idsByRank: readonly string[], pairs: readonly PairComparison[]): Map<string, string> {
  const apart = new Set(pairs.filter(({ tie }) => !tie).flatMap(({ a, b }) => [`${a}\n${b}`, `${b}\n${a}`]));
  const letters = compactLetters(
    idsByRank.length,
    (i, j) => apart.has(`${idsByRank[i]}\n${idsByRank[j]}`),
    LETTERS_MOST,
  );
  return new Map(letters?.map((text, i) => [idsByRank[i] ?? "", text]));
}
