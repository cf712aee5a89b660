import type { Handle } from "../../client/connect";

export interface SheetDesignRow {
  id: string;
  number: number;
  slug: string;
  name: string;
  summary: string;
  designers: string[] | null;
}

/** A design that is public, by its address. */
export async function shownDesign(db: Handle, { slug }: { slug: string }): Promise<SheetDesignRow | undefined> {
  return db("shown.design").where({ slug }).first("id", "number", "slug", "name", "summary", "designers");
}

export interface SheetEntryRow {
  entryId: string;
  publicationId: string;
  revisionId: string;
  letter: string;
  seasonId: string;
  seasonSlug: string;
  seasonTitle: string;
  seasonNumber: number;
  roundId: string;
  roundNumber: number;
  benchVersionId: string;
  protocolVersionId: string;
  baselineUnitId: string;
  methodVersion: number;
  publishedAt: Date;
  firstPublishedAt: Date;
  corrections: number;
  headlineDba: number;
  equalNoisePercent: number | null;
  levelDifferenceDb: number;
  resistanceRatio: number;
  roundRank: number | null;
  roundRankLow: number | null;
  roundRankHigh: number | null;
  roundOf: number | null;
  seasonRank: number | null;
  seasonRankLow: number | null;
  seasonRankHigh: number | null;
  seasonOf: number | null;
  whyNotRanked: string | null;
  benchName: string;
  benchNumber: number;
}

const entryColumns = {
  entryId: "e.entry_id",
  publicationId: "e.publication_id",
  revisionId: "e.revision_id",
  letter: "e.revision_letter",
  seasonId: "e.season_id",
  seasonSlug: "e.season_slug",
  seasonTitle: "e.season_title",
  seasonNumber: "e.season_number",
  roundId: "e.round_id",
  roundNumber: "e.round_number",
  benchVersionId: "e.bench_version_id",
  protocolVersionId: "e.protocol_version_id",
  baselineUnitId: "e.baseline_unit_id",
  methodVersion: "e.method_version",
  publishedAt: "e.published_at",
  firstPublishedAt: "e.first_published_at",
  corrections: "e.corrections",
  headlineDba: "e.headline_dba",
  equalNoisePercent: "e.equal_noise_percent",
  levelDifferenceDb: "e.level_difference_db",
  resistanceRatio: "e.resistance_ratio",
  roundRank: "e.round_rank",
  roundRankLow: "e.round_rank_low",
  roundRankHigh: "e.round_rank_high",
  roundOf: "e.round_of",
  seasonRank: "e.season_rank",
  seasonRankLow: "e.season_rank_low",
  seasonRankHigh: "e.season_rank_high",
  seasonOf: "e.season_of",
  whyNotRanked: "e.why_not_ranked",
  benchName: "b.bench_name",
  benchNumber: "b.number",
};

/** Every public entry of a design, the newest first. */
export async function shownEntriesOfDesign(db: Handle, { designId }: { designId: string }): Promise<SheetEntryRow[]> {
  return db("shown.entry as e")
    .join("shown.bench_version as b", "b.id", "e.bench_version_id")
    .where("e.design_id", designId)
    .orderBy([{ column: "e.season_number", order: "desc" }, { column: "e.round_number", order: "desc" }, "e.entry_id"])
    .select(entryColumns);
}

/** The public entries with these ids, for laying over each other; any order, those not public left out. */
export async function shownEntriesByIds(
  db: Handle,
  { entryIds }: { entryIds: readonly string[] },
): Promise<(SheetEntryRow & { designSlug: string; designName: string })[]> {
  return db("shown.entry as e")
    .join("shown.bench_version as b", "b.id", "e.bench_version_id")
    .whereIn("e.entry_id", [...entryIds])
    .select({ ...entryColumns, designSlug: "e.design_slug", designName: "e.design_name" });
}

export interface PublicationRow {
  id: string;
  entryId: string;
  number: number;
  snapshot: unknown;
  sha256: string;
  publishedAt: Date;
  current: boolean;
}

