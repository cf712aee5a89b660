import { v7 as uuidv7 } from "uuid";
import type { DemoDesign, DemoEntry, DemoRevision } from "@/db/seeds/demo/world";
import { snapshotSchema, type Snapshot } from "@/lib/contracts/publication";
import type { Random } from "@/lib/science/statistics/random";
import { digestOf } from "@/lib/server/publishing/digest";
import { publishedRow } from "@/lib/server/publishing/published-row";
import type { FieldBench } from "./bench";
import { drawFigures } from "./figures";
import { rankRows } from "./ranks";

type Row = Record<string, unknown>;
export type Rows = Record<string, Row[]>;

/** Designs and revisions that earlier seasons already wrote. */
export interface Written {
  designs: Map<DemoDesign, string>;
  revisions: Map<DemoRevision, string>;
}

export interface FieldSeason {
  number: number;
  opensAt: Date;
  rounds: { number: number; entries: DemoEntry[] }[];
}

const day = 86_400_000;
const levelsDba = [40, 46, 52];
const headlineDba = 46;

/** Ids that are the same in every run: of the season's hour and of the generator's bits. */
function idMaker(random: Random, at: Date): () => string {
  let msecs = at.getTime();
  return () => {
    msecs += 1;
    const bytes = new Uint8Array(16);
    for (let n = 0; n < 16; n += 4) new DataView(bytes.buffer).setUint32(n, random.word());
    return uuidv7({ msecs, random: bytes });
  };
}

