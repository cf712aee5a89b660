export type Json = null | boolean | number | string | Json[] | { [key: string]: Json };
export type Document = { [key: string]: Json };

export function isRecord(value: unknown): value is Record<string, unknown> {
  return typeof value === "object" && value !== null && !Array.isArray(value);
}

/** The object's own value under a key: never what every object inherits, such as `constructor`. */
export function ownValue<T>(record: Readonly<Record<string, T>>, key: string): T | undefined {
  return Object.hasOwn(record, key) ? record[key] : undefined;
}

/** Whether `path` is the attribute itself or lies below it: `info` covers `info.review`. */
export function covers(attribute: string, path: string): boolean {
  return path === attribute || path.startsWith(`${attribute}.`);
}

/** `*` at an end of a pattern stands for anything; elsewhere names are literal and cover what lies below them. */
export function matchesPattern(pattern: string, path: string): boolean {
  if (pattern === "*") return true;
  if (pattern.startsWith("*") && pattern.endsWith("*")) return path.includes(pattern.slice(1, -1));
  if (pattern.endsWith("*")) return path.startsWith(pattern.slice(0, -1));
  if (pattern.startsWith("*")) return path.endsWith(pattern.slice(1));
  return covers(pattern, path);
}

/**
 * Values at a dotted path, arrays opened on the way. A key that itself contains the dots wins.
 * Returns an empty list when nothing is there.
 */
export function valuesAt(document: Document, path: string): Json[] {
  const found: Json[] = [];
  collect(document, path, found);
  return found;
}

function collect(value: Json, path: string, found: Json[]): void {
  if (Array.isArray(value)) {
    for (const item of value) collect(item, path, found);
    return;
  }
  if (!isRecord(value)) return;
  const direct = ownValue(value, path);
  if (direct !== undefined) {
    found.push(direct);
    return;
  }
  for (let dot = path.indexOf("."); dot > 0; dot = path.indexOf(".", dot + 1)) {
    const below = ownValue(value, path.slice(0, dot));
    if (below !== undefined) collect(below, path.slice(dot + 1), found);
  }
}

/** Calls `visit` with the dotted path and value of every leaf; arrays of scalars count as one leaf each item. */
export function eachLeaf(value: Json, path: string, visit: (path: string, leaf: Json) => void): void {
  if (Array.isArray(value)) {
    for (const item of value) eachLeaf(item, path, visit);
  } else if (isRecord(value)) {
    for (const [key, below] of Object.entries(value)) eachLeaf(below, path === "" ? key : `${path}.${key}`, visit);
  } else {
    visit(path, value);
  }
}

type Picker = { names: ReadonlySet<string>; wild: readonly string[]; below: ReadonlyMap<string, string[]> };

/** Patterns sorted by kind, kept as long as their list is: settings hold one list for many searches. */
const pickers = new WeakMap<readonly string[], Picker>();

function pickerOf(patterns: readonly string[]): Picker {
  let picker = pickers.get(patterns);
  if (picker === undefined) {
    const below = new Map<string, string[]>();
    for (const pattern of patterns) {
      for (let dot = pattern.indexOf("."); dot > 0; dot = pattern.indexOf(".", dot + 1)) {
        const parent = pattern.slice(0, dot);
        below.set(parent, [...(below.get(parent) ?? []), pattern.slice(dot + 1)]);
      }
    }
    picker = { names: new Set(patterns), wild: patterns.filter((each) => each.includes("*")), below };
    pickers.set(patterns, picker);
  }
  return picker;
}

/** Copy that holds only what the patterns cover; with `*` among them the document itself. */
export function project(document: Document, patterns: readonly string[]): Document {
  const { names, wild, below } = pickerOf(patterns);
  if (names.has("*")) return document;
  const kept: [string, Json][] = [];
  for (const [key, value] of Object.entries(document)) {
    const inside = below.get(key);
    if (names.has(key) || wild.some((pattern) => matchesPattern(pattern, key))) kept.push([key, value]);
    else if (inside !== undefined) kept.push([key, projectBelow(value, inside)]);
    else if (key.includes(".") && patterns.some((pattern) => matchesPattern(pattern, key))) kept.push([key, value]);
  }
  return Object.fromEntries(kept);
}

function projectBelow(value: Json, patterns: readonly string[]): Json {
  if (Array.isArray(value)) return value.map((item) => projectBelow(item, patterns));
  return isRecord(value) ? project(value, patterns) : value;
}
