import { z } from "zod";

/**
 * The question that the index answers, as it stands in the address: facets, ranges, words, sort, page, columns. The
 * search service and the database answer the same question; this page is what they have in common.
 */
export const facets = {
  stages: { column: "stages", label: "Stages" },
  rotation: { column: "rotation", label: "Rotation" },
  blades1: { column: "blades_first", label: "Blades, first stage" },
  blades2: { column: "blades_second", label: "Blades, second stage" },
  hand: { column: "hand_first", label: "Hand" },
  inlet: { column: "inlet_stack", label: "Inlet stack" },
  spacer: { column: "spacer", label: "Spacer" },
  struts: { column: "struts", label: "Struts" },
  shroud: { column: "shroud", label: "Shroud ring" },
  frame: { column: "frame_key", label: "Frame" },
  material: { column: "material", label: "Material" },
  season: { column: "season_slug", label: "Season" },
  designer: { column: "designers", label: "Designer" },
  licence: { column: "licence", label: "Licence" },
  tone: { column: "prominent_tone", label: "Prominent tone" },
} as const;
export type FacetKey = keyof typeof facets;
export const facetKeys = Object.keys(facets) as FacetKey[];

/** Figures and traits that can be bounded and sorted by; `step` is the width of a bin of their histogram. */
export const ranges = {
  equal: {
    column: "equal_noise_k",
    u: "u_equal_noise_k",
    label: "At equal noise, against baseline",
    unit: "K",
    step: 0.5,
  },
  ratio: {
    column: "equal_noise_percent",
    u: "u_equal_noise_percent",
    label: "ΔT/P at equal noise, of baseline",
    unit: "%",
    step: 1,
  },
  cooling: {
    column: "equal_cooling_db",
    u: "u_equal_cooling_db",
    label: "At equal ΔT, against baseline",
    unit: "dB",
    step: 0.5,
  },
  level: {
    column: "level_difference_db",
    u: "u_level_difference_db",
    label: "Level against baseline, full speed",
    unit: "dB",
    step: 0.5,
  },
  loudness: { column: "loudness_sone", u: null, label: "Loudness at the microphone", unit: "sone", step: 0.5 },
  gap: { column: "tip_gap_mm", u: null, label: "Tip gap", unit: "mm", step: 0.1 },
  solidity: { column: "solidity_mid", u: null, label: "Solidity at mid-span", unit: "", step: 0.05 },
  pitch: { column: "pitch_mid_deg", u: null, label: "Pitch at mid-span", unit: "°", step: 1 },
  mass: { column: "mass_g", u: null, label: "Rotor mass", unit: "g", step: 2 },
  print: { column: "print_time_min", u: null, label: "Print time", unit: "min", step: 30 },
} as const;
export type RangeKey = keyof typeof ranges;
export const rangeKeys = Object.keys(ranges) as RangeKey[];

/**
 * What can be sorted by beside the ranges; absolute figures only where one bench, protocol and baseline is chosen.
 * `match` is how well an entry answers the words that were typed; without words it is the sort that an address without
 * one means.
 */
export const sortKeys = [...rangeKeys, "published", "name", "rank", "leveldba", "deltat", "match"] as const;
export type SortKey = (typeof sortKeys)[number];

const values = z.array(z.string().min(1).max(80)).max(60);
const bounds = z.strictObject({ low: z.number().nullable(), high: z.number().nullable() });

export const indexQuerySchema = z.strictObject({
  q: z.string().trim().max(200).default(""),
  facets: z.partialRecord(z.enum(facetKeys), values).default({}),
  ranges: z.partialRecord(z.enum(rangeKeys), bounds).default({}),
  sort: z.enum(sortKeys).default("equal"),
  descending: z.boolean().default(false),
  page: z.number().int().min(1).max(10_000).default(1),
  view: z.enum(["table", "drawings"]).default("table"),
  columns: z.array(z.string().max(40)).max(30).default([]),
});
export type IndexQuery = z.infer<typeof indexQuerySchema>;

