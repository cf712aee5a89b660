import { cellNumber, groupLook, numberLook, type NumberMarks } from "./cells";
import type { Quantity } from "./units";

/** Whether values never fall and do rise. */
export function neverFalls(values: readonly number[]): boolean {
  return (
    values.length > 1 &&
    values.every((value, at) => at === 0 || value >= (values[at - 1] ?? value)) &&
    values[0] !== values[values.length - 1]
  );
}

const opposite = (mark: string): "." | "," => (mark === "," ? "." : ",");

/**
 * How a column writes its numbers. Cells that can only be thousands ("1'234", "1.234.567", "1,234.5") settle it. Cells such
 * as "1.850" are thousands where every cell fits and either the log's common mark is the other one and the column is of
 * speeds, powers or milliseconds, or it is a time that would run backwards otherwise. Else the column's own mark counts.
 * House rule, no source.
 */
export function marksOf(
  cells: readonly string[],
  common: "." | ",",
  quantity: Quantity | undefined,
  unitSymbol: string | undefined,
): NumberMarks {
  const looks = cells.map(numberLook);
  const points = looks.filter((look) => look === "point").length;
  const commas = looks.filter((look) => look === "comma").length;
  const own = points === commas ? common : commas > points ? "," : ".";
  const groups = cells.flatMap((cell) => groupLook(cell) ?? []);
  const sure = groups.find((look) => look.sure);
  if (sure) {
    const shown = groups.find((look) => look.decimal !== undefined)?.decimal;
    const byGroup = sure.group === "." || sure.group === "," ? opposite(sure.group) : undefined;
    return { decimal: shown ?? byGroup ?? own, grouped: true };
  }
  const [first] = groups;
  const fits = first && cells.every((cell) => groupLook(cell) || /^\s*[+-]?\d{1,3}\s*$/.test(cell));
  if (!first || !fits) return { decimal: own, grouped: false };
  const thousands: NumberMarks = { decimal: opposite(first.group), grouped: true };
  const counted = quantity === "speed" || quantity === "power" || unitSymbol === "ms";
  if (counted && own !== common) return thousands;
  const read = (marks: NumberMarks) => cells.map((cell) => cellNumber(cell, marks)).filter(Number.isFinite);
  const backwards = !neverFalls(read({ decimal: own, grouped: false })) && neverFalls(read(thousands));
  return quantity === "time" && backwards ? thousands : { decimal: own, grouped: false };
}
