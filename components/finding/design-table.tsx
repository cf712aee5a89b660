import Link from "next/link";
import { BarsTable } from "@/components/ui/bars/bars-table";
import type { BarsColumn, BarsRow } from "@/components/ui/bars/bars-model";
import { indexAddress, type IndexAnswer, type IndexItem, type IndexQuery } from "@/lib/contracts/index-query";
import { entryToken } from "@/lib/domain/designs/entry-token";
import type { IndexColumn, ListFacts } from "./columns";
import { entryName, markedWords, nameWords, type Piece } from "./entry-name";
import { PickSlot } from "./pick-slot";

export type DesignTableProps = {
  answer: IndexAnswer;
  query: IndexQuery;
  columns: readonly IndexColumn[];
  distanceMm: number | undefined;
};

function headOf(column: IndexColumn, facts: ListFacts, query: IndexQuery): BarsColumn {
  const now = query.sort === column.sort;
  const turned = now && !query.descending;
  const unit = typeof column.unit === "function" ? column.unit(facts) : column.unit;
  return {
    key: column.key,
    head: typeof column.head === "function" ? column.head(facts) : column.head,
    ...(unit && { unit }),
    ...(column.strong && { tone: "strong" as const }),
    ...(column.short && { short: true }),
    ...(column.sort && {
      sort: {
        href: indexAddress({ ...query, sort: column.sort, descending: turned, page: 1 }),
        ...(now && { now: query.descending ? ("descending" as const) : ("ascending" as const) }),
      },
    }),
  };
}

type Marks = Readonly<Record<string, readonly Piece[] | undefined>>;

function rowOf(item: IndexItem, columns: readonly IndexColumn[], marks: Marks): BarsRow {
  const name = entryName(item);
  const token = entryToken(item);
  return {
    key: item.entryId,
    cells: {
      pick: { words: <PickSlot token={token} name={name} /> },
      name: {
        words: (
          <>
            <Link href={`/designs/${item.slug}`} className="sm:whitespace-nowrap">
              {nameWords(item, marks.name)}
            </Link>
            {item.corrections > 0 ? <span className="small-print"> corrected</span> : null}
          </>
        ),
      },
      ...Object.fromEntries(columns.map((column) => [column.key, column.cell(item)])),
      ...(marks.designer &&
        columns.some(({ key }) => key === "designer") && {
          designer: { words: markedWords(item.designers.join(", "), marks.designer) },
        }),
    },
  };
}

/** One page of the list on bars: a slot to clip, the name, and the columns asked for; heads sort. */
export function DesignTable({ answer, query, columns, distanceMm }: DesignTableProps) {
  const speeds = new Set(answer.items.map((item) => item.fullSetSpeed));
  const facts: ListFacts = { distanceMm, fullSetSpeed: speeds.size === 1 ? [...speeds][0] : undefined };
  const name: BarsColumn = {
    key: "name",
    head: "Design",
    sort: {
      href: indexAddress({ ...query, sort: "name", descending: query.sort === "name" && !query.descending, page: 1 }),
      ...(query.sort === "name" && { now: query.descending ? ("descending" as const) : ("ascending" as const) }),
    },
  };
  return (
    <BarsTable
      caption="Entries that fit, with 95 % intervals"
      nameColumn="name"
      columns={[
        { key: "pick", head: "Clip", hideHead: true },
        name,
        ...columns.map((column) => headOf(column, facts, query)),
      ]}
      rows={answer.items.map((item) => rowOf(item, columns, answer.highlights?.[item.entryId] ?? {}))}
    />
  );
}
