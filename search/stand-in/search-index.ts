import { Column } from "./column";
import { ServiceError } from "./errors";
import type { FilterContext } from "./filter-run";
import type { IndexSettings } from "./index-settings";
import { applySettings, defaultSettings } from "./index-settings";
import type { Document } from "./paths";
import { covers, matchesPattern } from "./paths";
import { Postings } from "./postings";
import type { TextRules } from "./text-match";
import { tokenise } from "./words";

/** One index: its documents in slots, the words of the searchable attributes, and a column a used attribute. */
export class SearchIndex {
  settings: IndexSettings = defaultSettings();
  primaryKey: string | null;
  readonly createdAt: string;
  updatedAt: string;
  readonly documents: (Document | undefined)[] = [];
  readonly fieldDistribution = new Map<string, number>();
  documentBytes = 0;
  private readonly slotById = new Map<string, number>();
  private readonly freeSlots: number[] = [];
  private readonly sizes: number[] = [];
  private live = new Uint8Array(1024);
  private columns = new Map<string, Column>();
  private postings: Postings | undefined;

  constructor(
    public uid: string,
    primaryKey: string | null,
    now: string,
  ) {
    this.primaryKey = primaryKey;
    this.createdAt = now;
    this.updatedAt = now;
  }

  get count(): number {
    return this.slotById.size;
  }

  get slots(): number {
    return this.documents.length;
  }

  slotOf(id: string): number | undefined {
    return this.slotById.get(id);
  }

  /** Identifiers with their slots, as they are now. */
  entries(): [string, number][] {
    return [...this.slotById];
  }

  /** Live slots in the order in which documents are listed. */
  liveSlots(): number[] {
    return [...this.slotById.values()].sort((a, b) => a - b);
  }

  get liveMask(): Uint8Array {
    return this.live;
  }

  /** Adds or replaces a document; one that can't be taken in leaves the index without it. */
  put(id: string, document: Document): void {
    try {
      this.take(id, document);
    } catch (error) {
      this.columns.clear();
      this.postings = undefined;
      this.remove(id);
      throw error;
    }
  }

  private take(id: string, document: Document): void {
    const known = this.slotById.get(id);
    const bytes = JSON.stringify(document).length;
    const slot = known ?? this.freeSlots.pop() ?? this.documents.length;
    if (known !== undefined) this.forget(slot);
    this.documents[slot] = document;
    this.slotById.set(id, slot);
    if (slot >= this.live.length) this.grow(slot + 1);
    this.live[slot] = 1;
    for (const key of Object.keys(document)) {
      this.fieldDistribution.set(key, (this.fieldDistribution.get(key) ?? 0) + 1);
    }
    this.sizes[slot] = bytes;
    this.documentBytes += bytes;
    for (const column of this.columns.values()) column.set(slot, document);
    this.postings?.add(slot, document);
  }

  remove(id: string): boolean {
    const slot = this.slotById.get(id);
    if (slot === undefined) return false;
    this.forget(slot);
    for (const column of this.columns.values()) column.clear(slot);
    this.documents[slot] = undefined;
    this.live[slot] = 0;
    this.slotById.delete(id);
    this.freeSlots.push(slot);
    return true;
  }

  clear(): void {
    this.documents.length = 0;
    this.slotById.clear();
    this.freeSlots.length = 0;
    this.fieldDistribution.clear();
    this.documentBytes = 0;
    this.live.fill(0);
    this.columns.clear();
    this.postings = undefined;
  }

  changeSettings(change: Readonly<Record<string, unknown>>): void {
    this.settings = applySettings(this.settings, change);
    if (change.searchableAttributes !== undefined || change.stopWords !== undefined) this.postings = undefined;
  }

  /** The column of an attribute, built from all documents when it is first asked for. */
  column(path: string): Column {
    let column = this.columns.get(path);
    if (column === undefined) {
      column = new Column(path);
      for (let slot = 0; slot < this.documents.length; slot += 1) {
        const document = this.documents[slot];
        if (document !== undefined) column.set(slot, document);
      }
      this.columns.set(path, column);
    }
    return column;
  }