export const indexPageSize = 20;

/** Figures that stand side by side only within one bench version, protocol and baseline unit. */
export const absoluteRanges: readonly RangeKey[] = ["equal", "loudness"];
const absoluteSorts: readonly SortKey[] = [...absoluteRanges, "leveldba", "deltat"];

/** The order that an address without one means: the best match first where words were typed, else the coolest. */
export const usualSort = (words: string): SortKey => (words === "" ? "equal" : "match");

/** The question without what can't be asked over several benches, protocols or baselines: absolute bounds go, a sort by
 * an absolute figure becomes one by the ratio. Asked over one of each, it stays as it is. */
export function settledQuery(query: IndexQuery, comparableOnly: boolean): IndexQuery {
  if (comparableOnly) return query;
  const kept = Object.entries(query.ranges).filter(([range]) => !absoluteRanges.some((each) => each === range));
  return {
    ...query,
    ranges: Object.fromEntries(kept),
    sort: absoluteSorts.includes(query.sort) ? "ratio" : query.sort,
  };
}

/** The parameters of a range's two ends: `gap-from`, `gap-to`, as a plain form sends them. */
export const endNames = (range: RangeKey) => ({ from: `${range}-from`, to: `${range}-to` });

/** A bound as an address writes it; what is no plain number bounds nothing. */
function boundOf(text: string | null): number | null {
  const plain = text?.trim().replace(",", ".") ?? "";
  return /^-?\d{1,7}(?:\.\d{1,6})?$/.test(plain) ? Number(plain) : null;
}

/**
 * Reads the address: `?blades1=7&blades1=9&gap-from=0.5&gap-to=1&sort=-level&page=2`. A part that says nothing readable is left
 * out, since an address may be old or typed by hand; it never changes what another part means.
 */
export function parseIndexQuery(params: URLSearchParams): IndexQuery {
  const words = (params.get("q") ?? "").trim().slice(0, 200);
  const sortText = params.get("sort") ?? "";
  const key = sortText.replace(/^-/, "");
  const named = sortKeys.find((each) => each === key && (each !== "match" || words !== ""));
  const page = Number(params.get("page") ?? "1");
  const chosen = Object.fromEntries(
    facetKeys.flatMap((facet) => {
      const list = [...new Set(params.getAll(facet).filter((value) => value !== "" && value.length <= 80))].slice(
        0,
        60,
      );
      return list.length > 0 ? [[facet, list]] : [];
    }),
  );
  const bounded = Object.fromEntries(
    rangeKeys.flatMap((range) => {
      const { from, to } = endNames(range);
      const parsed = { low: boundOf(params.get(from)), high: boundOf(params.get(to)) };
      return parsed.low !== null || parsed.high !== null ? [[range, parsed]] : [];
    }),
  );
  return indexQuerySchema.parse({
    q: words,
    facets: chosen,
    ranges: bounded,
    sort: named ?? usualSort(words),
    descending: named !== undefined && named !== "match" && sortText.startsWith("-"),
    page: Number.isInteger(page) && page >= 1 && page <= 10_000 ? page : 1,
    view: params.get("view") === "drawings" ? "drawings" : "table",
    columns: [...new Set(params.getAll("columns").flatMap((list) => list.split(",")))]
      .filter((name) => name !== "" && name.length <= 40)
      .slice(0, 30),
  });
}

/** Writes the address of a query, in a fixed order and without what is the default, so that one question has one address. */
export function indexAddress(query: IndexQuery): string {
  const params = new URLSearchParams();
  if (query.q) params.set("q", query.q);
  for (const facet of facetKeys)
    for (const value of [...(query.facets[facet] ?? [])].sort()) params.append(facet, value);
  for (const range of rangeKeys) {
    const bounded = query.ranges[range];
    const { from, to } = endNames(range);
    if (bounded && bounded.low !== null) params.set(from, String(bounded.low));
    if (bounded && bounded.high !== null) params.set(to, String(bounded.high));
  }
  const sort = query.q === "" && query.sort === "match" ? usualSort("") : query.sort;
  if (sort !== usualSort(query.q) || query.descending) params.set("sort", `${query.descending ? "-" : ""}${sort}`);
  if (query.view !== "table") params.set("view", query.view);
  if (query.columns.length > 0) params.set("columns", query.columns.join(","));
  if (query.page > 1) params.set("page", String(query.page));
  const text = params.toString();
  return text ? `/designs?${text}` : "/designs";
}

