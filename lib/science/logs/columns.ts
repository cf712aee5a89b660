import { cellNumber, groupLook, numberLook, type NumberMarks } from "./cells";
import { cellsOf, isRemark, type Layout, type SampleLine } from "./layout";
import { marksOf, neverFalls } from "./marks";
import { isDifference, quantityOfName, roleOfName } from "./names";
import { clockSeconds, dateOrder, timeKind, type DateOrder } from "./times";
import { unitInName, unitOf, type Quantity, type Unit } from "./units";

/** What a column holds and how its cells read. */
export interface Column {
  readonly index: number;
  /** As written; "column 3" where there is none; repeated ones numbered. */
  readonly name: string;
  readonly kind: "number" | "clock" | "timestamp" | "date" | "text";
  readonly quantity: Quantity | undefined;
  readonly unit: Unit | undefined;
  readonly role: "sensor" | "ambient" | undefined;
  readonly marks: NumberMarks;
  readonly minutesFirst: boolean;
  readonly dateOrder: DateOrder;
  /** Unit written in the cells themselves ("22.3 °C"). */
  readonly unitInCells: RegExp | undefined;
  /** Empty in a fifth or more of the sample: another clock's column, not a fault. */
  readonly sparse: boolean;
  /** Mean over the sample in the base unit; NaN where there is none. */
  readonly sampleMean: number;
  /** Whether the sample never falls. */
  readonly rising: boolean;
}

/** Rows that say what a column is; the rest of the sample tells its marks, as thousands come late. */
const KIND_ROWS = 300;
const READABLE_SHARE = 0.05;
const TRAILING_UNIT = /(?<=\d)\s*(°\s?[CF]|℃|℉|[CFK]|dB\s?\(?[ACZ]?\)?|ms|s|rpm|%)$/i;

/** The columns of a layout, judged by name, row of units, and up to 2,000 rows of the sample. */
export function describeColumns(lines: readonly SampleLine[], layout: Layout): Column[] {
  const rows = sampleRows(lines, layout);
  const cellsAt = (index: number) => rows.map((row) => row[index] ?? "");
  const looks = Array.from({ length: layout.width }, (_, index) =>
    cellsAt(index).map((cell) => numberLook(cell.replace(TRAILING_UNIT, ""))),
  );
  const count = (mark: string) => looks.flat().filter((look) => look === mark).length;
  const common = count("comma") > count("point") ? "," : ".";
  const names = uniqueNames(layout);
  return names.map(({ name, written }, index) => describe({ name, written, index }, cellsAt(index), common, layout));
}

function sampleRows(lines: readonly SampleLine[], layout: Layout): string[][] {
  const rows: string[][] = [];
  for (const { line, text } of lines) {
    if (line < layout.firstRowLine || text.trim() === "" || isRemark(text, layout.delimiter)) continue;
    const cells = cellsOf(text, layout.delimiter);
    if (cells?.length === layout.width) rows.push(cells);
    if (rows.length >= 2000) break;
  }
  return rows;
}

/** Names as written, and told apart by a number where one is there again. */
function uniqueNames(layout: Layout): { name: string; written: string }[] {
  const seen = new Map<string, number>();
  return Array.from({ length: layout.width }, (_, index) => {
    const written = (layout.names?.[index] ?? "").replace(/\s+/g, " ").trim() || `column ${index + 1}`;
    const times = (seen.get(written) ?? 0) + 1;
    seen.set(written, times);
    return { written, name: times === 1 ? written : `${written} (${times})` };
  });
}

