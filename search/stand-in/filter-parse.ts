import { ServiceError } from "./errors";

/** A word of a filter with its place, which messages repeat. */
export type Word = { text: string; start: number; end: number; quoted: boolean };
export type Comparison = "=" | "!=" | ">" | ">=" | "<" | "<=";
export type Condition =
  | { kind: "compare"; attribute: Word; operator: Comparison; value: Word }
  | { kind: "between"; attribute: Word; low: Word; high: Word }
  | { kind: "in"; attribute: Word; values: Word[] }
  | { kind: "exists" | "null" | "empty"; attribute: Word }
  | { kind: "contains" | "starts"; attribute: Word; value: Word };
export type Filter =
  | { kind: "and" | "or"; parts: Filter[] }
  | { kind: "not"; part: Filter }
  | { kind: "test"; condition: Condition; source: string };

const KEYWORDS = new Set([
  "OR",
  "AND",
  "NOT",
  "IN",
  "TO",
  "EXISTS",
  "IS",
  "NULL",
  "EMPTY",
  "CONTAINS",
  "STARTS",
  "WITH",
]);
const BARE = /[\p{L}\p{N}_.\-/]/u;
const OPERATIONS =
  "`=`, `!=`, `>=`, `>`, `<=`, `<`, `IN`, `NOT IN`, `TO`, `EXISTS`, `NOT EXISTS`, `IS NULL`, `IS NOT NULL`, `IS EMPTY`, `IS NOT EMPTY`, `CONTAINS`, `NOT CONTAINS`, `STARTS WITH`, `NOT STARTS WITH`, `_geoRadius`, or `_geoBoundingBox`";
const MAX_DEPTH = 150;

/** Message, then the span as 1-based columns, then the filter itself, as the service writes a bad filter. */
export function filterMessage(message: string, source: string, start: number, end: number): string {
  const columns = (to: number): number => codePoints(source, to) + 1;
  return `${message}\n${columns(start)}:${columns(end)} ${source}`;
}

/** Characters before a place, where a pair of surrogates is one. */
function codePoints(text: string, end: number): number {
  let count = 0;
  for (let at = 0; at < end; at += 1) {
    const isSecondHalf = at > 0 && (text.codePointAt(at - 1) ?? 0) > 0xffff;
    if (!isSecondHalf) count += 1;
  }
  return count;
}

/** Recursive-descent parser of `or := and (OR and)*; and := not (AND not)*; not := NOT not | "(" or ")" | condition`. */
class Parser {
  private at = 0;

  constructor(
    private readonly source: string,
    private readonly code: string,
  ) {}

  parse(): Filter {
    const filter = this.or(0);
    this.skip();
    if (this.at < this.source.length) {
      const rest = this.source.slice(this.at);
      this.fail(
        `Found unexpected characters at the end of the filter: \`${rest}\`. You probably forgot an \`OR\` or an \`AND\` rule.`,
        this.at,
        this.source.length,
      );
    }
    return filter;
  }

  private or(depth: number): Filter {
    if (depth > MAX_DEPTH) {
      this.fail(
        "The filter exceeded the maximum depth limit. Try rewriting the filter so that it contains fewer nested conditions.",
        this.at,
        this.source.length,
      );
    }
    const parts = [this.and(depth)];
    while (this.keyword("OR")) parts.push(this.and(depth));
    return parts.length === 1 ? (parts[0] as Filter) : { kind: "or", parts };
  }

  private and(depth: number): Filter {
    const parts = [this.not(depth)];
    while (this.keyword("AND")) parts.push(this.not(depth));
    return parts.length === 1 ? (parts[0] as Filter) : { kind: "and", parts };
  }

  private not(depth: number): Filter {
    if (this.keyword("NOT")) return { kind: "not", part: depth > MAX_DEPTH ? this.or(depth + 1) : this.not(depth + 1) };
    this.skip();
    if (this.source[this.at] !== "(") return this.condition();
    const open = this.at;
    this.at += 1;
    const inner = this.or(depth + 1);
    if (!this.symbol(")")) {
      const rest = this.source.slice(open);
      this.fail(`Expression \`${rest}\` is missing the following closing delimiter: \`)\`.`, open, this.source.length);
    }
    return inner;
  }