/** All rows of one season, by table, in the order in which they can be inserted. */
export function seasonRows(random: Random, bench: FieldBench, written: Written, season: FieldSeason): Rows {
  const id = idMaker(random, season.opensAt);
  const versionAt = season.number % bench.versions.length;
  const version = bench.versions[versionAt];
  const protocolVersionId = bench.protocolVersionIds[versionAt];
  const baselineUnitId = bench.baselineUnitIds[Math.floor(season.number / 2) % bench.baselineUnitIds.length];
  if (!version || !protocolVersionId || !baselineUnitId) throw new Error("the bench of the demo is incomplete");
  const seasonId = id();
  const rows: Rows = Object.fromEntries(tables.map((table) => [table, []]));
  const add = (table: (typeof tables)[number], row: Row): void => void rows[table]?.push(row);
  add("season", {
    ...{ id: seasonId, number: season.number, slug: `season-${season.number}`, title: `Season ${season.number}` },
    ...{ summary: "A filled-in season of the Alder Bench: invented, without readings.", rules: "As in the demo." },
    ...{ protocol_version_id: protocolVersionId, scoring_rule_version_id: bench.ruleVersionId },
    ...{ levels_dba: levelsDba, headline_dba: headlineDba, total_depth_max_mm: 90, inlet_stack_max_mm: 30 },
    ...{ opens_at: season.opensAt, closes_at: new Date(season.opensAt.getTime() + 40 * day) },
    ...{ opened_at: season.opensAt, closed_at: new Date(season.opensAt.getTime() + 40 * day) },
  });
  const inSeason = { season_id: seasonId, from_at: season.opensAt };
  add("season_bench", { ...inSeason, bench_version_id: version.id, budget_version_id: version.budgetId, reason: "" });
  add("season_baseline", { ...inSeason, baseline_unit_id: baselineUnitId });
  const published: Row[] = [];
  for (const round of season.rounds) {
    const roundId = id();
    const sessionId = id();
    const at = new Date(season.opensAt.getTime() + (10 + 8 * round.number) * day);
    add("round", {
      ...{ id: roundId, season_id: seasonId, number: round.number, title: `Round ${round.number}` },
      ...{ state: "published", publish_at: at, published_at: at },
    });
    add("session", {
      ...{ id: sessionId, bench_id: bench.benchId, bench_version_id: version.id, budget_version_id: version.budgetId },
      ...{ protocol_version_id: protocolVersionId, baseline_unit_id: baselineUnitId, round_id: roundId },
      ...{
        operator_id: bench.operatorId,
        purpose: "round",
        checklist: {},
        note: "Filled in for the demo.",
        version: 1,
      },
      ...{ began_at: new Date(at.getTime() - 2 * day), ended_at: new Date(at.getTime() - 2 * day + day / 4) },
    });
    add("filled_session", { session_id: sessionId, at });
    const inRound: Row[] = [];
    for (const { design, revision } of round.entries) {
      const ids = designRows(add, id, bench, written, { design, revision, at: season.opensAt });
      const entryId = id();
      const publicationId = id();
      add("entry", {
        ...{ id: entryId, revision_id: ids.revisionId, season_id: seasonId, state: "published", state_at: at },
        ...{ ever_published: true, created_at: season.opensAt },
      });
      add("round_entry", { round_id: roundId, entry_id: entryId, attempt: 1, added_at: season.opensAt });
      const { loudnessSone, ...figures } = drawFigures(random, revision.fan, levelsDba, headlineDba);
      const snapshot: Snapshot = {
        ...{ schemaVersion: 1, entryId, ...ids, seasonId, roundId, sessionId, benchVersionId: version.id },
        ...{ protocolVersionId, budgetVersionId: version.budgetId, baselineUnitId, ruleVersionId: bench.ruleVersionId },
        ...{ methodVersion: bench.methodVersion, ownerIds: [ids.ownerId], specimenIds: [], microphoneDistanceMm: 100 },
        ...{ levelsDba, headlineDba, ...figures, budget: [], notes: [], leftOutRuns: [] },
      };
      const { ownerId: _owner, ...frozen } = snapshot as Snapshot & { ownerId: string };
      const sha256 = digestOf(frozen);
      add("publication", {
        ...{ id: publicationId, entry_id: entryId, number: 1, round_id: roundId, snapshot: frozen, schema_version: 1 },
        ...{ sha256, method_version: bench.methodVersion, published_at: at },
      });
      add("publication_session", { publication_id: publicationId, entry_id: entryId, session_id: sessionId });
      const row = {
        ...publishedRow({ publicationId, snapshot: frozen, traits: listedTraits(revision), at }),
        ...{ corrections: 0, loudness_sone: loudnessSone, prominent_tone: random.uniform() < 0.3 },
      };
      inRound.push(row);
    }
    const [some] = rows.publication ?? [];
    if (some) snapshotSchema.parse(some.snapshot);
    rankRows(inRound, "round");
    published.push(...inRound);
    addStanding(add, id(), bench, { seasonId, roundId, at, rows: inRound, kind: "round" });
  }
  rankRows(published, "season");
  const last = new Date(season.opensAt.getTime() + 42 * day);
  addStanding(add, id(), bench, { seasonId, roundId: null, at: last, rows: published, kind: "season" });
  rows.published_entry = published;
  return rows;
}

export const tables = [
  ...([
    "season",
    "season_bench",
    "season_baseline",
    "round",
    "session",
    "filled_session",
    "design",
    "design_owner",
    "revision",
  ] as const),
  ...(["revision_trait", "rotor", "derivation", "entry", "round_entry", "publication", "publication_session"] as const),
  ...(["published_entry", "standing", "standing_row"] as const),
] as const;

type Add = (table: (typeof tables)[number], row: Row) => void;