  /** The words, read from all documents when they are first asked for. */
  words(): Postings {
    if (this.postings === undefined) {
      this.postings = new Postings((path) => this.searchRank(path) >= 0, this.stopWords());
      for (let slot = 0; slot < this.documents.length; slot += 1) {
        const document = this.documents[slot];
        if (document !== undefined) this.postings.add(slot, document);
      }
    }
    return this.postings;
  }

  /** Builds everything that the settings promise, so that the first search doesn't wait for it. */
  prepare(): void {
    void this.words().vocabulary;
    for (const [path, column] of this.columns) if (column.isWasteful) this.columns.delete(path);
    for (const path of [...this.settings.filterableAttributes, ...this.settings.sortableAttributes]) {
      if (typeof path === "string" && !path.includes("*") && this.fieldDistribution.has(path))
        this.column(path).inOrder();
    }
  }

  /** Patterns of the filterable attributes, flat. */
  filterablePatterns(): string[] {
    return this.settings.filterableAttributes.flatMap((each) =>
      typeof each === "string" ? each : each.attributePatterns,
    );
  }

  isFilterable(path: string): boolean {
    return this.filterablePatterns().some((pattern) => matchesPattern(pattern, path));
  }

  isSortable(path: string): boolean {
    return this.settings.sortableAttributes.some((each) => covers(each, path));
  }

  /** Place of an attribute in the searchable list, -1 when it isn't searchable; under `*` all are equal. */
  searchRank(path: string): number {
    return this.settings.searchableAttributes.findIndex((each) => matchesPattern(each, path));
  }

  filterContext(code: string, allowContains: boolean): FilterContext {
    return {
      slots: this.slots,
      live: this.live,
      column: (path) => this.column(path),
      isFilterable: (path) => this.isFilterable(path),
      filterable: this.filterablePatterns(),
      allowContains,
      code,
    };
  }

  /** Rules of a text search; `searchOn` narrows the attributes, and one that isn't searchable is refused. */
  textRules(searchOn: readonly string[] | null): TextRules {
    const { typoTolerance, synonyms, prefixSearch, searchableAttributes } = this.settings;
    const odd = searchOn?.find((path) => path !== "*" && this.searchRank(path) < 0);
    if (odd !== undefined) {
      const available = searchableAttributes.join(", ");
      throw new ServiceError(
        "invalid_search_attributes_to_search_on",
        `Index \`${this.uid}\`: Attribute \`${odd}\` is not searchable. Available searchable attributes are: \`${available}\`.`,
      );
    }
    const isAsked = (path: string): boolean => searchOn === null || searchOn.some((each) => matchesPattern(each, path));
    return {
      typo: {
        enabled: typoTolerance.enabled,
        oneTypo: typoTolerance.minWordSizeForTypos.oneTypo,
        twoTypos: typoTolerance.minWordSizeForTypos.twoTypos,
        disableOnWords: new Set(typoTolerance.disableOnWords.map((word) => tokenise(word)[0]?.word ?? word)),
        disableOnAttributes: typoTolerance.disableOnAttributes,
        disableOnNumbers: typoTolerance.disableOnNumbers,
      },
      stopWords: this.stopWords(),
      synonyms: new Map(
        Object.entries(synonyms).map(([word, alternatives]) => [
          tokenise(word)[0]?.word ?? word,
          alternatives.map((text) => tokenise(text).map((token) => token.word)),
        ]),
      ),
      allowPrefix: prefixSearch === "indexingTime",
      rankOfAttribute: (path) => (isAsked(path) ? this.searchRank(path) : -1),
    };
  }

  private stopWords(): Set<string> {
    return new Set(this.settings.stopWords.flatMap((text) => tokenise(text).map((token) => token.word)));
  }

  private forget(slot: number): void {
    const document = this.documents[slot];
    if (document === undefined) return;
    this.postings?.remove(slot, document);
    this.documentBytes -= this.sizes[slot] ?? 0;
    for (const key of Object.keys(document)) {
      const left = (this.fieldDistribution.get(key) ?? 1) - 1;
      if (left === 0) this.fieldDistribution.delete(key);
      else this.fieldDistribution.set(key, left);
    }
  }

  private grow(least: number): void {
    const live = new Uint8Array(Math.max(least, this.live.length * 2));
    live.set(this.live);
    this.live = live;
  }
}