/** One entry as the index lists it. Figures that can't be shown side by side are null, with the reason beside them. */
export const indexItemSchema = z.strictObject({
  entryId: z.uuid(),
  slug: z.string(),
  name: z.string(),
  letter: z.string(),
  designers: z.array(z.string()),
  stages: z.number().int(),
  counterRotating: z.boolean(),
  bladesFirst: z.number().int(),
  bladesSecond: z.number().int().nullable(),
  handFirst: z.string(),
  inletStack: z.string(),
  inletStackMm: z.number(),
  spacerMm: z.number(),
  struts: z.number().int(),
  shroud: z.boolean(),
  frameKey: z.string(),
  material: z.string(),
  licence: z.string(),
  tipGapMm: z.number().nullable(),
  solidityMid: z.number().nullable(),
  pitchMidDeg: z.number().nullable(),
  massG: z.number().nullable(),
  printTimeMin: z.number().nullable(),
  seasonSlug: z.string(),
  seasonTitle: z.string(),
  roundNumber: z.number().int(),
  headlineDba: z.number(),
  equalNoiseK: z.number().nullable(),
  uEqualNoiseK: z.number().nullable(),
  equalNoisePercent: z.number().nullable(),
  uEqualNoisePercent: z.number().nullable(),
  equalNoiseWhy: z.string().nullable(),
  equalCoolingDb: z.number().nullable(),
  uEqualCoolingDb: z.number().nullable(),
  levelDifferenceDb: z.number(),
  uLevelDifferenceDb: z.number(),
  loudnessSone: z.number().nullable(),
  levelFullDba: z.number().nullable(),
  uLevelFullDb: z.number().nullable(),
  levelFullBound: z.boolean(),
  deltaTFullK: z.number().nullable(),
  uDeltaTFullK: z.number().nullable(),
  fullSetSpeed: z.number(),
  roundRank: z.number().int().nullable(),
  roundRankLow: z.number().int().nullable(),
  roundRankHigh: z.number().int().nullable(),
  roundOf: z.number().int().nullable(),
  whyNotRanked: z.string().nullable(),
  corrections: z.number().int(),
  comparable: z.string(),
});
export type IndexItem = z.infer<typeof indexItemSchema>;

/** A searched text in pieces; `hit` where it answers what was typed. Pages escape pieces before they mark them up. */
const piecesSchema = z.array(z.strictObject({ text: z.string(), hit: z.boolean() }));

/**
 * The index's answer. `highlights`, by entry and field (name, designer, letter, seasonTitle, traitWords), stand only
 * where the search service found typed words. `comparableOnly` says that all matches share bench version, protocol and baseline unit; where they
 * don't, the question was settled first (see `settledQuery`) and the absolute figures of the items are null.
 */
export const indexAnswerSchema = z.strictObject({
  items: z.array(indexItemSchema),
  total: z.number().int(),
  ofAll: z.number().int(),
  page: z.number().int(),
  pages: z.number().int(),
  comparableOnly: z.boolean(),
  facets: z.record(z.string(), z.array(z.strictObject({ value: z.string(), count: z.number().int() }))),
  histograms: z.record(z.string(), z.array(z.strictObject({ from: z.number(), count: z.number().int() }))),
  from: z.enum(["search", "database"]),
  highlights: z.record(z.string(), z.record(z.string(), piecesSchema)).optional(),
});
export type IndexAnswer = z.infer<typeof indexAnswerSchema>;
