import type { Document, Json } from "./paths";
import { isRecord, valuesAt } from "./paths";
import { normaliseFacet } from "./words";

const NONE = -1;
const FLAG_EXISTS = 1;
const FLAG_NULL = 2;
const FLAG_EMPTY = 4;

/**
 * One attribute as a dictionary of distinct values and one code a document, so that a filter is a test on the
 * dictionary followed by one pass over typed arrays, and a facet count is one increment a document.
 */
export class Column {
  /** Numbers of the dictionary; NaN where the entry is a string. */
  readonly numbers: number[] = [];
  /** Normal forms of the dictionary's strings; empty where the entry is a number. */
  readonly strings: string[] = [];
  /** Text shown for an entry: the first spelling met among the documents that hold it. */
  readonly labels: string[] = [];
  /** Documents that hold each entry. */
  private readonly uses: number[] = [];
  private unusedCount = 0;
  /** Documents that have the attribute at all, with a value or without. */
  holders = 0;
  private readonly codeByNumber = new Map<number, number>();
  private readonly codeByString = new Map<string, number>();
  /** A code, -1 for none, or -(2 + position in `many`). */
  private codes = new Int32Array(64).fill(NONE);
  private flags = new Uint8Array(64);
  private readonly many: number[][] = [];
  private readonly freeMany: number[] = [];
  private sortedCodes = new Int32Array(0);
  private rankByCode: Int32Array | undefined;

  constructor(readonly path: string) {}

  get size(): number {
    return this.labels.length;
  }

  /** Whether more than half of a large dictionary is no longer held by any document, so that it had better be built anew. */
  get isWasteful(): boolean {
    return this.unusedCount > 1000 && this.unusedCount * 2 > this.size;
  }

  set(slot: number, document: Document): void {
    this.clear(slot);
    if (slot >= this.codes.length) this.grow(slot + 1);
    const values = valuesAt(document, this.path);
    if (values.length === 0) return;
    this.holders += 1;
    let flag = FLAG_EXISTS;
    if (values.some((value) => value === null)) flag |= FLAG_NULL;
    if (values.some(isEmpty)) flag |= FLAG_EMPTY;
    this.flags[slot] = flag;
    const distinct = new Set<number>();
    for (const value of values) this.collect(value, distinct);
    const codes = [...distinct];
    for (const code of codes) {
      if (this.uses[code] === 0) this.unusedCount -= 1;
      this.uses[code] = (this.uses[code] as number) + 1;
    }
    if (codes.length === 1) this.codes[slot] = codes[0] ?? NONE;
    else if (codes.length > 1) this.codes[slot] = -2 - this.store(codes);
  }

  clear(slot: number): void {
    if (slot >= this.codes.length) return;
    if (this.flags[slot] !== 0) this.holders -= 1;
    for (const each of this.codesOf(slot)) {
      this.uses[each] = (this.uses[each] as number) - 1;
      if (this.uses[each] === 0) this.unusedCount += 1;
    }
    const code = this.codes[slot] ?? NONE;
    if (code <= -2) this.freeMany.push(-2 - code);
    this.codes[slot] = NONE;
    this.flags[slot] = 0;
  }

  /** Adds one for every distinct value of every listed document to `counts` (as long as the dictionary). */
  count(slots: Int32Array, counts: Uint32Array): void {
    const { codes } = this;
    for (let i = 0; i < slots.length; i += 1) {
      const code = codes[slots[i] as number] ?? NONE;
      if (code >= 0) counts[code] = (counts[code] as number) + 1;
      else if (code <= -2) for (const each of this.many[-2 - code] ?? []) counts[each] = (counts[each] as number) + 1;
    }
  }

  /** Marks in `mask` (one byte a document) those that hold any value whose code is 1 in `pass`. */
  mark(pass: Uint8Array, mask: Uint8Array): void {
    const end = Math.min(mask.length, this.codes.length);
    for (let slot = 0; slot < end; slot += 1) {
      const code = this.codes[slot] as number;
      if (code >= 0) mask[slot] = pass[code] as number;
      else if (code <= -2 && (this.many[-2 - code] ?? []).some((each) => pass[each] === 1)) mask[slot] = 1;
    }
  }

  markFlag(kind: "exists" | "null" | "empty", mask: Uint8Array): void {
    const bit = kind === "exists" ? FLAG_EXISTS : kind === "null" ? FLAG_NULL : FLAG_EMPTY;
    const end = Math.min(mask.length, this.flags.length);
    for (let slot = 0; slot < end; slot += 1) if (((this.flags[slot] as number) & bit) !== 0) mask[slot] = 1;
  }

