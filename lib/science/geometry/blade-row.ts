import type { BladeBand, RadialProfile } from "./blade-bands";
import { median } from "@/lib/science/statistics/descriptive";
import { cylinderFindings, leader, splitCount, type CylinderFindings } from "./blade-count";
import { castColumns } from "./columns";
import { solidStretches } from "./column-solids";
import type { Mesh } from "./mesh";
import { outermostBetween } from "./polar";
import { rowTable, type RowTable } from "./row-table";
import { wallRadius } from "./wall-radius";

/** Blade geometry on one cylinder. */
export interface BladeStation {
  /** (r − r_hub) / (r_tip − r_hub). */
  readonly spanFraction: number;
  readonly radiusMm: number;
  /** Angle of the chord line from the plane of rotation, 0–90°. */
  readonly pitchDeg: number;
  readonly chordMm: number;
  /** B c / (2 π r). */
  readonly solidity: number;
}

/** A row of blades on one hub, in the frame of the axis. */
export interface BladeRow {
  readonly blades: number;
  readonly hand: "right" | "left";
  /** Radius of the bore in the hub; 0 for none. */
  readonly boreRadiusMm: number;
  readonly hubRadiusMm: number;
  readonly tipRadiusMm: number;
  readonly sweptRadiusMm: number;
  readonly shroud: boolean;
  /** Heights of the blades. */
  readonly fromZMm: number;
  readonly toZMm: number;
  /** Heights that belong to this row, half-way to the next one. */
  readonly zoneFromZMm: number;
  readonly zoneToZMm: number;
  readonly stations: BladeStation[];
  /** Middles of the blades at mid span, rad, rising. */
  readonly anglesRad: number[];
  readonly rootAreaMm2: number;
  readonly tipAreaMm2: number;
  /** Share of counts that agree, less where pitch, hand or size don't; 0–1. */
  readonly confidence: number;
  /** Numbers of blades that some cylinders showed, other than the one reported. */
  readonly otherCounts: number[];
}

/** A mesh in the frame of the axis, and which of its triangles turn: those of other shells have −1. */
export interface TurningPart {
  readonly mesh: Mesh;
  readonly shellOf: Int32Array;
  readonly include: (shell: number) => boolean;
  readonly tinyMm: number;
}

const SPANS_SHOWN = [0.3, 0.5, 0.75, 0.9];
const SPANS_COUNTED = [0.12, 0.2, 0.3, 0.4, 0.5, 0.6, 0.68, 0.75, 0.82, 0.9];
const REFINE_STEPS = 24;
const STATION_ROWS = 96;
const PITCH_MIN_DEG = 3;
const PITCH_MAX_DEG = 87;
const SLENDER_MIN = 1.6;
const BLADES_MAX = 60;
/** A hub without a round wall is hardly one: a blade's own thickness, seen along another axis, looks like it. */
const NO_WALL_SHARE = 0.5;
/** Blades of two lengths can be counted either way, so a person is asked. */
const SPLIT_SHARE = 0.7;
const CONFIDENCE_MIN = 0.45;

/** Looks closely at one band; undefined where it turns out to be no row of blades. */
export function bladeRow(
  part: TurningPart,
  table: RowTable,
  band: BladeBand,
  profile: RadialProfile,
  angles: number,
): BladeRow | undefined {
  const step = (table.heightsMm[1] ?? 0) - (table.heightsMm[0] ?? 0);
  const height = (row: number): number => table.heightsMm[row] ?? 0;
  const zone = { from: height(band.zoneFromRow) - step / 2, to: height(band.zoneToRow) + step / 2 };
  const reach = { from: height(band.fromRow) - step, to: height(band.toRow) + step };
  const wall = edgeRadius(part, table.radiiMm, profile.hub, profile.hub + 1, zone, angles, 1);
  const hub = wall.radiusMm;
  const bore =
    profile.bore === 0 ? 0 : edgeRadius(part, table.radiiMm, profile.bore, profile.bore - 1, zone, angles, -1).radiusMm;
  const swept = outermostBetween(part.mesh, part.shellOf, reach.from, reach.to) ?? table.radiiMm[profile.outer] ?? 0;
  const ring = profile.ring;
  const tip = ring === undefined ? swept : edgeRadius(part, table.radiiMm, ring, ring - 1, zone, angles, -1).radiusMm;
  if (!(tip > 1.08 * hub)) return undefined;
  const findings = stationFindings(part, hub, tip, reach, angles);
  return judged(findings, { bore, hub, tip, swept, zone, reach, round: wall.round, shroud: ring !== undefined });
}

