"use client";

import {
  columnVisibilityFeature,
  createSortedRowModel,
  rowSortingFeature,
  sortFn_alphanumeric,
  sortFn_basic,
  tableFeatures,
  useTable,
  type ColumnDef,
} from "@tanstack/react-table";
import { useMemo } from "react";
import { cellSortValue, isFigureColumn, type BarsColumn, type BarsRow } from "@/components/ui/bars/bars-model";

const features = tableFeatures({
  columnVisibilityFeature,
  rowSortingFeature,
  sortedRowModel: createSortedRowModel(),
  sortFns: { alphanumeric: sortFn_alphanumeric, basic: sortFn_basic },
});

export type SortedRowsAsked = {
  /** "delta" ascending, "-delta" descending, "" as they came. */
  sort: string;
  /** Keys of hidden columns with commas between. */
  without: string;
};

/** Rows in the order asked for, missing values last either way, and the keys of the columns that stay. */
export function useSortedRows(
  columns: readonly BarsColumn[],
  rows: readonly BarsRow[],
  { sort, without }: SortedRowsAsked,
): { rows: BarsRow[]; visible: ReadonlySet<string> } {
  const definitions = useMemo<ColumnDef<typeof features, BarsRow>[]>(
    () =>
      columns.map((column) => ({
        id: column.key,
        accessorFn: (row) => cellSortValue(row.cells[column.key]),
        sortFn: isFigureColumn(rows, column.key) ? "basic" : "alphanumeric",
        sortUndefined: "last",
      })),
    [columns, rows],
  );
  const data = useMemo(() => [...rows], [rows]);
  const sorting = useMemo(
    () => (sort === "" ? [] : [{ id: sort.replace(/^-/, ""), desc: sort.startsWith("-") }]),
    [sort],
  );
  const columnVisibility = useMemo(
    () => Object.fromEntries(without.split(",").map((key) => [key, false] as const)),
    [without],
  );
  const table = useTable({ features, columns: definitions, data, state: { sorting, columnVisibility } });
  return {
    rows: table.getRowModel().rows.map((row) => row.original),
    visible: new Set(table.getVisibleLeafColumns().map((column) => column.id)),
  };
}
