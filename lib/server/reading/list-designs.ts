import { publicDb } from "@/db/client/handles";
import { countFacets, countHistograms } from "@/db/queries/shown/entry-counts";
import { countEntries, listEntries, type ListedRow } from "@/db/queries/shown/entries";
import {
  absoluteRanges,
  indexItemSchema,
  indexPageSize,
  settledQuery,
  type IndexAnswer,
  type IndexItem,
  type IndexQuery,
} from "@/lib/contracts/index-query";
import { coverageFactor95 } from "@/lib/science/statistics/uncertainty";

/** Half-widths of 95 % coverage from u and its degrees of freedom (null: as known), as the index shows them. */
const expanded = (u: unknown, dof: unknown): number | null =>
  typeof u === "number" ? u * coverageFactor95(typeof dof === "number" ? dof : Infinity) : null;

/** A row of the read model as the index's contract has it; the `u…` fields become 95 % half-widths. */
export function indexItem(row: ListedRow): IndexItem {
  const { dofEqualNoise, dofEqualCooling, dofLevelDifference, dofLevelFull, dofDeltaTFull, ...rest } = row;
  const { benchVersionId, protocolVersionId, baselineUnitId, ...item } = rest;
  return indexItemSchema.parse({
    ...item,
    uEqualNoiseK: expanded(row.uEqualNoiseK, dofEqualNoise),
    uEqualNoisePercent: expanded(row.uEqualNoisePercent, dofEqualNoise),
    uEqualCoolingDb: expanded(row.uEqualCoolingDb, dofEqualCooling),
    uLevelDifferenceDb: expanded(row.uLevelDifferenceDb, dofLevelDifference),
    uLevelFullDb: expanded(row.uLevelFullDb, dofLevelFull),
    uDeltaTFullK: expanded(row.uDeltaTFullK, dofDeltaTFull),
    comparable: `${String(benchVersionId)} ${String(protocolVersionId)} ${String(baselineUnitId)}`,
  });
}

/** The item as a list over several benches shows it: without the figures that would pass for one scale there. */
export function withoutAbsolutes(item: IndexItem): IndexItem {
  return {
    ...item,
    equalNoiseK: null,
    uEqualNoiseK: null,
    loudnessSone: null,
    levelFullDba: null,
    uLevelFullDb: null,
    deltaTFullK: null,
    uDeltaTFullK: null,
  };
}

/** Histograms over several benches, without those of figures that would pass for one scale. */
export function withoutAbsoluteRanges(bins: IndexAnswer["histograms"]): IndexAnswer["histograms"] {
  return Object.fromEntries(Object.entries(bins).filter(([range]) => !absoluteRanges.some((each) => each === range)));
}

/**
 * Answers the index's question from the database: matches, counts of every facet without its own choice, and
 * histograms. The search service answers the same question faster and forgives errors of typing; this one needs nothing
 * but the public views.
 */
export async function listDesigns(asked: IndexQuery): Promise<IndexAnswer> {
  const db = publicDb();
  // Whether figures stand on one scale is decided without the bounds that need it.
  const { comparables } = await countEntries(db, settledQuery(asked, false));
  const comparableOnly = comparables === 1;
  const query = settledQuery(asked, comparableOnly);
  const [rows, counted, facetCounts, bins] = await Promise.all([
    listEntries(db, query),
    countEntries(db, query),
    countFacets(db, { question: query }),
    countHistograms(db, { question: query }),
  ]);
  const items = rows.map(indexItem);
  return {
    items: comparableOnly ? items : items.map(withoutAbsolutes),
    total: counted.total,
    ofAll: counted.ofAll,
    page: query.page,
    pages: Math.max(1, Math.ceil(counted.total / indexPageSize)),
    comparableOnly,
    facets: facetCounts,
    histograms: comparableOnly ? bins : withoutAbsoluteRanges(bins),
    from: "database",
  };
}
