import {
  facetKeys,
  facets,
  indexPageSize,
  rangeKeys,
  ranges,
  type FacetKey,
  type IndexQuery,
  type SortKey,
} from "@/lib/contracts/index-query";
import type { Knex } from "knex";
import type { Handle } from "../../client/connect";

const listed = {
  entryId: "entry_id",
  slug: "design_slug",
  name: "design_name",
  letter: "revision_letter",
  designers: "designers",
  stages: "stages",
  counterRotating: "counter_rotating",
  bladesFirst: "blades_first",
  bladesSecond: "blades_second",
  handFirst: "hand_first",
  inletStack: "inlet_stack",
  inletStackMm: "inlet_stack_mm",
  spacerMm: "spacer_mm",
  struts: "struts",
  shroud: "shroud",
  frameKey: "frame_key",
  material: "material",
  licence: "licence",
  tipGapMm: "tip_gap_mm",
  solidityMid: "solidity_mid",
  pitchMidDeg: "pitch_mid_deg",
  massG: "mass_g",
  printTimeMin: "print_time_min",
  seasonSlug: "season_slug",
  seasonTitle: "season_title",
  roundNumber: "round_number",
  headlineDba: "headline_dba",
  equalNoiseK: "equal_noise_k",
  uEqualNoiseK: "u_equal_noise_k",
  dofEqualNoise: "dof_equal_noise_k",
  equalNoisePercent: "equal_noise_percent",
  uEqualNoisePercent: "u_equal_noise_percent",
  equalNoiseWhy: "equal_noise_why",
  equalCoolingDb: "equal_cooling_db",
  uEqualCoolingDb: "u_equal_cooling_db",
  dofEqualCooling: "dof_equal_cooling_db",
  levelDifferenceDb: "level_difference_db",
  uLevelDifferenceDb: "u_level_difference_db",
  dofLevelDifference: "dof_level_difference_db",
  loudnessSone: "loudness_sone",
  levelFullDba: "level_full_dba",
  uLevelFullDb: "u_level_full_db",
  dofLevelFull: "dof_level_full_db",
  levelFullBound: "level_full_bound",
  deltaTFullK: "delta_t_full_k",
  uDeltaTFullK: "u_delta_t_full_k",
  dofDeltaTFull: "dof_delta_t_full_k",
  fullSetSpeed: "full_set_speed",
  roundRank: "round_rank",
  roundRankLow: "round_rank_low",
  roundRankHigh: "round_rank_high",
  roundOf: "round_of",
  whyNotRanked: "why_not_ranked",
  corrections: "corrections",
  benchVersionId: "bench_version_id",
  protocolVersionId: "protocol_version_id",
  baselineUnitId: "baseline_unit_id",
} as const;

const sortColumns: Record<Exclude<SortKey, keyof typeof ranges | "match">, string> = {
  published: "published_at",
  name: "lower(design_name)",
  rank: "round_rank",
  leveldba: "level_full_dba",
  deltat: "delta_t_full_k",
};

const sortColumn = (key: SortKey): string =>
  key in ranges ? ranges[key as keyof typeof ranges].column : sortColumns[key as keyof typeof sortColumns];

/**
 * Words must all be in the name, the season's title, a designer's handle, the inlet stack or the material; errors of typing are the
 * search service's to forgive.
 */
function addWords(query: Knex.QueryBuilder, words: string): void {
  for (const word of words.split(/\s+/).filter(Boolean).slice(0, 10)) {
    const like = `%${word.replace(/[\\%_]/g, "\\$&")}%`;
    query.where((either) => {
      void either
        .whereILike("design_name", like)
        .orWhereILike("season_title", like)
        .orWhereILike("material", like)
        .orWhereILike("inlet_stack", like)
        .orWhereRaw("design_id in (select d.design_id from shown.designer d where d.handle ilike ?)", [like]);
    });
  }
}

function addFacet(query: Knex.QueryBuilder, facet: FacetKey, values: readonly string[]): void {
  const { column } = facets[facet];
  if (facet === "designer")
    void query.whereRaw("design_id in (select d.design_id from shown.designer d where d.handle = any (?::text[]))", [
      [...values],
    ]);
  else void query.whereRaw(`??::text = any (?::text[])`, [column, [...values]]);
}

/** Names that are what was typed first, then those that begin so, then the rest; each by the figure, coolest first. */
function addBestMatch(query: Knex.QueryBuilder, words: string): void {
  void query.orderByRaw("lower(design_name) = lower(?) desc, starts_with(lower(design_name), lower(?)) desc", [
    words,
    words,
  ]);
  void query.orderByRaw(`${ranges.equal.column} nulls last`);
}

/** Everything that the question asks but the facet or range that is being counted. */
export function asked(db: Handle, question: IndexQuery, without?: string): Knex.QueryBuilder {
  const query = db("shown.entry");
  addWords(query, question.q);
  for (const facet of facetKeys) {
    const values = question.facets[facet];
    if (values && values.length > 0 && facet !== without) addFacet(query, facet, values);
  }
  for (const range of rangeKeys) {
    const bounds = question.ranges[range];
    if (!bounds || range === without) continue;
    if (bounds.low !== null) void query.where(ranges[range].column, ">=", bounds.low);
    if (bounds.high !== null) void query.where(ranges[range].column, "<=", bounds.high);
  }
  return query;
}

export type ListedRow = { [K in keyof typeof listed]: unknown };

/** One page of matches; ties are broken by id so that paging is stable; what has no value comes last. */
export async function listEntries(db: Handle, question: IndexQuery): Promise<ListedRow[]> {
  const direction = question.descending ? "desc" : "asc";
  return asked(db, question)
    .select(listed)
    .modify((query) => {
      if (question.sort === "match") addBestMatch(query, question.q);
      else void query.orderByRaw(`${sortColumn(question.sort)} ${direction} nulls last`);
    })
    .orderBy("entry_id")
    .limit(indexPageSize)
    .offset((question.page - 1) * indexPageSize);
}

/** Rows by id, in the order of the ids; ids that are not public now are left out. */
export async function entriesByIds(db: Handle, { entryIds }: { entryIds: readonly string[] }): Promise<ListedRow[]> {
  const rows: (ListedRow & { entryId: string })[] = await db("shown.entry")
    .select(listed)
    .whereIn("entry_id", [...entryIds]);
  const byId = new Map(rows.map((row) => [row.entryId, row]));
  return entryIds.flatMap((id) => byId.get(id) ?? []);
}

/** How many match, how many there are, and over how many benches, protocols and baseline units the matches spread. */
export async function countEntries(
  db: Handle,
  question: IndexQuery,
): Promise<{ total: number; ofAll: number; comparables: number }> {
  const [matches, all] = await Promise.all([
    asked(db, question)
      .select(
        db.raw("count(*)::int as total"),
        db.raw("count(distinct (bench_version_id, protocol_version_id, baseline_unit_id))::int as comparables"),
      )
      .first<{ total: number; comparables: number } | undefined>(),
    db("shown.total").first<{ entries: number } | undefined>("entries"),
  ]);
  return { total: matches?.total ?? 0, comparables: matches?.comparables ?? 0, ofAll: all?.entries ?? 0 };
}
