"use client";

import { usePathname, useSearchParams } from "next/navigation";
import { useState } from "react";
import { Fold } from "@/components/ui/fold";
import { Slot } from "@/components/ui/slot";
import { columnLabel } from "@/components/ui/bars/bars-model";
import { BarsTable, type BarsTableProps } from "@/components/ui/bars/bars-table";
import { useSortedRows } from "./sorted-rows";

export type SortedTableProps = BarsTableProps & {
  /** Begins the table's parameters in the address, so that two tables on a page keep apart: `runs-sort`. */
  id: string;
  /** Let people choose columns; the naming one always stays. */
  choose?: boolean;
};

/** A table that is all here: sorted and its columns chosen in the browser, both kept in the address. */
export function SortedTable({
  id,
  columns,
  rows,
  choose = true,
  nameColumn = columns[0]?.key,
  ...rest
}: SortedTableProps) {
  const path = usePathname();
  const search = useSearchParams();
  const [sortName, withoutName] = [`${id}-sort`, `${id}-without`];
  const asked = search.get(sortName) ?? "";
  // A shared address may name columns that are gone since.
  const known = (key: string) => columns.some((column) => column.key === key);
  const sort = known(asked.replace(/^-/, "")) ? asked : "";
  const fromAddress = search.get(withoutName) ?? "";
  // What was just pressed shows at once; the address follows.
  const [draft, setDraft] = useState<{ over: string; without: string }>();
  const hidden = (draft?.over === fromAddress ? draft.without : fromAddress)
    .split(",")
    .filter((key) => known(key) && key !== nameColumn);
  const sorted = useSortedRows(columns, rows, { sort, without: hidden.join(",") });

  const address = (name: string, value: string) => {
    const next = new URLSearchParams(search);
    if (value === "") next.delete(name);
    else next.set(name, value);
    const query = next.toString().replaceAll("%2C", ",");
    return query ? `${path}?${query}` : path;
  };
  const shown = columns
    .filter((column) => sorted.visible.has(column.key))
    .map((column) => {
      const now =
        sort === column.key ? ("ascending" as const) : sort === `-${column.key}` ? ("descending" as const) : undefined;
      return { ...column, sort: { href: address(sortName, now === "ascending" ? `-${column.key}` : column.key), now } };
    });
  const flip = (key: string) => {
    const next = hidden.includes(key) ? hidden.filter((each) => each !== key) : [...hidden, key];
    const without = next.join(",");
    setDraft({ over: fromAddress, without });
    window.history.replaceState(null, "", address(withoutName, without));
  };

  return (
    <>
      <BarsTable {...rest} nameColumn={nameColumn} columns={shown} rows={sorted.rows} />
      {choose ? (
        <Fold title="Columns" className="screen-only mt-3">
          <div className="flex flex-wrap gap-x-6">
            {columns
              .filter((column) => column.key !== nameColumn)
              .map((column) => (
                <Slot
                  key={column.key}
                  label={columnLabel(column)}
                  checked={!hidden.includes(column.key)}
                  onChange={() => flip(column.key)}
                />
              ))}
          </div>
        </Fold>
      ) : null}
    </>
  );
}