/** Publications by entry, the newest first; superseded ones are public too. */
export async function shownPublications(
  db: Handle,
  { entryIds }: { entryIds: readonly string[] },
): Promise<PublicationRow[]> {
  return db("shown.publication")
    .whereIn("entry_id", [...entryIds])
    .orderBy([{ column: "entry_id" }, { column: "number", order: "desc" }])
    .select({
      id: "id",
      entryId: "entry_id",
      number: "number",
      snapshot: "snapshot",
      sha256: "sha256",
      publishedAt: "published_at",
      current: "current",
    });
}

export interface TraitRow {
  revision_id: string;
  stages: number;
  counter_rotating: boolean;
  spacer_mm: number;
  inlet_stack: string;
  inlet_stack_mm: number;
  struts: number;
  frame_key: string;
  tip_gap_mm: number | null;
  material: string;
  print_time_min: number | null;
  holds: Record<string, unknown>;
}

export interface RotorRow {
  revision_id: string;
  position: number;
  blades: number;
  hand: string;
  hub_diameter_mm: number | null;
  tip_diameter_mm: number | null;
  swept_diameter_mm: number | null;
  axial_depth_mm: number | null;
  pitch_mid_deg: number | null;
  chord_mid_mm: number | null;
  solidity_mid: number | null;
  shroud: boolean;
  unequal_spacing: boolean;
  mass_g: number | null;
  holds: Record<string, unknown>;
}

export interface RevisionRow {
  id: string;
  letter: string;
  licence: string;
  changes: string;
  print_notes: string;
}

/** Traits, rotors and notes of public revisions. */
export async function shownRevisions(
  db: Handle,
  { revisionIds }: { revisionIds: readonly string[] },
): Promise<{ revisions: RevisionRow[]; traits: TraitRow[]; rotors: RotorRow[] }> {
  const ids = [...revisionIds];
  const [revisions, traits, rotors] = await Promise.all([
    db("shown.revision")
      .whereIn("id", ids)
      .orderBy("letter")
      .select<RevisionRow[]>("id", "letter", "licence", "changes", "print_notes"),
    db("shown.revision_trait").whereIn("revision_id", ids).select<TraitRow[]>("*"),
    db("shown.rotor").whereIn("revision_id", ids).orderBy(["revision_id", "position"]).select<RotorRow[]>("*"),
  ]);
  return { revisions, traits, rotors };
}

export interface BaselineUnitRow {
  unitId: string;
  serial: string;
  slug: string;
  name: string;
  retiredAt: Date | null;
}

/** Baseline units by id, with the baseline they are a copy of. */
export async function shownBaselineUnits(
  db: Handle,
  { unitIds }: { unitIds: readonly string[] },
): Promise<BaselineUnitRow[]> {
  return db("shown.baseline_unit as u")
    .join("shown.baseline as b", "b.id", "u.baseline_id")
    .whereIn("u.id", [...unitIds])
    .select({ unitId: "u.id", serial: "u.serial", slug: "b.slug", name: "b.name", retiredAt: "u.retired_at" });
}

export interface CorrectionRow {
  number: number;
  what: string;
  why: string;
  publishedAt: Date;
  entryId: string;
}

/** Published corrections that touched these entries, the newest first. */
export async function shownCorrections(
  db: Handle,
  { entryIds }: { entryIds: readonly string[] },
): Promise<CorrectionRow[]> {
  return db("shown.correction_publication as p")
    .join("shown.correction as c", "c.id", "p.correction_id")
    .whereIn("p.entry_id", [...entryIds])
    .orderBy("c.number", "desc")
    .select({ number: "c.number", what: "c.what", why: "c.why", publishedAt: "c.published_at", entryId: "p.entry_id" });
}

export interface QuestionRow {
  entryId: string;
  figure: string;
  body: string;
  answer: string;
  answeredAt: Date;
  byHandle: string;
}

/** Answered questions on these entries, the newest first. */
export async function shownQuestions(
  db: Handle,
  { entryIds }: { entryIds: readonly string[] },
): Promise<QuestionRow[]> {
  return db("shown.question")
    .whereIn("entry_id", [...entryIds])
    .orderBy("answered_at", "desc")
    .select({
      entryId: "entry_id",
      figure: "figure",
      body: "body",
      answer: "answer",
      answeredAt: "answered_at",
      byHandle: "by_handle",
    });
}