  private condition(): Filter {
    this.skip();
    const start = this.at;
    if (/^_geo(Radius|BoundingBox|Polygon|Point|Distance)?\b/.test(this.source.slice(start))) {
      this.fail("Geographic filters are not supported by this server.", start, this.source.length);
    }
    const attribute = this.word(true);
    const test = (condition: Condition): Filter => ({ kind: "test", condition, source: this.source });
    const operator = (["!=", ">=", "<=", "=", ">", "<"] as const).find((each) => this.symbol(each));
    if (operator !== undefined) return test({ kind: "compare", attribute, operator, value: this.word(false) });
    const negated = this.keyword("NOT");
    const wrap = (filter: Filter): Filter => (negated ? { kind: "not", part: filter } : filter);
    if (this.keyword("IN")) return wrap(test({ kind: "in", attribute, values: this.list() }));
    if (this.keyword("EXISTS")) return wrap(test({ kind: "exists", attribute }));
    if (this.keyword("CONTAINS")) return wrap(test({ kind: "contains", attribute, value: this.word(false) }));
    if (this.keyword("STARTS")) {
      if (this.keyword("WITH")) return wrap(test({ kind: "starts", attribute, value: this.word(false) }));
    } else if (!negated && this.keyword("IS")) {
      const absent = this.keyword("NOT");
      const kind = this.keyword("NULL") ? "null" : this.keyword("EMPTY") ? "empty" : undefined;
      if (kind !== undefined) {
        const filter = test({ kind, attribute });
        return absent ? { kind: "not", part: filter } : filter;
      }
    } else if (!negated && this.source[this.at] !== undefined && BARE.test(this.source[this.at] ?? "")) {
      const before = this.at;
      const low = this.word(false);
      if (this.keyword("TO")) return test({ kind: "between", attribute, low, high: this.word(false) });
      this.at = before;
    } else if (!negated && /["']/.test(this.source[this.at] ?? "")) {
      const low = this.word(false);
      if (this.keyword("TO")) return test({ kind: "between", attribute, low, high: this.word(false) });
    }
    const rest = this.source.slice(start);
    return this.fail(
      `Was expecting an operation ${OPERATIONS} at \`${rest.trimEnd()}\`.`,
      start,
      start + rest.trimEnd().length,
    );
  }

  private list(): Word[] {
    if (!this.symbol("[")) this.fail("Expected `[` after `IN` keyword.", this.at, this.source.length);
    const values: Word[] = [];
    while (!this.symbol("]")) {
      this.skip();
      if (this.at >= this.source.length) {
        this.fail("Expected matching `]` after the list of field names given to `IN[`", this.at, this.at);
      }
      values.push(this.word(false));
      if (!this.symbol(",") && this.source[this.at] !== "]") {
        this.fail("Expected matching `]` after the list of field names given to `IN[`", this.at, this.source.length);
      }
    }
    return values;
  }

  private word(isAttribute: boolean): Word {
    this.skip();
    const start = this.at;
    const quote = this.source[start];
    if (quote === '"' || quote === "'") return this.quotedWord(quote);
    while (this.at < this.source.length && BARE.test(this.source[this.at] ?? "")) this.at += 1;
    const text = this.source.slice(start, this.at);
    if (text === "") {
      const rest = this.source.slice(start);
      const said =
        rest.trim() === ""
          ? isAttribute
            ? `Was expecting an operation ${OPERATIONS} but instead got nothing.`
            : "Was expecting a value but instead got nothing."
          : isAttribute
            ? `Was expecting an operation ${OPERATIONS} at \`${rest}\`.`
            : `Was expecting a value but instead got \`${rest}\`.`;
      this.fail(said, start, this.source.length);
    }
    if (KEYWORDS.has(text)) {
      this.fail(
        `Was expecting a value but instead got \`${text}\`, which is a reserved keyword. To use \`${text}\` as a field name or a value, surround it by quotes.`,
        start,
        this.at,
      );
    }
    return { text, start, end: this.at, quoted: false };
  }

  private quotedWord(quote: string): Word {
    const open = this.at;
    let isEscaped = false;
    for (this.at += 1; this.at < this.source.length; this.at += 1) {
      const char = this.source[this.at] as string;
      if (char === quote) {
        const raw = this.source.slice(open + 1, this.at);
        this.at += 1;
        const text = isEscaped ? raw.replace(quote === '"' ? /\\(["\\])/g : /\\(['\\])/g, "$1") : raw;
        return { text, start: open + 1, end: this.at - 1, quoted: true };
      }
      const next = this.source[this.at + 1];
      if (char === "\\" && (next === quote || next === "\\")) {
        isEscaped = true;
        this.at += 1;
      }
    }
    const rest = this.source.slice(open);
    return this.fail(
      `Expression \`${rest}\` is missing the following closing delimiter: \`${quote}\`.`,
      open,
      this.source.length,
    );
  }

  private keyword(name: string): boolean {
    this.skip();
    const end = this.at + name.length;
    if (!this.source.startsWith(name, this.at) || BARE.test(this.source[end] ?? "")) return false;
    this.at = end;
    return true;
  }

  private symbol(text: string): boolean {
    this.skip();
    if (!this.source.startsWith(text, this.at)) return false;
    this.at += text.length;
    this.skip();
    return true;
  }

  private skip(): void {
    while (/\s/.test(this.source[this.at] ?? "")) this.at += 1;
  }

  private fail(message: string, start: number, end: number): never {
    throw new ServiceError(this.code, filterMessage(message, this.source, start, end));
  }
}

/**
 * A filter as the service takes it: text, or an array whose outer level is AND and whose inner is OR.
 * Undefined for no filter (null, blank text, empty arrays). `code` is the error code of the caller's parameter.
 */
export function parseFilter(value: unknown, code: string): Filter | undefined {
  if (value === undefined || value === null) return undefined;
  if (typeof value === "string") return value.trim() === "" ? undefined : new Parser(value, code).parse();
  if (!Array.isArray(value)) {
    throw new ServiceError(code, "Invalid syntax for the filter parameter: `expected String, Array, found an object`.");
  }
  const parts: Filter[] = [];
  for (const item of value) {
    if (typeof item === "string") {
      const part = parseFilter(item, code);
      if (part !== undefined) parts.push(part);
    } else if (Array.isArray(item)) {
      const alternatives = item.map((each: unknown) => {
        if (typeof each === "string") return parseFilter(each, code);
        throw new ServiceError(code, "Invalid syntax for the filter parameter: `expected String, found an array`.");
      });
      const kept = alternatives.filter((each) => each !== undefined);
      if (kept.length > 0) parts.push({ kind: "or", parts: kept });
    } else {
      throw new ServiceError(code, "Invalid syntax for the filter parameter: `expected String or Array of String`.");
    }
  }
  return parts.length === 0 ? undefined : { kind: "and", parts };
}