/** The radius at which full circles end (hub) or begin (ring): sampled finely, then taken from the wall's vertices. */
function edgeRadius(
  part: TurningPart,
  radiiMm: Float64Array,
  fullIndex: number,
  openIndex: number,
  zone: { from: number; to: number },
  angles: number,
  facing: 1 | -1,
): { radiusMm: number; round: boolean } {
  const [full, open] = [radiiMm[fullIndex] ?? 0, radiiMm[openIndex] ?? 0];
  const [low, high] = [Math.min(full, open), Math.max(full, open)];
  const fine = Float64Array.from({ length: REFINE_STEPS }, (_, i) => low + ((i + 0.5) / REFINE_STEPS) * (high - low));
  const columns = castColumns(part.mesh, part.shellOf, { radiiMm: fine, angles });
  const solids = solidStretches(columns, part.include, part.tinyMm);
  const { fill } = rowTable(solids, zone.from, zone.to, STATION_ROWS);
  const isFull = Array.from(fine, (_, i) =>
    fill.subarray(i * STATION_ROWS, (i + 1) * STATION_ROWS).some((f) => f >= 0.98),
  );
  let edge = full;
  for (let i = 0; i < REFINE_STEPS; i++) {
    const index = facing === 1 ? i : REFINE_STEPS - 1 - i;
    if (!isFull[index]) break;
    edge = (fine[index] ?? edge) + (facing * (high - low)) / REFINE_STEPS / 2;
  }
  const wall = wallRadius(part.mesh, part.shellOf, { nearMm: edge, fromZMm: zone.from, toZMm: zone.to, facing });
  return { radiusMm: wall ?? edge, round: wall !== undefined };
}

function stationFindings(
  part: TurningPart,
  hub: number,
  tip: number,
  reach: { from: number; to: number },
  angles: number,
): CylinderFindings[] {
  const radiiMm = Float64Array.from(SPANS_COUNTED, (span) => hub + span * (tip - hub));
  const columns = castColumns(part.mesh, part.shellOf, { radiiMm, angles });
  const solids = solidStretches(columns, part.include, part.tinyMm);
  const table = rowTable(solids, reach.from, reach.to, STATION_ROWS);
  return SPANS_COUNTED.map((_, i) => cylinderFindings(solids, table, i, reach.from, reach.to));
}

interface RowBounds {
  readonly bore: number;
  readonly hub: number;
  readonly tip: number;
  readonly swept: number;
  readonly zone: { from: number; to: number };
  readonly reach: { from: number; to: number };
  /** Whether a wall goes around at the hub's radius. */
  readonly round: boolean;
  readonly shroud: boolean;
}

