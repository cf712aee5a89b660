import type { Document } from "./paths";
import { eachLeaf } from "./paths";
import type { Postings } from "./postings";
import { attributeOf, isSole, positionOf } from "./postings";
import type { Term } from "./query-words";
import { readQuery } from "./query-words";
import { tokenise } from "./words";

export type TypoRules = {
  enabled: boolean;
  oneTypo: number;
  twoTypos: number;
  disableOnWords: ReadonlySet<string>;
  disableOnAttributes: readonly string[];
  disableOnNumbers: boolean;
};
export type TextRules = {
  typo: TypoRules;
  stopWords: ReadonlySet<string>;
  /** Alternatives of a word, each a list of words. */
  synonyms: ReadonlyMap<string, string[][]>;
  allowPrefix: boolean;
  /** Place of an attribute in the order of importance, -1 when it isn't to be searched. */
  rankOfAttribute: (path: string) => number;
};
export type MatchingStrategy = "last" | "all" | "frequency";

/** What a typed word or phrase stands for, for marking it in results. */
export type Shown = { term: Term; accepted: ReadonlySet<string>; phrases: string[][] };

/** Per document slot: whether it matches, and how well by each rule (entries of other slots are meaningless). */
export type TextMatch = {
  matched: Uint8Array;
  words: Uint8Array;
  typos: Uint8Array;
  attribute: Uint16Array;
  position: Uint32Array;
  exact: Uint8Array;
  shown: Shown[];
  strategy: MatchingStrategy;
};

const ABSENT = 255;

/** How one term matches every document: edits (255: not at all) and the best place. */
type TermMatch = {
  term: Term;
  typos: Uint8Array;
  attribute: Uint16Array;
  position: Uint16Array;
  exact: Uint8Array;
  count: number;
};

export type TextSource = { slots: number; postings: Postings; document: (slot: number) => Document | undefined };

/** Matches typed text against an index. Undefined when it holds no word: then every document matches alike. */
export function matchText(
  text: string,
  source: TextSource,
  rules: TextRules,
  strategy: MatchingStrategy,
): TextMatch | undefined {
  const { terms, excluded } = readQuery(text, rules.stopWords, rules.allowPrefix);
  if (terms.length === 0 && excluded.length === 0) return undefined;
  const ranks = source.postings.attributes.map((path) => rules.rankOfAttribute(path));
  const noTypos = new Set(
    source.postings.attributes.flatMap((path, id) => (rules.typo.disableOnAttributes.includes(path) ? [id] : [])),
  );
  const shown: Shown[] = [];
  const matches = terms.map((term) => matchTerm(term, source, rules, ranks, noTypos, shown));
  const result = combine(matches, source.slots, strategy);
  for (const term of excluded) {
    const exactly = { ...rules, typo: { ...rules.typo, enabled: false }, synonyms: new Map() };
    const out = matchTerm({ ...term, isPrefix: false }, source, exactly, ranks, noTypos, []);
    for (let slot = 0; slot < source.slots; slot += 1) if (out.typos[slot] !== ABSENT) result.matched[slot] = 0;
  }
  return { ...result, shown, strategy };
}

function matchTerm(
  term: Term,
  source: TextSource,
  rules: TextRules,
  ranks: readonly number[],
  noTypos: ReadonlySet<number>,
  shown: Shown[],
): TermMatch {
  const slots = source.slots;
  const match: TermMatch = {
    term,
    typos: new Uint8Array(slots).fill(ABSENT),
    attribute: new Uint16Array(slots),
    position: new Uint16Array(slots),
    exact: new Uint8Array(slots),
    count: 0,
  };
  if (term.isPhrase) {
    markPhrase(match, term.words, source, rules);
    shown.push({ term, accepted: new Set(), phrases: [term.words] });
    return match;
  }
  const word = term.words[0] ?? "";
  const maxTypos = typosAllowed(word, rules.typo);
  const derivations = source.postings.vocabulary.derive({ word, maxTypos, isPrefix: term.isPrefix });
  const alternatives = rules.synonyms.get(word) ?? [];
  for (const [only, ...more] of alternatives) {
    if (only !== undefined && more.length === 0) derivations.push({ word: only, typos: 0, isExact: false });
  }
  for (const { word: found, typos, isExact } of derivations) {
    markWord(match, found, typos, isExact, source.postings, ranks, typos > 0 ? noTypos : undefined);
  }
  const phrases = alternatives.filter((words) => words.length > 1);
  for (const words of phrases) markPhrase(match, words, source, rules);
  shown.push({ term, accepted: new Set(derivations.map((each) => each.word)), phrases });
  return match;
}

