import type { Column } from "./column";
import { ServiceError, notSupported } from "./errors";
import type { Condition, Filter, Word } from "./filter-parse";
import { filterMessage } from "./filter-parse";
import { normaliseFacet } from "./words";

/** What a filter needs of an index. */
export type FilterContext = {
  /** Length of every mask: one byte a document slot. */
  slots: number;
  /** Slots that hold a document: 1, else 0. */
  live: Uint8Array;
  column: (path: string) => Column;
  isFilterable: (path: string) => boolean;
  filterable: readonly string[];
  allowContains: boolean;
  /** Error code of the parameter that carries the filter. */
  code: string;
};

const NUMBER = /^[+-]?(\d+(\.\d*)?|\.\d+)([eE][+-]?\d+)?$/;

/** Documents and values that one filter may look at, over all of its conditions: a second or so. */
const LOOKS_MAX = 2e8;
/** What a condition costs by itself, counted in looks. */
const LOOKS_PER_CONDITION = 2000;

/** A filter being run: how many documents and values it may still look at. */
type Run = FilterContext & { looksLeft: number };

/** Mask of the documents that a filter keeps: 1 kept, 0 not. Unfilterable attributes are refused with their place. */
export function runFilter(filter: Filter, context: FilterContext): Uint8Array {
  const mask = evaluate(filter, { ...context, looksLeft: LOOKS_MAX });
  for (let slot = 0; slot < mask.length; slot += 1)
    mask[slot] = (mask[slot] as number) & (context.live[slot] as number);
  return mask;
}

function evaluate(filter: Filter, context: Run): Uint8Array {
  if (filter.kind === "test") return test(filter.condition, filter.source, context);
  if (filter.kind === "not") return invert(evaluate(filter.part, context));
  const [first, ...rest] = filter.parts;
  const mask = first === undefined ? new Uint8Array(context.slots) : evaluate(first, context);
  for (const part of rest) {
    const other = evaluate(part, context);
    if (filter.kind === "and")
      for (let i = 0; i < mask.length; i += 1) mask[i] = (mask[i] as number) & (other[i] as number);
    else for (let i = 0; i < mask.length; i += 1) mask[i] = (mask[i] as number) | (other[i] as number);
  }
  return mask;
}

function invert(mask: Uint8Array): Uint8Array {
  for (let slot = 0; slot < mask.length; slot += 1) mask[slot] = 1 - (mask[slot] as number);
  return mask;
}

function test(condition: Condition, source: string, context: Run): Uint8Array {
  requireFilterable(condition.attribute, source, context);
  const column = context.column(condition.attribute.text);
  context.looksLeft -= LOOKS_PER_CONDITION + context.slots + column.size;
  if (context.looksLeft < 0) throw notSupported("A filter of so many conditions", context.code);
  const mask = new Uint8Array(context.slots);
  if (condition.kind === "exists" || condition.kind === "null" || condition.kind === "empty") {
    column.markFlag(condition.kind, mask);
    return mask;
  }
  if (condition.kind === "contains" && !context.allowContains) {
    throw new ServiceError(
      "feature_not_enabled",
      "Using `CONTAINS` in a filter requires enabling the `contains filter` experimental feature. See https://github.com/orgs/meilisearch/discussions/763",
    );
  }
  column.mark(passing(condition, column, source, context), mask);
  return condition.kind === "compare" && condition.operator === "!=" ? invert(mask) : mask;
}

/** One byte an entry of the column's dictionary: 1 where the value meets the condition. */
function passing(condition: Condition, column: Column, source: string, context: FilterContext): Uint8Array {
  const pass = new Uint8Array(column.size);
  switch (condition.kind) {
    case "compare":
      if (condition.operator === "=" || condition.operator === "!=") allow(pass, column, condition.value);
      else range(pass, column, condition.operator, condition.value, source, context);
      break;
    case "in":
      for (const value of condition.values) allow(pass, column, value);
      break;
    case "between": {
      const upper = new Uint8Array(column.size);
      range(pass, column, ">=", condition.low, source, context);
      range(upper, column, "<=", condition.high, source, context);
      for (let code = 0; code < pass.length; code += 1) pass[code] = (pass[code] as number) & (upper[code] as number);
      break;
    }
    case "starts":
    case "contains": {
      const wanted = normaliseFacet(condition.value.text);
      const isStart = condition.kind === "starts";
      column.strings.forEach((text, code) => {
        const isString = Number.isNaN(column.numbers[code]);
        if (isString && (isStart ? text.startsWith(wanted) : text.includes(wanted))) pass[code] = 1;
      });
      break;
    }
    default:
  }
  return pass;
}

/** Equality: as a string without regard to case, and as a number where the text reads as one. */
function allow(pass: Uint8Array, column: Column, value: Word): void {
  const string = column.codeOfString(normaliseFacet(value.text));
  if (string !== undefined) pass[string] = 1;
  if (!NUMBER.test(value.text.trim())) return;
  const number = column.codeOfNumber(Number(value.text));
  if (number !== undefined) pass[number] = 1;
}

function range(
  pass: Uint8Array,
  column: Column,
  operator: ">" | ">=" | "<" | "<=",
  value: Word,
  source: string,
  context: FilterContext,
): void {
  if (/^[+-]?(inf|infinity|nan)$/i.test(value.text)) {
    const message = filterMessage("Non finite floats are not supported", source, value.start, value.end);
    throw new ServiceError(context.code, message);
  }
  const isNumber = NUMBER.test(value.text.trim());
  const bound = isNumber ? Number(value.text) : normaliseFacet(value.text);
  for (let code = 0; code < pass.length; code += 1) {
    const number = column.numbers[code] as number;
    if (Number.isNaN(number) === isNumber) continue;
    const mine = isNumber ? number : (column.strings[code] as string);
    const met =
      operator === ">"
        ? mine > bound
        : operator === ">="
          ? mine >= bound
          : operator === "<"
            ? mine < bound
            : mine <= bound;
    if (met) pass[code] = 1;
  }
}

function requireFilterable(attribute: Word, source: string, context: FilterContext): void {
  if (context.isFilterable(attribute.text)) return;
  const hint =
    context.filterable.length === 0
      ? "This index does not have configured filterable attributes."
      : `Available filterable attribute patterns are: ${context.filterable.map((each) => `\`${each}\``).join(", ")}.`;
  const message = `Attribute \`${attribute.text}\` is not filterable. ${hint}`;
  throw new ServiceError(context.code, filterMessage(message, source, attribute.start, attribute.end));
}
