import { convertUnit, unitAsTyped, unitBySymbol } from "./units";

export type TypedNumber = { value: number; unit: string; why?: undefined } | { why: string; value?: undefined };

const spaces = /[\s\u00a0\u2009\u202f]+/g;
const shape = /^([+-]?)([0-9][0-9 .,'’]*|[.,][0-9]+)(e[+-]?[0-9]{1,3})?(?![0-9])(.*)$/i;

/** Digits with their decimal sign made a point; or a string that says why they can be read two ways. */
function plainDigits(body: string): { digits: string } | { why: string } {
  const text = body.replace(/ ?['’] ?/g, " ").trim();
  if (/ /.test(text) && !/^\d{1,3}( \d{3})+([.,]\d*)?$/.test(text)) {
    return { why: `“${body}” has a gap in it. Write one number, such as 1450.` };
  }
  const joined = text.replaceAll(" ", "");
  const points = joined.split(".").length - 1;
  const commas = joined.split(",").length - 1;
  const twoWays = { why: `“${body}” can be read two ways. Write it without grouping, such as 1450.5.` };
  if (points > 0 && commas > 0) {
    const decimal = joined.lastIndexOf(".") > joined.lastIndexOf(",") ? "." : ",";
    const group = decimal === "." ? "," : ".";
    const [whole = "", part = "", ...more] = joined.split(decimal);
    const groups = whole.split(group);
    const regular = /^\d{1,3}$/.test(groups[0] ?? "") && groups.slice(1).every((digits) => /^\d{3}$/.test(digits));
    return more.length === 0 && regular && /^\d*$/.test(part) ? { digits: `${groups.join("")}.${part}` } : twoWays;
  }
  if (points > 1 || commas > 1) return twoWays;
  // "1,450" is 1450 to some and 1.45 to others; "0,450" and "54,3" can only be decimals.
  if (/^[1-9]\d{0,2},\d{3}$/.test(joined) && !/ /.test(text)) {
    return { why: `“${body}” can be read two ways: write ${joined.replace(",", "")} or ${joined.replace(",", ".")}.` };
  }
  return { digits: joined.replace(",", ".") };
}

/**
 * Reads what a person typed or pasted as one number in the unit of its field: "54,3", "54.3 °C", "−2", "1 450 rpm",
 * "129.7 °F" into a field in °C (converted). Answers the value in `unit`, or `why` it can't be read, ready to show.
 * Empty text answers a `why`, never 0. `unit` is the symbol a field shows ("" for a bare number); house rule, no source.
 */
export function parseTypedNumber(text: string, unit: string): TypedNumber {
  const clean = text
    .replace(/[\u2212\u2013\u2012\ufe63\uff0d]/g, "-")
    .replace(spaces, " ")
    .trim()
    .replace(/^([+-]) /, "$1");
  if (clean === "") return { why: "Nothing is typed here yet." };
  const match = shape.exec(clean);
  if (!match) return { why: `“${text.trim()}” is not a number. Write figures, such as 54.3.` };
  const [, sign = "", body = "", exponent = "", rest = ""] = match;
  const digits = plainDigits(body.trim());
  if ("why" in digits) return digits;
  const value = Number(`${sign}${digits.digits}${exponent}`);
  if (!Number.isFinite(value)) return { why: `“${text.trim()}” is too large to be a reading.` };

  const typed = rest.trim();
  const clear = value === 0 ? 0 : value;
  if (typed === "" || typed === unit) return { value: clear, unit };
  const wanted = unitBySymbol(unit);
  const found = unitAsTyped(typed, wanted?.kind);
  if (!found) return { why: `“${typed}” is not a unit known here. ${fieldWants(unit)}` };
  if (!wanted || found.kind !== wanted.kind) return { why: `“${typed}” doesn't fit this field. ${fieldWants(unit)}` };
  return { value: convertUnit(clear, found.symbol, unit), unit };
}

function fieldWants(unit: string): string {
  return unit === "" ? "Write the bare number." : `It wants ${unit}.`;
}
