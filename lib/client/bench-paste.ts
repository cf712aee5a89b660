import type { ReadingInput } from "@/lib/contracts/bench";
import { parseTypedNumber } from "@/lib/format/typed-number";

export interface PastedRun {
  line: number;
  setSpeed: number;
  mountNumber: number;
  readings: ReadingInput[];
}

export interface PastedBlock {
  runs: PastedRun[];
  refused: { line: number; reason: string }[];
}

type Column = "setSpeed" | "mount" | "level" | "sensor" | "ambient" | "power" | "rotor";

const order: readonly Column[] = ["setSpeed", "mount", "level", "sensor", "ambient", "power"];
const units = { level: "dB(A)", sensor: "°C", ambient: "°C", power: "W", rotor: "rpm" } as const;
const quantities = {
  level: "level_dba",
  sensor: "sensor_c",
  ambient: "ambient_c",
  power: "power_w",
  rotor: "speed_rpm",
} as const;

const names: readonly [Column, RegExp][] = [
  ["mount", /mount/i],
  ["ambient", /ambient|room|air/i],
  ["sensor", /sensor|heater|hot|block/i],
  ["power", /power|watt|\bW\b/],
  ["level", /level|laeq|db/i],
  ["rotor", /rotor|measured/i],
  ["setSpeed", /speed|rpm|drive|set/i],
];

/** What each column of the block holds: by the words of its first row, else in the usual order. */
function columnsOf(cells: readonly string[]): (Column | undefined)[] | undefined {
  if (cells.some((cell) => /\d/.test(cell) && parseTypedNumber(cell, "").value !== undefined)) return undefined;
  return cells.map((cell) => names.find(([, pattern]) => pattern.test(cell))?.[0]);
}

/**
 * Reads a block as spreadsheets put it on the clipboard: a row a line, cells between tabs; "54,3" and "54.3 °C" are
 * understood. The first row may name its columns; else they are set speed, mount, level, sensor, ambient, power.
 * A row that can't be read is refused with its line (from 1) and reason, the others stand. Empty cells are left out.
 * @param positionId where the level was read @param setSpeeds the protocol's
 */
export function readPastedBlock(text: string, positionId: string, setSpeeds: readonly number[]): PastedBlock {
  const lines = text
    .split(/\r\n|\n|\r/)
    .map((line, i) => ({ line: i + 1, cells: line.split("\t").map((c) => c.trim()) }));
  const filled = lines.filter(({ cells }) => cells.some((cell) => cell !== ""));
  const named = columnsOf(filled[0]?.cells ?? []);
  const columns = named ?? order;
  const block: PastedBlock = { runs: [], refused: [] };
  for (const { line, cells } of named ? filled.slice(1) : filled) {
    const read = rowOf(cells, columns, positionId, setSpeeds);
    if (typeof read === "string") block.refused.push({ line, reason: read });
    else block.runs.push({ line, ...read });
  }
  return block;
}

function rowOf(
  cells: readonly string[],
  columns: readonly (Column | undefined)[],
  positionId: string,
  setSpeeds: readonly number[],
): Omit<PastedRun, "line"> | string {
  let setSpeed: number | undefined;
  let mountNumber: number | undefined;
  const readings: ReadingInput[] = [];
  for (const [i, cell] of cells.entries()) {
    const column = columns[i];
    if (column === undefined || cell === "") continue;
    const unit = column === "mount" || column === "setSpeed" ? "" : units[column];
    const typed = parseTypedNumber(column === "setSpeed" ? cell.replace(/\s*(rpm|%)$/i, "") : cell, unit);
    if (typed.value === undefined) return `column ${i + 1}: ${typed.why}`;
    if (column === "setSpeed") setSpeed = typed.value;
    else if (column === "mount") mountNumber = typed.value;
    else {
      readings.push({
        quantity: quantities[column],
        value: typed.value,
        source: "pasted",
        ...(column === "level" && { positionId }),
        ...(column === "rotor" && { rotorPosition: 1 }),
      });
    }
  }
  if (setSpeed === undefined || !setSpeeds.includes(setSpeed))
    return `the set speed is none of ${setSpeeds.join(", ")}`;
  if (mountNumber === undefined || !Number.isInteger(mountNumber) || mountNumber < 1)
    return "the mount is no whole number";
  if (readings.length === 0) return "there is no reading in this row";
  return { setSpeed, mountNumber, readings };
}
