import { facetKeys, facets, rangeKeys, ranges, type FacetKey, type RangeKey } from "@/lib/contracts/index-query";
import type { Handle } from "../client/connect";

/** What the index shows of an entry, from the public view and nothing else. */
export interface SearchSourceRow {
  entryId: string;
  name: string;
  letter: string;
  designers: string[] | null;
  seasonTitle: string;
  inletStackMm: number;
  publishedAt: Date;
  roundRank: number | null;
  levelFullDba: number;
  deltaTFullK: number;
  benchVersionId: string;
  protocolVersionId: string;
  baselineUnitId: string;
  facets: Record<FacetKey, string | null>;
  ranges: Record<RangeKey, number | null>;
}

const plain = {
  entryId: "entry_id",
  name: "design_name",
  letter: "revision_letter",
  designers: "designers",
  seasonTitle: "season_title",
  inletStackMm: "inlet_stack_mm",
  publishedAt: "published_at",
  roundRank: "round_rank",
  levelFullDba: "level_full_dba",
  deltaTFullK: "delta_t_full_k",
  benchVersionId: "bench_version_id",
  protocolVersionId: "protocol_version_id",
  baselineUnitId: "baseline_unit_id",
} as const;
const plainFacets = facetKeys.filter((key) => key !== "designer");

function sources(db: Handle) {
  const texts = plainFacets.map((key) => db.raw("??::text as ??", [facets[key].column, `facet_${key}`]));
  const numbers = rangeKeys.map((key) => db.raw("?? as ??", [ranges[key].column, `range_${key}`]));
  return db("shown.entry").select(plain).select(texts).select(numbers);
}

type Flat = Omit<SearchSourceRow, "facets" | "ranges"> & Record<`facet_${string}` | `range_${string}`, unknown>;

function shape(row: Flat): SearchSourceRow {
  const own = Object.fromEntries(Object.keys(plain).map((key) => [key, row[key as keyof typeof plain]]));
  const texts = Object.fromEntries(facetKeys.map((key) => [key, row[`facet_${key}`] ?? null]));
  const numbers = Object.fromEntries(rangeKeys.map((key) => [key, row[`range_${key}`] ?? null]));
  return { ...own, facets: texts, ranges: numbers } as SearchSourceRow;
}

/** Entries as the world sees them now; ids that are not public are left out. */
export async function searchSourcesByIds(
  db: Handle,
  { entryIds }: { entryIds: readonly string[] },
): Promise<SearchSourceRow[]> {
  const rows: Flat[] = await sources(db).whereRaw("entry_id = any (?::uuid[])", [[...entryIds]]);
  return rows.map(shape);
}

/** The next page of all public entries by id, after the cursor. */
export async function searchSourcesAfter(
  db: Handle,
  { cursorId, limit }: { cursorId: string | null; limit: number },
): Promise<SearchSourceRow[]> {
  const query = sources(db).orderBy("entry_id").limit(limit);
  if (cursorId !== null) void query.where("entry_id", ">", cursorId);
  const rows: Flat[] = await query;
  return rows.map(shape);
}
