import { cellNumber } from "./cells";
import type { Column } from "./columns";
import { clockSeconds, timestampSeconds } from "./times";

/** A column that is kept, with what the quick way needs. */
export interface ReadColumn {
  readonly column: Column;
  /** Byte of the decimal mark. */
  readonly decimal: number;
  /** Plain numbers, read byte by byte. */
  readonly quick: boolean;
}

/** A cell's value in the base unit of its column (s, °C, dB, rpm …); NaN when it isn't one, or is empty. */
export function readCell(cell: string, column: Column): number {
  if (column.kind === "clock") return clockSeconds(cell, column.minutesFirst);
  if (column.kind === "timestamp" || column.kind === "date") return timestampSeconds(cell, column.dateOrder);
  const value = cellNumber(cell, column.marks, column.unitInCells);
  return column.unit ? (value + column.unit.offset) * column.unit.scale : value;
}

/** Why a cell was refused, for a person. */
export function describeFault(cell: string, column: Column): string {
  const written = cell.trim();
  if (written === "") return `${column.name}: the cell is empty`;
  const short = written.length > 40 ? `${written.slice(0, 40)}…` : written;
  return `${column.name}: "${short}" is not a ${column.kind === "number" ? "number" : "time"}`;
}
