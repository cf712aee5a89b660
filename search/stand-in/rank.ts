import type { Column } from "./column";
import { ServiceError, notSupported } from "./errors";
import { rulesInForce } from "./rules-in-force";
import type { SearchIndex } from "./search-index";
import type { TextMatch } from "./text-match";

const MISSING = 0x7fffffff;

/** One key a candidate, smaller first; candidates are compared by the first key that differs. */
type Keys = Int32Array[];
type SortOrder = { path: string; ascending: boolean };

/** Reads `attribute:asc|desc`; refuses attributes that the settings don't list. */
export function readSort(sort: readonly string[], index: SearchIndex): SortOrder[] {
  return sort.map((text) => {
    const match = /^(.+):(asc|desc)$/.exec(text);
    const path = match?.[1];
    if (path === undefined) {
      throw new ServiceError(
        "invalid_search_sort",
        `Invalid syntax for the sort parameter: expected expression ending by \`:asc\` or \`:desc\`, found \`${text}\`.`,
      );
    }
    if (path.startsWith("_geoPoint")) throw notSupported("Geographic sort", "invalid_search_sort");
    if (!index.isSortable(path)) {
      const { sortableAttributes } = index.settings;
      const hint =
        sortableAttributes.length === 0
          ? "This index does not have configured sortable attributes."
          : `Available sortable attributes are: \`${sortableAttributes.join(", ")}\`.`;
      throw new ServiceError(
        "invalid_search_sort",
        `Index \`${index.uid}\`: Attribute \`${path}\` is not sortable. ${hint}`,
      );
    }
    return { path, ascending: match?.[2] === "asc" };
  });
}

/**
 * The first `wanted` candidates in the order of the index's ranking rules; ties keep the order of the documents.
 * Proximity is not measured: documents that differ by it alone are tied here.
 */
export function rank(
  candidates: Int32Array,
  index: SearchIndex,
  match: TextMatch | undefined,
  sort: readonly SortOrder[],
  wanted: number,
): Int32Array {
  const { rankingRules } = index.settings;
  if (sort.length > 0 && !rankingRules.includes("sort")) {
    throw new ServiceError(
      "invalid_search_sort",
      `Index \`${index.uid}\`: You must specify where \`sort\` is listed in the rankingRules setting to use the sort parameter at search time.`,
    );
  }
  const rules = rulesInForce(rankingRules, match?.strategy ?? "last");
  const keys: Keys = rules.flatMap((rule) => ruleKeys(rule, candidates, index, match, sort));
  if (keys.length === 0 || wanted === 0) return candidates.slice(0, wanted);
  const order =
    wanted * 4 < candidates.length ? smallest(candidates.length, wanted, keys) : everything(candidates.length, keys);
  return order.slice(0, wanted).map((position) => candidates[position] as number);
}

function ruleKeys(
  rule: string,
  candidates: Int32Array,
  index: SearchIndex,
  match: TextMatch | undefined,
  sort: readonly SortOrder[],
): Keys {
  if (rule === "sort") return sort.map((each) => sortKeys(candidates, index.column(each.path), each.ascending));
  const custom = /^(.+):(asc|desc)$/.exec(rule);
  if (custom?.[1] !== undefined) return [sortKeys(candidates, index.column(custom[1]), custom[2] === "asc")];
  if (match === undefined) return [];
  const by = (value: (slot: number) => number): Int32Array => candidates.map(value);
  switch (rule) {
    case "words":
      return [by((slot) => -(match.words[slot] as number))];
    case "typo":
      return [by((slot) => match.typos[slot] as number)];
    case "attribute":
      return [by((slot) => match.attribute[slot] as number), by((slot) => match.position[slot] as number)];
    case "attributeRank":
      return [by((slot) => match.attribute[slot] as number)];
    case "wordPosition":
      return [by((slot) => match.position[slot] as number)];
    case "exactness":
      return [by((slot) => -(match.exact[slot] as number))];
    default:
      return [];
  }
}

/** Numbers before strings in both directions; documents without a value come last in both. */
function sortKeys(candidates: Int32Array, column: Column, ascending: boolean): Int32Array {
  const order = column.inOrder();
  let numberCount = 0;
  while (numberCount < order.length && !Number.isNaN(column.numbers[order[numberCount] as number])) numberCount += 1;
  return candidates.map((slot) => {
    const place = column.rankOf(slot, ascending);
    if (place < 0) return MISSING;
    if (ascending) return place;
    return place < numberCount ? numberCount - 1 - place : order.length - 1 - place + numberCount;
  });
}

function compare(keys: Keys, a: number, b: number): number {
  for (const key of keys) {
    const difference = (key[a] as number) - (key[b] as number);
    if (difference !== 0) return difference;
  }
  return a - b;
}

function everything(length: number, keys: Keys): Int32Array {
  return Int32Array.from({ length }, (_, i) => i).sort((a, b) => compare(keys, a, b));
}

/** The `wanted` smallest positions in order, by a heap whose root is the worst of those kept. */
function smallest(length: number, wanted: number, keys: Keys): Int32Array {
  const heap = new Int32Array(wanted);
  let size = 0;
  const isWorse = (a: number, b: number): boolean => compare(keys, a, b) > 0;
  const sink = (): void => {
    for (let at = 0; ;) {
      let child = at * 2 + 1;
      if (child >= size) return;
      if (child + 1 < size && isWorse(heap[child + 1] as number, heap[child] as number)) child += 1;
      if (!isWorse(heap[child] as number, heap[at] as number)) return;
      [heap[at], heap[child]] = [heap[child] as number, heap[at] as number];
      at = child;
    }
  };
  for (let position = 0; position < length; position += 1) {
    if (size < wanted) {
      let at = size;
      heap[size] = position;
      size += 1;
      while (at > 0 && isWorse(heap[at] as number, heap[(at - 1) >> 1] as number)) {
        const parent = (at - 1) >> 1;
        [heap[at], heap[parent]] = [heap[parent] as number, heap[at] as number];
        at = parent;
      }
    } else if (isWorse(heap[0] as number, position)) {
      heap[0] = position;
      sink();
    }
  }
  return heap.sort((a, b) => compare(keys, a, b));
}

/** Keeps the first document of every value; documents without a value are all kept. */
export function distinctOf(ordered: Int32Array, column: Column): Int32Array {
  const seen = new Uint8Array(column.size);
  return ordered.filter((slot) => {
    const codes = column.codesOf(slot);
    if (codes.some((code) => seen[code] === 1)) return false;
    for (const code of codes) seen[code] = 1;
    return true;
  });
}