function describe(
  { name, written: label, index }: { name: string; written: string; index: number },
  cells: string[],
  common: "." | ",",
  layout: Layout,
): Column {
  const filled = cells.filter((cell) => cell.trim() !== "");
  const written = filled.find(
    (cell) => TRAILING_UNIT.test(cell.trim()) && numberLook(cell.trim().replace(TRAILING_UNIT, "")) !== undefined,
  );
  const cellUnit = written && TRAILING_UNIT.exec(written.trim())?.[0];
  const unitInCells =
    cellUnit === undefined ? undefined : new RegExp(`\\s*${cellUnit.trim().replace(/[()]/g, "\\$&")}$`, "i");
  const bare = filled.map((cell) => (unitInCells ? cell.trim().replace(unitInCells, "") : cell));
  const kind = kindOf(bare.slice(0, KIND_ROWS));
  const named = unitOf(layout.unitRow?.[index]?.replace(/^[([]|[)\]]$/g, "") ?? "", true) ?? unitInName(label);
  const unit = named ?? (cellUnit === undefined ? undefined : unitOf(cellUnit, true));
  const marks = marksOf(bare, common, unit?.quantity ?? quantityOfName(label), unit?.symbol);
  const minutesFirst = kind === "clock" && isMinutesFirst(label, bare);
  const values = bare.map((cell) => (kind === "clock" ? clockSeconds(cell, minutesFirst) : cellNumber(cell, marks)));
  const known = values.filter((value) => Number.isFinite(value));
  const rising = neverFalls(known);
  const mean = known.reduce((total, value) => total + value, 0) / known.length;
  const quantity = kind === "text" ? undefined : quantityOf(label, kind, unit, rising, mean);
  const fits =
    unit && unit.quantity === (quantity === "temperature-difference" ? "temperature" : quantity) ? unit : undefined;
  return {
    index,
    name,
    kind,
    quantity,
    unit: fits,
    role: quantity === "temperature" ? roleOfName(label) : undefined,
    marks,
    minutesFirst,
    dateOrder: dateOrder(bare, common === "," || layout.delimiter === ";" ? "day-first" : "month-first"),
    unitInCells,
    sparse: filled.length < 0.8 * cells.length,
    sampleMean: fits ? (mean + fits.offset) * fits.scale : mean,
    rising,
  };
}

function kindOf(cells: readonly string[]): Column["kind"] {
  const counts = new Map<Column["kind"], number>();
  for (const cell of cells) {
    const kind = numberLook(cell) !== undefined || groupLook(cell) ? "number" : (timeKind(cell) ?? "text");
    counts.set(kind, (counts.get(kind) ?? 0) + 1);
  }
  // Words among numbers are faults of their rows; a column is one of words when next to nothing else stands in it.
  const readable = [...counts].filter(([kind, count]) => kind !== "text" && count >= READABLE_SHARE * cells.length);
  return readable.sort((x, y) => y[1] - x[1])[0]?.[0] ?? "text";
}

/** Seconds since 1970 that a log can be from: above this a rising count without a unit is the time. */
const EPOCH_MIN = 1e8;

function quantityOf(
  name: string,
  kind: Column["kind"],
  unit: Unit | undefined,
  rising: boolean,
  mean: number,
): Quantity | undefined {
  if (kind !== "number" || (!unit && rising && mean > EPOCH_MIN)) return "time";
  const byName = quantityOfName(name);
  if (unit?.quantity === "temperature" && isDifference(name)) return "temperature-difference";
  // "t" is the time when it only rises, else a temperature.
  if (!unit && name.trim().toLowerCase() === "t") return rising ? "time" : "temperature";
  return unit?.quantity ?? byName;
}

function isMinutesFirst(name: string, cells: readonly string[]): boolean {
  if (!cells.every((cell) => /^\s*\d+:\d{2}(?:[.,]\d+)?\s*$/.test(cell))) return false;
  // A count that starts at nothing, or is called one, runs in minutes; a clock of hours has no seconds to show.
  const counts =
    /mm:ss|m:ss|min:s|elapsed|duration|dauer|laufzeit|runtime|durée/i.test(name) || /^\s*0+:00/.test(cells[0] ?? "");
  return counts || cells.some((cell) => Number(cell.split(":")[0]) > 23);
}
