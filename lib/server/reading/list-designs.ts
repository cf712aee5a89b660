import { publicDb } from "@/db/client/handles";
import { countBins, countEntries, countFacet, listEntries, type ListedRow } from "@/db/queries/shown/entries";
import {
  facetKeys,
  indexItemSchema,
  indexPageSize,
  rangeKeys,
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

/**
 * Answers the index's question from the database: matches, counts of every facet without its own choice, and
 * histograms. The search service answers the same question faster and forgives errors of typing; this one needs nothing
 * but the public views.
 */
export async function listDesigns(query: IndexQuery): Promise<IndexAnswer> {
  const db = publicDb();
  const [rows, counted, facetCounts, bins] = await Promise.all([
    listEntries(db, query),
    countEntries(db, query),
    Promise.all(facetKeys.map(async (facet) => [facet, await countFacet(db, { question: query, facet })] as const)),
    Promise.all(rangeKeys.map(async (range) => [range, await countBins(db, { question: query, range })] as const)),
  ]);
  return {
    items: rows.map(indexItem),
    total: counted.total,
    ofAll: counted.ofAll,
    page: query.page,
    pages: Math.max(1, Math.ceil(counted.total / indexPageSize)),
    comparableOnly: counted.comparables === 1,
    facets: Object.fromEntries(facetCounts),
    histograms: Object.fromEntries(bins),
    from: "database",
  };
}