function judged(findings: CylinderFindings[], bounds: RowBounds): BladeRow | undefined {
  const votes = new Map<number, number>();
  for (const { byPieces, byRuns } of findings) {
    for (const count of [byPieces, byRuns]) if (count !== undefined) votes.set(count, (votes.get(count) ?? 0) + 1);
  }
  const split = splitCount(findings);
  const winner = split ? { value: split.long, share: SPLIT_SHARE } : leader(votes);
  if (!winner || winner.value < 2 || winner.value > BLADES_MAX) return undefined;
  const blades = winner.value;
  const agreeing = findings.filter((f) => f.byPieces === blades);
  const measured = (agreeing.length > 0 ? agreeing : findings).filter((f) => f.sections.length >= 2);
  const sections = measured.flatMap((f) => f.sections);
  const bladelike = sections.filter(
    (s) =>
      Math.abs(s.slopeDeg) > PITCH_MIN_DEG &&
      Math.abs(s.slopeDeg) < PITCH_MAX_DEG &&
      s.chordMm > SLENDER_MIN * s.heightMm,
  );
  const rising = bladelike.filter((s) => s.slopeDeg > 0).length;
  const handShare = bladelike.length === 0 ? 0 : Math.max(rising, bladelike.length - rising) / bladelike.length;
  const bladeShare = sections.length === 0 ? 0 : bladelike.length / sections.length;
  const missing =
    1 - findings.filter((f) => f.byPieces !== undefined || f.byRuns !== undefined).length / findings.length;
  const round = bounds.round ? 1 : NO_WALL_SHARE;
  const confidence = round * winner.share * handShare ** 2 * bladeShare * sameness(measured) * (1 - missing);
  if (bladeShare < 0.5 || handShare < 0.75 || confidence < CONFIDENCE_MIN) return undefined;
  const inner = measured[0];
  const outerStation = measured[measured.length - 1];
  const middle = measured.reduce((a, b) =>
    Math.abs(b.radiusMm - bounds.tip / 2 - bounds.hub / 2) < Math.abs(a.radiusMm - bounds.tip / 2 - bounds.hub / 2)
      ? b
      : a,
  );
  const area = (f: CylinderFindings | undefined): number => median((f?.sections ?? []).map((s) => s.areaMm2)) ?? 0;
  return {
    blades,
    hand: rising * 2 > bladelike.length ? "right" : "left",
    boreRadiusMm: bounds.bore,
    hubRadiusMm: bounds.hub,
    tipRadiusMm: bounds.tip,
    sweptRadiusMm: bounds.swept,
    shroud: bounds.shroud,
    fromZMm: bounds.reach.from,
    toZMm: bounds.reach.to,
    zoneFromZMm: bounds.zone.from,
    zoneToZMm: bounds.zone.to,
    stations: SPANS_SHOWN.map((span) => station(measured, blades, span, bounds)),
    anglesRad: middle.sections.map((s) => s.angleRad).sort((a, b) => a - b),
    rootAreaMm2: area(inner),
    tipAreaMm2: area(outerStation),
    confidence,
    otherCounts: [...votes.keys()].filter((count) => count !== blades).sort((a, b) => a - b),
  };
}

/** 1 where the blades of each cylinder are of one size, down to 0.3 where they are of any size. */
function sameness(findings: readonly CylinderFindings[]): number {
  const spreads = findings.map((f) => {
    const typical = median(f.sections.map((s) => s.chordMm)) ?? 0;
    const off = median(f.sections.map((s) => Math.abs(s.chordMm - typical))) ?? 0;
    return typical > 0 ? off / typical : 1;
  });
  return 1 - Math.min(0.7, Math.max(0, 2 * ((median(spreads) ?? 1) - 0.05)));
}

/** Blade geometry at a span, read on that cylinder or, where the count failed there, between its neighbours. */
function station(
  findings: readonly CylinderFindings[],
  blades: number,
  spanFraction: number,
  bounds: RowBounds,
): BladeStation {
  const radiusMm = bounds.hub + spanFraction * (bounds.tip - bounds.hub);
  const read = (pick: (f: CylinderFindings) => number): number => {
    const below = [...findings].reverse().find((f) => f.radiusMm <= radiusMm + 1e-9);
    const above = findings.find((f) => f.radiusMm >= radiusMm - 1e-9);
    const [a, b] = [below ?? above, above ?? below];
    if (!a || !b) return NaN;
    const share = b.radiusMm > a.radiusMm ? (radiusMm - a.radiusMm) / (b.radiusMm - a.radiusMm) : 0;
    return pick(a) + share * (pick(b) - pick(a));
  };
  const pitchDeg = read((f) => median(f.sections.map((s) => Math.abs(s.slopeDeg))) ?? NaN);
  const chordMm = read((f) => median(f.sections.map((s) => s.chordMm)) ?? NaN);
  return { spanFraction, radiusMm, pitchDeg, chordMm, solidity: (blades * chordMm) / (2 * Math.PI * radiusMm) };
}
