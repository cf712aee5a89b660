import { types } from "pg";

/** Numbers that PostgreSQL hands over as text (bigint, and so count) must fit a double exactly; else it is an error. */
export function parseBigint(text: string): number {
  const value = Number(text);
  if (!Number.isSafeInteger(value))
    throw new RangeError(`The database gave ${text}, beyond what a number holds exactly.`);
  return value;
}

/** A numeric as a number; NaN and infinities, which numeric also knows, are refused. */
export function parseNumeric(text: string): number {
  const value = Number(text);
  if (!Number.isFinite(value))
    throw new RangeError(`The database gave the numeric ${text}, which is no finite number.`);
  return value;
}

const asText = (text: string): string => text;

/** Arrays of plain values without quoting, as PostgreSQL writes them for numbers and dates; NULL within becomes null. */
function parseArray<T>(text: string, one: (item: string) => T): (T | null)[] {
  const inner = text.slice(1, -1);
  if (inner === "") return [];
  return inner.split(",").map((item) => (item === "NULL" ? null : one(item)));
}

/** By type number (pg_type.oid): bigint, numeric, date, and arrays of them. A date stays text: it has no time and no zone. */
const ours = new Map<number, (text: string) => unknown>([
  [20, parseBigint],
  [1700, parseNumeric],
  [1082, asText],
  [1016, (text) => parseArray(text, parseBigint)],
  [1231, (text) => parseArray(text, parseNumeric)],
  [1182, (text) => parseArray(text, asText)],
]);

/** The parser of a column, for every connection that the product opens; other types keep the driver's own. */
export function typeParser(oid: number, format: string): (value: string) => unknown {
  const own = format === "text" ? ours.get(oid) : undefined;
  return own ?? types.getTypeParser(oid, "text");
}
