import { notSupported } from "./errors";
import { eachLeaf } from "./paths";
import { rulesInForce } from "./rules-in-force";
import type { Rank } from "./score-rank";
import { globalScore, positionCost } from "./score-rank";
import type { SearchIndex } from "./search-index";
import type { SearchParams } from "./search-params";
import type { TextMatch } from "./text-match";
import { typosAllowed } from "./text-match";
import { endsPhrase, scalarText, tokenise } from "./words";

export type HitScore = { score: number; details: Record<string, Record<string, unknown>> };

/** Where one document holds the typed word: all that its score depends on. */
type Places = { weight: number; cost: number; matchType: "exactMatch" | "matchesStart" | "noExactMatch"; exact: 0 | 1 };

/** Words of neighbouring sentences and array items stand this far apart. */
const FAR = 8;
const POSITION_COST_MAX = 10;

/**
 * Scores of a search by one word, or by none: the service's own figures, from its ranks (score_details.rs and the
 * rules' graphs). More words would need their distances, which aren't measured here: they are refused.
 */
export function scorerOf(
  index: SearchIndex,
  params: SearchParams,
  match: TextMatch | undefined,
): (slot: number) => HitScore {
  if (match === undefined) return () => ({ score: 1, details: {} });
  const [shown, ...others] = match.shown;
  const isOneWord = shown !== undefined && !shown.term.isPhrase && shown.phrases.length === 0;
  if (!isOneWord || others.length > 0 || tokenise(params.q ?? "").length !== 1) {
    throw notSupported("A ranking score for several words", "invalid_search_show_ranking_score");
  }
  const word = shown.term.words[0] ?? "";
  const rules = index.textRules(params.attributesToSearchOn);
  const maxTypos = typosAllowed(word, rules.typo);
  const { vocabulary } = index.words();
  const typosOf = new Map(
    vocabulary.derive({ word, maxTypos, isPrefix: shown.term.isPrefix }).map((each) => [each.word, each.typos]),
  );
  for (const [only] of rules.synonyms.get(word) ?? []) if (only !== undefined) typosOf.set(only, 0);
  return (slot) => {
    const typos = match.typos[slot] as number;
    const places = placesOf(index, slot, word, (each) => typosOf.get(each) === typos, rules.rankOfAttribute);
    return scoreOf(index, params, places, typos, Math.max(1, maxTypos));
  };
}

function placesOf(
  index: SearchIndex,
  slot: number,
  word: string,
  isMatch: (word: string) => boolean,
  rankOfAttribute: (path: string) => number,
): Places {
  const places: Places = { weight: Infinity, cost: Infinity, matchType: "noExactMatch", exact: 0 };
  const fields = new Map<string, { last: number | undefined; words: number; hasExact: boolean }>();
  let isAtStart = false;
  eachLeaf(index.documents[slot] ?? {}, "", (path, leaf) => {
    const text = scalarText(leaf);
    if (text === undefined || index.searchRank(path) < 0) return;
    const field = fields.get(path) ?? { last: undefined, words: 0, hasExact: false };
    fields.set(path, field);
    const rank = rankOfAttribute(path);
    let end: number | undefined;
    for (const token of tokenise(text)) {
      const isFar = end === undefined || endsPhrase(text.slice(end, token.start));
      const position: number = field.last === undefined ? 0 : field.last + (isFar ? FAR : 1);
      field.last = position;
      end = token.end;
      field.words += 1;
      if (!isMatch(token.word)) continue;
      if (rank >= 0) places.weight = Math.min(places.weight, rank);
      places.cost = Math.min(places.cost, positionCost(position));
      if (token.word !== word) continue;
      places.exact = 1;
      if (rank >= 0) field.hasExact = true;
      if (position === 0) isAtStart = true;
    }
  });
  const holding = [...fields.values()].filter((field) => field.hasExact);
  if (isAtStart && holding.length > 0) {
    places.matchType = holding.some((field) => field.words === 1) ? "exactMatch" : "matchesStart";
  }
  return places;
}

function scoreOf(
  index: SearchIndex,
  params: SearchParams,
  places: Places,
  typoCount: number,
  maxTypoCount: number,
): HitScore {
  const { rankingRules, searchableAttributes } = index.settings;
  const maxWeight = searchableAttributes.includes("*") ? 0 : searchableAttributes.length - 1;
  const attribute: Rank = [maxWeight + 1 - places.weight, maxWeight + 1];
  const position: Rank = [POSITION_COST_MAX + 1 - places.cost, POSITION_COST_MAX + 1];
  const typo: Rank = [maxTypoCount + 1 - typoCount, maxTypoCount + 1];
  const { matchType } = places;
  const type: Rank = [matchType === "exactMatch" ? 3 : matchType === "matchesStart" ? 2 : 1, 3];
  const exactWords: Rank = [places.exact + 1, 2];
  const ranks: Rank[] = [];
  const details: HitScore["details"] = {};
  const add = (name: string, own: Rank[], shown: Record<string, unknown> = {}, of: Rank[] = own): void => {
    ranks.push(...own);
    details[name] = { order: Object.keys(details).length, ...shown, score: globalScore(of) };
  };
  for (const rule of rulesInForce(rankingRules, params.matchingStrategy)) {
    if (rule === "words") add("words", [[1, 1]], { matchingWords: 1, maxMatchingWords: 1 });
    else if (rule === "typo") add("typo", [typo], { typoCount, maxTypoCount });
    else if (rule === "proximity") add("proximity", [[1, 1]]);
    else if (rule === "attributeRank") add("attributeRank", [attribute]);
    else if (rule === "wordPosition") add("wordPosition", [position]);
    else if (rule === "attribute") {
      const parts = {
        attributeRankingOrderScore: globalScore([attribute]),
        queryWordDistanceScore: globalScore([position]),
      };
      add("attribute", [attribute, position], parts);
    } else if (rule === "exactness") {
      const isNone = matchType === "noExactMatch";
      const words = isNone ? { matchingWords: places.exact, maxMatchingWords: 1 } : {};
      add("exactness", [type, exactWords], { matchType, ...words }, isNone ? [type, exactWords] : [type]);
    }
  }
  return { score: globalScore(ranks), details };
}