function designRows(
  add: Add,
  id: () => string,
  bench: FieldBench,
  written: Written,
  { design, revision, at }: DemoEntry & { at: Date },
): { designId: string; revisionId: string; ownerId: string } {
  const known = written.designs.get(design);
  const designId = known ?? id();
  // The design's own id chooses the owner, so that its later revisions have the same one.
  const owner = bench.designers[Number.parseInt(designId.slice(-6), 16) % bench.designers.length];
  if (!owner) throw new Error("the demo has no designers");
  if (known === undefined) {
    written.designs.set(design, designId);
    const slug = `${design.slug}-${designId.slice(-8)}`;
    const summary = "Invented for the demo.";
    add("design", { id: designId, slug, name: design.name, summary, created_by: owner.id, created_at: at });
    add("design_owner", { id: id(), design_id: designId, person_id: owner.id, from_at: at });
  }
  const revisionId = id();
  const { fan } = revision;
  written.revisions.set(revision, revisionId);
  add("revision", {
    ...{ id: revisionId, design_id: designId, letter: revision.letter, licence: revision.licence },
    ...{ changes: revision.changes, print_notes: "0.16 mm layers, 4 walls.", created_at: at, sent_in_at: at },
  });
  add("revision_trait", {
    ...{ revision_id: revisionId, stages: fan.rotors.length, counter_rotating: fan.counterRotating },
    ...{ spacer_mm: fan.spacerMm, inlet_stack: fan.inletStack, inlet_stack_mm: fan.inletStackMm, struts: fan.struts },
    ...{ frame_id: bench.frames.get(revision.frameKey), tip_gap_mm: fan.tipGapMm, material: revision.material },
    ...{ print_time_min: revision.printTimeMin, traits_read: {}, traits_declared: {}, holds: {} },
  });
  for (const [n, rotor] of fan.rotors.entries()) {
    add("rotor", {
      ...{ revision_id: revisionId, position: n + 1, blades: rotor.blades, hand: rotor.hand, shroud: rotor.shroud },
      ...{ hub_diameter_mm: rotor.hubDiameterMm, tip_diameter_mm: rotor.tipDiameterMm },
      ...{ axial_depth_mm: rotor.axialDepthMm, pitch_mid_deg: rotor.pitchMidDeg, chord_mid_mm: rotor.chordMidMm },
      ...{ solidity_mid: rotor.solidityMid, mass_g: rotor.massG, unequal_spacing: false },
      ...{ traits_read: {}, traits_declared: {}, holds: {} },
    });
  }
  const before = design.revisions[design.revisions.indexOf(revision) - 1];
  const from = before && written.revisions.get(before);
  if (from) add("derivation", { revision_id: revisionId, from_revision_id: from, note: revision.changes });
  return { designId, revisionId, ownerId: owner.id };
}

function listedTraits({ fan, ...revision }: DemoRevision) {
  const [first, second] = fan.rotors;
  if (!first) throw new RangeError("a fan has a rotor");
  return {
    stages: fan.rotors.length,
    counter_rotating: fan.counterRotating,
    blades_first: first.blades,
    blades_second: second?.blades ?? null,
    hand_first: first.hand,
    inlet_stack: fan.inletStack,
    inlet_stack_mm: fan.inletStackMm,
    spacer_mm: fan.spacerMm,
    struts: fan.struts,
    shroud: fan.rotors.some((rotor) => rotor.shroud),
    frame_key: revision.frameKey,
    material: revision.material,
    licence: revision.licence,
    tip_gap_mm: fan.tipGapMm,
    solidity_mid: first.solidityMid,
    pitch_mid_deg: first.pitchMidDeg,
    mass_g: Number(fan.rotors.reduce((sum, rotor) => sum + rotor.massG, 0).toFixed(1)),
    print_time_min: revision.printTimeMin,
  };
}

interface StandingOf {
  seasonId: string;
  roundId: string | null;
  at: Date;
  rows: readonly Row[];
  kind: "round" | "season";
}

function addStanding(
  add: Add,
  standingId: string,
  bench: FieldBench,
  { seasonId, roundId, at, rows, kind }: StandingOf,
) {
  add("standing", {
    ...{ id: standingId, season_id: seasonId, round_id: roundId, rule_version_id: bench.ruleVersionId, number: 1 },
    ...{ as_of: at, draws: 1, seed: 1, method_version: bench.methodVersion },
  });
  for (const row of rows) {
    add("standing_row", {
      ...{ standing_id: standingId, entry_id: row.entry_id, score: row.score, u_score: row.u_score },
      ...{ rank: row[`${kind}_rank`], rank_low: row[`${kind}_rank_low`], rank_high: row[`${kind}_rank_high`] },
      ...{ p_first: null, letters: null, why_not_ranked: row.why_not_ranked },
    });
  }
}