  /** Codes of one document; empty when it has no value. */
  codesOf(slot: number): readonly number[] {
    const code = this.codes[slot] ?? NONE;
    return code >= 0 ? [code] : code <= -2 ? (this.many[-2 - code] ?? []) : [];
  }

  /** Place of the document's smallest (ascending) or largest value in the order of values, -1 when it has none. */
  rankOf(slot: number, ascending: boolean): number {
    const ranks = this.ranks();
    const code = this.codes[slot] ?? NONE;
    if (code >= 0) return ranks[code] as number;
    if (code === NONE) return NONE;
    let best = NONE;
    for (const each of this.many[-2 - code] ?? []) {
      const rank = ranks[each] as number;
      if (best === NONE || (ascending ? rank < best : rank > best)) best = rank;
    }
    return best;
  }

  /** Codes in order of value: numbers ascending, then strings. New values are merged into the order that was there. */
  inOrder(): Int32Array {
    const known = this.sortedCodes;
    if (known.length === this.size) return known;
    const added = Int32Array.from({ length: this.size - known.length }, (_, i) => known.length + i);
    added.sort((a, b) => this.compare(a, b));
    const merged = new Int32Array(this.size);
    let left = 0;
    let right = 0;
    for (let i = 0; i < merged.length; i += 1) {
      const takesKnown =
        right === added.length ||
        (left < known.length && this.compare(known[left] as number, added[right] as number) <= 0);
      if (takesKnown) {
        merged[i] = known[left] as number;
        left += 1;
      } else {
        merged[i] = added[right] as number;
        right += 1;
      }
    }
    this.sortedCodes = merged;
    return merged;
  }

  codeOfString(normal: string): number | undefined {
    return this.codeByString.get(normal);
  }

  codeOfNumber(value: number): number | undefined {
    return this.codeByNumber.get(value === 0 ? 0 : value);
  }

  private ranks(): Int32Array {
    if (this.rankByCode === undefined || this.rankByCode.length !== this.size) {
      const ranks = new Int32Array(this.size);
      this.inOrder().forEach((code, rank) => {
        ranks[code] = rank;
      });
      this.rankByCode = ranks;
    }
    return this.rankByCode;
  }

  private compare(a: number, b: number): number {
    const x = this.numbers[a] as number;
    const y = this.numbers[b] as number;
    if (!Number.isNaN(x) && !Number.isNaN(y)) return x - y;
    if (!Number.isNaN(x)) return -1;
    if (!Number.isNaN(y)) return 1;
    const left = this.strings[a] as string;
    const right = this.strings[b] as string;
    return left < right ? -1 : left > right ? 1 : 0;
  }

  private collect(value: Json, codes: Set<number>): void {
    if (Array.isArray(value)) for (const item of value) this.collect(item, codes);
    else if (value !== null && typeof value !== "object") {
      codes.add(typeof value === "number" ? this.numberCode(value) : this.stringCode(String(value)));
    }
  }

  private numberCode(value: number): number {
    const key = value === 0 ? 0 : value;
    const known = this.codeByNumber.get(key);
    if (known !== undefined) return known;
    this.codeByNumber.set(key, this.size);
    return this.add(key, "", String(key));
  }

  private stringCode(value: string): number {
    const normal = normaliseFacet(value);
    const known = this.codeByString.get(normal);
    if (known !== undefined) {
      // The spelling of documents that are gone must not show.
      if (this.uses[known] === 0) this.labels[known] = value;
      return known;
    }
    this.codeByString.set(normal, this.size);
    return this.add(NaN, normal, value);
  }

  private add(number: number, normal: string, label: string): number {
    this.numbers.push(number);
    this.strings.push(normal);
    this.uses.push(0);
    this.unusedCount += 1;
    return this.labels.push(label) - 1;
  }

  private store(codes: number[]): number {
    const free = this.freeMany.pop();
    if (free === undefined) return this.many.push(codes) - 1;
    this.many[free] = codes;
    return free;
  }

  private grow(least: number): void {
    const length = Math.max(least, this.codes.length * 2);
    const codes = new Int32Array(length).fill(NONE);
    codes.set(this.codes);
    const flags = new Uint8Array(length);
    flags.set(this.flags);
    this.codes = codes;
    this.flags = flags;
  }
}

function isEmpty(value: Json): boolean {
  if (value === "") return true;
  return Array.isArray(value) ? value.length === 0 : isRecord(value) && Object.keys(value).length === 0;
}
