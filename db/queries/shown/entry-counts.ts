import {
  facetKeys,
  facets,
  rangeKeys,
  ranges,
  type FacetKey,
  type IndexQuery,
  type RangeKey,
} from "@/lib/contracts/index-query";
import type { Handle } from "../../client/connect";
import { asked } from "./entries";

export type ValueCounts = Record<string, { value: string; count: number }[]>;
export type BinCounts = Record<string, { from: number; count: number }[]>;

/** A facet of more values than this is cut to its most frequent ones, as the search service cuts it. */
const mostValues = 300;

const isChosen = (question: IndexQuery, facet: FacetKey) => (question.facets[facet] ?? []).length > 0;

/** Several columns' counts from one pass; `key` of each row is the place of its column in the list. */
async function groupedCounts(
  db: Handle,
  { question, without, expressions }: { question: IndexQuery; without?: string; expressions: readonly string[] },
): Promise<{ key: number; value: string; count: number }[]> {
  if (expressions.length === 0) return [];
  const columns = expressions.map((expression, n) => db.raw(`${expression} as v${n}`));
  const inner = asked(db, question, without).select(columns);
  const names = expressions.map((_, n) => `v${n}`);
  return db
    .from(inner.as("entries"))
    .select(
      // Each set leaves all columns but one aggregated away: that one says which it is.
      db.raw(`case ${names.map((name, n) => `when grouping(${name}) = 0 then ${n}`).join(" ")} end as key`),
      db.raw(`coalesce(${names.join(", ")}) as value`),
      db.raw("count(*)::int as count"),
    )
    .groupByRaw(`grouping sets (${names.map((name) => `(${name})`).join(", ")})`)
    .havingRaw(`coalesce(${names.join(", ")}) is not null`)
    .orderByRaw("1, 3 desc, 2");
}

/** One designer's handle a row, since a design may have several. */
async function designerCounts(db: Handle, question: IndexQuery): Promise<{ value: string; count: number }[]> {
  const inner = asked(db, question, "designer").select("design_id");
  return db
    .from(inner.as("e"))
    .join("shown.designer as d", "d.design_id", "e.design_id")
    .groupBy("d.handle")
    .select({ value: "d.handle" }, db.raw("count(*)::int as count"))
    .orderBy([{ column: "count", order: "desc" }, "value"])
    .limit(mostValues);
}

/**
 * Counts of every facet's values, each under everything asked but the facet's own choice; the most frequent first.
 * Facets without a choice share one pass over the matches; a chosen one needs a pass of its own.
 */
export async function countFacets(db: Handle, { question }: { question: IndexQuery }): Promise<ValueCounts> {
  const plain = facetKeys.filter((facet) => facet !== "designer");
  const open = plain.filter((facet) => !isChosen(question, facet));
  const passes = [
    { facetsOf: open, without: undefined as string | undefined },
    ...plain.filter((facet) => isChosen(question, facet)).map((facet) => ({ facetsOf: [facet], without: facet })),
  ];
  const counted: ValueCounts = Object.fromEntries(facetKeys.map((facet) => [facet, []]));
  await Promise.all([
    ...passes.map(async ({ facetsOf, without }) => {
      const expressions = facetsOf.map((facet) => `${facets[facet].column}::text`);
      for (const row of await groupedCounts(db, { question, without, expressions })) {
        const list = counted[facetsOf[row.key] ?? ""];
        if (list && list.length < mostValues) list.push({ value: row.value, count: row.count });
      }
    }),
    designerCounts(db, question).then((list) => void (counted.designer = list)),
  ]);
  return counted;
}

/** Bins of every range's values, each under everything asked but the range's own bounds: lower edge and count. */
export async function countHistograms(db: Handle, { question }: { question: IndexQuery }): Promise<BinCounts> {
  const open = rangeKeys.filter((range) => !question.ranges[range]);
  const passes = [
    { rangesOf: open, without: undefined as string | undefined },
    ...rangeKeys.filter((range) => question.ranges[range]).map((range) => ({ rangesOf: [range], without: range })),
  ];
  const counted: BinCounts = Object.fromEntries(rangeKeys.map((range) => [range, []]));
  await Promise.all(
    passes.map(async ({ rangesOf, without }) => {
      const expressions = rangesOf.map((range) => binOf(range));
      for (const row of await groupedCounts(db, { question, without, expressions })) {
        const range = rangesOf[row.key];
        if (range)
          counted[range]?.push({ from: Number((Number(row.value) * ranges[range].step).toFixed(6)), count: row.count });
      }
    }),
  );
  for (const list of Object.values(counted)) list.sort((a, b) => a.from - b.from);
  return counted;
}

/** The number of a value's bin. A value within 1e-9 of the next bin's edge belongs there: 0.7 / 0.1 is 6.999… */
const binOf = (range: RangeKey) => `floor(${ranges[range].column} / ${ranges[range].step} + 1e-9)`;
