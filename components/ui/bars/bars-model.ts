import type { ReactNode } from "react";
import { formatMeasured } from "@/lib/format/measured";

/** A number in a cell; undefined or null stands as an en dash with its reason, never as 0. */
export type Figure = {
  value: number | undefined | null;
  uncertainty?: number | null;
  decimals?: number;
  signed?: boolean;
  bound?: "upper";
  /** Why there is no value. */
  why?: string;
};

export type BarsCell = { figure: Figure } | { words: ReactNode; sortBy?: string | number };

export type BarsColumn = {
  key: string;
  head: ReactNode;
  /** The unit, once, in the head. */
  unit?: string;
  /** The head in plain words, for a folded row and for choosing columns; needed where `head` is no string. */
  label?: string;
  tone?: "baseline" | "strong";
  /** An address that sorts by this column, and how it is sorted now. */
  sort?: { href: string; now?: "ascending" | "descending" };
  /** Its cells hold a word or two, and take no more room than that on a phone. */
  short?: boolean;
  /** Only heard: for a column of slots. */
  hideHead?: boolean;
};

export type BarsRow = {
  key: string;
  cells: Readonly<Record<string, BarsCell | undefined>>;
  tone?: "baseline" | "wrong";
};

/** Widest parts of a column's figures, so that the rest can be filled up to the decimal point. */
export type ColumnWidths = { decimals: number; uncertainty: number };

export type FigureText = { value: string; uncertainty: string | undefined };

/** The figure as written, or undefined when it is missing. */
export function figureText(figure: Figure): FigureText | undefined {
  if (figure.value === undefined || figure.value === null || !Number.isFinite(figure.value)) return undefined;
  return formatMeasured({ ...figure, value: figure.value, uncertainty: figure.uncertainty ?? undefined });
}

/** Characters from the decimal point on: "57.6" has 2, "57" none. */
export function tailLength(text: string): number {
  const point = text.indexOf(".");
  return point < 0 ? 0 : text.length - point;
}

/** A column is one of figures when any of its cells is one. */
export function isFigureColumn(rows: readonly BarsRow[], key: string): boolean {
  return rows.some((row) => {
    const cell = row.cells[key];
    return cell !== undefined && "figure" in cell;
  });
}

/** Widths of a column's figures in characters; zero where there are none. */
export function columnWidths(rows: readonly BarsRow[], key: string): ColumnWidths {
  let [decimals, uncertainty] = [0, 0];
  for (const row of rows) {
    const cell = row.cells[key];
    const text = cell && "figure" in cell ? figureText(cell.figure) : undefined;
    if (!text) continue;
    decimals = Math.max(decimals, tailLength(text.value));
    uncertainty = Math.max(uncertainty, text.uncertainty === undefined ? 0 : text.uncertainty.length + 2);
  }
  return { decimals, uncertainty };
}

/** The column in plain words. */
export function columnLabel(column: BarsColumn): string {
  const head = column.label ?? (typeof column.head === "string" ? column.head : column.key);
  return column.unit ? `${head}, ${column.unit}` : head;
}

/** What a cell sorts by: its number or words; undefined sorts last. */
export function cellSortValue(cell: BarsCell | undefined): number | string | undefined {
  if (!cell) return undefined;
  if ("figure" in cell) return cell.figure.value ?? undefined;
  return cell.sortBy ?? (typeof cell.words === "string" ? cell.words : undefined);
}
