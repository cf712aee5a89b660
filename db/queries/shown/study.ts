import type { Knex } from "knex";
import type { StudyEntry, Uncertain } from "@/lib/domain/study/study-entry";
import type { Derivation } from "@/lib/domain/study/pairs";
import type { Handle } from "../../client/connect";

export interface StudyScope {
  /** Frame keys ("120x25") and classes ("120"); none: all. */
  frames: readonly string[];
  rotations: readonly string[];
  /** Season slugs; none: all. */
  seasons: readonly string[];
  /** These alone; all where it is left out. */
  entryIds?: readonly string[];
}

/** Whoever owned a design first is its cluster; former members share a word, so their designs stay apart. */
const designer = `case when designers[1] is null or designers[1] = 'former member' then design_id::text else designers[1] end`;

function within(db: Handle, { frames, rotations, seasons, entryIds }: StudyScope): Knex.QueryBuilder {
  const query = db("shown.entry");
  if (frames.length > 0)
    void query.whereRaw("(frame_key = any (?::text[]) or split_part(frame_key, 'x', 1) = any (?::text[]))", [
      [...frames],
      [...frames],
    ]);
  if (entryIds) void query.whereIn("entry_id", [...entryIds]);
  if (rotations.length > 0) void query.whereIn("rotation", [...rotations]);
  if (seasons.length > 0) void query.whereIn("season_slug", [...seasons]);
  return query;
}

const plain = {
  entryId: "entry_id",
  revisionId: "revision_id",
  designId: "design_id",
  seasonNumber: "season_number",
  roundNumber: "round_number",
  benchVersionId: "bench_version_id",
  protocolVersionId: "protocol_version_id",
  baselineUnitId: "baseline_unit_id",
  stages: "stages",
  counterRotating: "counter_rotating",
  bladesFirst: "blades_first",
  handFirst: "hand_first",
  inletStack: "inlet_stack",
  inletStackMm: "inlet_stack_mm",
  spacerMm: "spacer_mm",
  struts: "struts",
  shroud: "shroud",
  frameKey: "frame_key",
  material: "material",
} as const;
const maybe = {
  bladesSecond: "blades_second",
  tipGapMm: "tip_gap_mm",
  solidityMid: "solidity_mid",
  pitchMidDeg: "pitch_mid_deg",
  massG: "mass_g",
  printTimeMin: "print_time_min",
} as const;
const figures = {
  ratio: "equal_noise_ratio",
  uRatio: "u_equal_noise_ratio",
  dofRatio: "dof_equal_noise_k",
  level: "level_difference_db",
  uLevel: "u_level_difference_db",
  dofLevel: "dof_level_difference_db",
  resistance: "resistance_ratio",
  uResistance: "u_resistance_ratio",
  dofResistance: "dof_resistance_ratio",
} as const;

type Row = Pick<StudyEntry, keyof typeof plain | "designer"> &
  Record<keyof typeof maybe | "ratio" | "uRatio" | "dofRatio" | "dofLevel" | "dofResistance", number | null> &
  Record<"level" | "uLevel" | "resistance" | "uResistance", number>;

const figure = (value: number, u: number, dof: number | null): Uncertain => ({ value, u, dof: dof ?? undefined });

function entryOf(row: Row): StudyEntry {
  const { ratio, uRatio, dofRatio, level, uLevel, dofLevel, resistance, uResistance, dofResistance, ...rest } = row;
  return {
    ...rest,
    bladesSecond: row.bladesSecond ?? undefined,
    tipGapMm: row.tipGapMm ?? undefined,
    solidityMid: row.solidityMid ?? undefined,
    pitchMidDeg: row.pitchMidDeg ?? undefined,
    massG: row.massG ?? undefined,
    printTimeMin: row.printTimeMin ?? undefined,
    equalNoiseRatio: ratio === null || uRatio === null ? undefined : figure(ratio, uRatio, dofRatio),
    levelDifferenceDb: figure(level, uLevel, dofLevel),
    resistanceRatio: figure(resistance, uResistance, dofResistance),
  };
}

/** What the study reads of every public entry within the scope, in order of id. */
export async function studyEntries(db: Handle, scope: StudyScope): Promise<StudyEntry[]> {
  const rows: Row[] = await within(db, scope)
    .select({ ...plain, ...maybe, ...figures })
    .select(db.raw(`${designer} as "designer"`))
    .orderBy("entry_id");
  return rows.map(entryOf);
}

/** Names in addresses of the entries within a scope, by id. */
export async function studyNames(
  db: Handle,
  scope: StudyScope,
): Promise<{ entryId: string; slug: string; letter: string }[]> {
  return within(db, scope).select({ entryId: "entry_id", slug: "design_slug", letter: "revision_letter" });
}

/** Which public revision was made from which public one; in a stable order. */
export async function studyDerivations(db: Handle): Promise<Derivation[]> {
  return db("shown.derivation")
    .select({ revisionId: "revision_id", fromRevisionId: "from_revision_id" })
    .orderBy(["revision_id", "from_revision_id"]);
}

/** How often each frame, rotation and season occurs among all public entries. */
export async function studyChoices(
  db: Handle,
): Promise<{ frame: string; rotation: string; season: string; seasonNumber: number; title: string; count: number }[]> {
  return db("shown.study_choice")
    .select({
      frame: "frame_key",
      rotation: "rotation",
      season: "season_slug",
      seasonNumber: "season_number",
      title: "season_title",
      count: "count",
    })
    .orderBy(["season_number", "frame_key", "rotation"]);
}

/** Which state of the public a connection sees: grows with every change of it. */
export async function studyGeneration(db: Handle): Promise<number> {
  const row = await db("shown.study_generation").select("generation").first<{ generation: number } | undefined>();
  return row?.generation ?? 0;
}

export interface StoredStudy {
  generation: number;
  entries: number;
  result: unknown;
  computedAt: Date;
}

/** A stored answer, whatever state of the public it is of; undefined when there is none. */
export async function storedStudy(db: Handle, { question }: { question: string }): Promise<StoredStudy | undefined> {
  return db("shown.study_result")
    .where({ question })
    .select({ generation: "generation", entries: "entries", result: "result", computedAt: "computed_at" })
    .first<StoredStudy | undefined>();
}