/** How many edits a word of this length may have. */
export function typosAllowed(word: string, rules: TypoRules): 0 | 1 | 2 {
  if (!rules.enabled || rules.disableOnWords.has(word)) return 0;
  if (rules.disableOnNumbers && /^\p{N}+$/u.test(word)) return 0;
  const length = Array.from(word).length;
  return length >= rules.twoTypos ? 2 : length >= rules.oneTypo ? 1 : 0;
}

function markWord(
  match: TermMatch,
  word: string,
  typos: number,
  isExact: boolean,
  postings: Postings,
  ranks: readonly number[],
  skipped: ReadonlySet<number> | undefined,
): void {
  const posting = postings.get(word);
  if (posting === undefined) return;
  for (let i = 0; i < posting.slots.length; i += 1) {
    const place = posting.places[i] as number;
    const attribute = attributeOf(place);
    const rank = ranks[attribute] as number;
    if (rank < 0 || skipped?.has(attribute) === true) continue;
    improve(match, posting.slots[i] as number, typos, rank, positionOf(place), isExact ? (isSole(place) ? 2 : 1) : 0);
  }
}

function improve(match: TermMatch, slot: number, typos: number, rank: number, position: number, exact: number): void {
  const before = match.typos[slot] as number;
  if (exact > (match.exact[slot] as number)) match.exact[slot] = exact;
  if (before === ABSENT) match.count += 1;
  else if (before < typos) return;
  else if (before === typos) {
    const attribute = match.attribute[slot] as number;
    if (attribute < rank || (attribute === rank && (match.position[slot] as number) <= position)) return;
  }
  match.typos[slot] = typos;
  match.attribute[slot] = rank;
  match.position[slot] = position;
}

/** Documents that hold the words side by side in one value of a searched attribute. */
function markPhrase(match: TermMatch, words: readonly string[], source: TextSource, rules: TextRules): void {
  const indexed = words.filter((word) => !rules.stopWords.has(word));
  const lists = indexed.map((word) => new Set(source.postings.get(word)?.slots));
  const [smallest, ...others] = lists.sort((a, b) => a.size - b.size);
  for (const slot of smallest ?? []) {
    if (!others.every((list) => list.has(slot))) continue;
    const document = source.document(slot);
    if (document === undefined) continue;
    eachLeaf(document, "", (path, leaf) => {
      const rank = rules.rankOfAttribute(path);
      if (rank < 0 || (typeof leaf !== "string" && typeof leaf !== "number")) return;
      const position = phraseAt(
        tokenise(String(leaf)).map((token) => token.word),
        words,
        0,
      );
      if (position >= 0) improve(match, slot, 0, rank, Math.min(position, 0xffff), 1);
    });
  }
}

/** First index at or after `from` where the phrase begins, -1 when it doesn't occur. */
export function phraseAt(text: readonly string[], phrase: readonly string[], from: number): number {
  for (let at = from; at + phrase.length <= text.length; at += 1) {
    if (phrase.every((word, index) => text[at + index] === word)) return at;
  }
  return -1;
}

/**
 * `all`: every term is required. `last`: words may be left out from the end. `frequency`: the most frequent words
 * are left out first. Phrases are always required; without one, the word that would go last must stay.
 */
function combine(
  matches: TermMatch[],
  slots: number,
  strategy: MatchingStrategy,
): Omit<TextMatch, "shown" | "strategy"> {
  const result = {
    matched: new Uint8Array(slots),
    words: new Uint8Array(slots),
    typos: new Uint8Array(slots),
    attribute: new Uint16Array(slots),
    position: new Uint32Array(slots),
    exact: new Uint8Array(slots),
  };
  const phrases = matches.filter((match) => match.term.isPhrase);
  const single = matches.filter((match) => !match.term.isPhrase);
  if (strategy === "frequency") single.sort((a, b) => a.count - b.count);
  const ordered = [...phrases, ...single];
  const required = strategy === "all" ? ordered.length : Math.max(phrases.length, Math.min(1, ordered.length));
  for (let slot = 0; slot < slots; slot += 1) {
    let words = 0;
    while (words < ordered.length && (ordered[words] as TermMatch).typos[slot] !== ABSENT) words += 1;
    if (words < required) continue;
    result.matched[slot] = 1;
    result.words[slot] = words;
    for (let i = 0; i < words; i += 1) {
      const match = ordered[i] as TermMatch;
      result.typos[slot] = (result.typos[slot] as number) + (match.typos[slot] as number);
      result.attribute[slot] = (result.attribute[slot] as number) + (match.attribute[slot] as number);
      result.position[slot] = (result.position[slot] as number) + (match.position[slot] as number);
      result.exact[slot] = (result.exact[slot] as number) + (match.exact[slot] as number);
    }
  }
  return result;
}
