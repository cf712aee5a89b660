import type { Document } from "./paths";
import { eachLeaf } from "./paths";
import { scalarText, wordsOf } from "./words";
import { Vocabulary } from "./vocabulary";

/** Where a word occurs: a document slot and a packed place, in order of slot. */
export type Posting = { slots: number[]; places: number[] };

const POSITION_BITS = 17;
const SOLE_BIT = 1 << 16;
const POSITION_MAX = SOLE_BIT - 1;
/** Words of neighbouring array items stand this far apart. */
const ITEM_GAP = 8;

export const attributeOf = (place: number): number => Math.floor(place / 2 ** POSITION_BITS);
export const positionOf = (place: number): number => place & POSITION_MAX;
/** Whether the word is the attribute's only one, so that typing it is typing the whole value. */
export const isSole = (place: number): boolean => (place & SOLE_BIT) !== 0;

/** Words of the searchable attributes; one entry a word, document and attribute, at its first position. */
export class Postings {
  private byWord = new Map<string, Posting>();
  private lastVocabulary = new Vocabulary([]);
  private readonly newWords = new Set<string>();
  private hasLostWords = false;
  private readonly attributeIds = new Map<string, number>();
  private readonly searchedPaths = new Map<string, boolean>();
  /** Paths by attribute number, in the order in which documents brought them. */
  readonly attributes: string[] = [];

  constructor(
    private readonly isSearchable: (path: string) => boolean,
    private readonly stopWords: ReadonlySet<string>,
  ) {}

  get vocabulary(): Vocabulary {
    if (this.newWords.size === 0 && !this.hasLostWords) return this.lastVocabulary;
    const { words } = this.lastVocabulary;
    const kept = this.hasLostWords ? words.filter((word) => this.byWord.has(word) && !this.newWords.has(word)) : words;
    // Two sorted runs one after the other: sorting them again is a merge.
    this.lastVocabulary = new Vocabulary([
      ...kept,
      ...[...this.newWords].filter((word) => this.byWord.has(word)).sort(),
    ]);
    this.newWords.clear();
    this.hasLostWords = false;
    return this.lastVocabulary;
  }

  get(word: string): Posting | undefined {
    return this.byWord.get(word);
  }

  add(slot: number, document: Document): void {
    for (const [attribute, { words, positions }] of this.read(document)) {
      const base = attribute * (1 << POSITION_BITS) + (words.length === 1 ? SOLE_BIT : 0);
      for (let i = 0; i < words.length; i += 1) {
        this.insert(words[i] as string, slot, base + Math.min(positions[i] as number, POSITION_MAX));
      }
    }
  }

  remove(slot: number, document: Document): void {
    const gone = new Set<string>();
    for (const { words } of this.read(document).values()) for (const word of words) gone.add(word);
    for (const word of gone) {
      const posting = this.byWord.get(word);
      if (posting === undefined) continue;
      const from = lowerBound(posting.slots, slot);
      let to = from;
      while (posting.slots[to] === slot) to += 1;
      posting.slots.splice(from, to - from);
      posting.places.splice(from, to - from);
      if (posting.slots.length > 0) continue;
      this.byWord.delete(word);
      this.hasLostWords = true;
    }
  }

  private read(document: Document): Map<number, { words: string[]; positions: number[] }> {
    const found = new Map<number, { words: string[]; positions: number[] }>();
    eachLeaf(document, "", (path, leaf) => {
      if (!this.isSearched(path)) return;
      const text = scalarText(leaf);
      if (text === undefined) return;
      const attribute = this.attributeId(path);
      const { words, positions } = found.get(attribute) ?? { words: [], positions: [] };
      const last = positions[positions.length - 1];
      let position = last === undefined ? 0 : last + ITEM_GAP;
      for (const word of wordsOf(text)) {
        if (!this.stopWords.has(word)) {
          words.push(word);
          positions.push(position);
        }
        position += 1;
      }
      if (words.length > 0) found.set(attribute, { words, positions });
    });
    return found;
  }

  /** Asked once a path: the answer can't change, a change of the settings builds new postings. */
  private isSearched(path: string): boolean {
    let known = this.searchedPaths.get(path);
    if (known === undefined) {
      known = this.isSearchable(path);
      this.searchedPaths.set(path, known);
    }
    return known;
  }

  private attributeId(path: string): number {
    let id = this.attributeIds.get(path);
    if (id === undefined) {
      id = this.attributes.push(path) - 1;
      this.attributeIds.set(path, id);
    }
    return id;
  }

  private insert(word: string, slot: number, place: number): void {
    let posting = this.byWord.get(word);
    if (posting === undefined) {
      posting = { slots: [], places: [] };
      this.byWord.set(word, posting);
      this.newWords.add(word);
    }
    const { slots, places } = posting;
    const isLast = slots.length === 0 || (slots[slots.length - 1] as number) <= slot;
    const at = isLast ? slots.length : lowerBound(slots, slot + 1);
    // A document's attributes come one after the other, so only the last place can be of the same one.
    if (slots[at - 1] === slot && attributeOf(places[at - 1] as number) === attributeOf(place)) return;
    if (isLast) {
      slots.push(slot);
      places.push(place);
    } else {
      slots.splice(at, 0, slot);
      places.splice(at, 0, place);
    }
  }
}

function lowerBound(sorted: readonly number[], value: number): number {
  let low = 0;
  let high = sorted.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if ((sorted[middle] as number) < value) low = middle + 1;
    else high = middle;
  }
  return low;
}
