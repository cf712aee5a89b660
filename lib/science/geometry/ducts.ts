import type { AxisFinding } from "./axis-search";
import { castColumns } from "./columns";
import { solidStretches } from "./column-solids";
import { outerRadius } from "./polar";
import { rowTable } from "./row-table";
import { standingShells } from "./struts";

/** How a duct's inside runs from the rotors outwards: of one width, widening in a curve, or along a straight slope. */
export type DuctKind = "straight" | "bellmouth" | "cone";

/** A tube about the axis that stands still, in the frame of the axis. */
export interface Duct {
  readonly fromMm: number;
  readonly toMm: number;
  /** Radii of its inside at heights spread evenly over its length, rising. */
  readonly insideMm: readonly number[];
  /** Share of the heights at which it closes around an open middle, 0–1. */
  readonly closed: number;
}

const ROWS = 40;
const RADII = 160;
const ANGLES = 144;
const FULL = 0.98;
const CLOSED_MIN = 0.8;
/** A duct whose inside widens by less than this share of its radius is straight (house limit). */
const STRAIGHT_SHARE = 0.03;
/** Sag of a widening duct's inside under its chord, as a share of the widening, from which it is a curve (house limit). */
const CURVE_SHARE = 0.15;

/**
 * Tubes and cones of revolution about the axis that belong to no row of blades: a circle closes at most of their
 * heights, with nothing inside it. Frames (square outside) and struts are none.
 */
export function findDucts(finding: AxisFinding): Duct[] {
  const { mesh, search } = finding;
  const standing = standingShells(finding);
  const bodies = new Map<number, Set<number>>();
  search.overlaps.bodyOf.forEach((body, shell) => {
    if (standing.has(shell)) bodies.set(body, (bodies.get(body) ?? new Set<number>()).add(shell));
  });
  return [...bodies.values()].flatMap((shells) => {
    const own = search.shellOf.map((shell) => (shells.has(shell) ? shell : -1));
    const outer = outerRadius(mesh, own);
    const [fromMm, toMm] = heights(finding, own);
    if (!(outer > 0) || !(toMm > fromMm)) return [];
    const radiiMm = Float64Array.from({ length: RADII }, (_, i) => ((i + 0.5) / RADII) * outer);
    const solids = solidStretches(castColumns(mesh, own, { radiiMm, angles: ANGLES }), (s) => shells.has(s), 0);
    const { fill } = rowTable(solids, fromMm, toMm, ROWS);
    const insideMm: number[] = [];
    for (let j = 0; j < ROWS; j++) {
      const first = radiiMm.findIndex((_, i) => (fill[i * ROWS + j] ?? 0) > 0);
      const full = radiiMm.findIndex((_, i) => (fill[i * ROWS + j] ?? 0) >= FULL);
      // A polygon's corners lie a little farther out than the middles of its sides.
      if (full > 2 && full - first <= 2) insideMm.push(radiiMm[full] ?? 0);
    }
    const closed = insideMm.length / ROWS;
    return closed < CLOSED_MIN ? [] : [{ fromMm, toMm, insideMm, closed }];
  });
}

function heights({ mesh }: AxisFinding, own: Int32Array): [number, number] {
  let [low, high] = [Infinity, -Infinity];
  for (let i = 0; i < mesh.triangles.length; i++) {
    if ((own[(i / 3) | 0] ?? -1) < 0) continue;
    const z = mesh.positions[3 * (mesh.triangles[i] ?? 0) + 2] ?? 0;
    if (z < low) low = z;
    if (z > high) high = z;
  }
  return [low, high];
}

/**
 * What a duct is, seen from the end next to the rotors (`first`: the lower one) to its free end, with a confidence 0–1
 * that falls near the limits between kinds. A quarter circle sags by 0.37 of its widening at mid length, a cone by none.
 */
export function ductKind(duct: Duct, nextTo: "lower" | "upper"): { kind: DuctKind; confidence: number } {
  const inside = nextTo === "lower" ? duct.insideMm : [...duct.insideMm].reverse();
  const [near, far] = [inside[0] ?? 0, inside[inside.length - 1] ?? 0];
  const middle = inside[inside.length >> 1] ?? 0;
  const spread = (Math.max(...inside) - Math.min(...inside)) / near;
  const sure = (value: number, limit: number): number => Math.min(1, Math.abs(value - limit) / limit);
  if (spread < STRAIGHT_SHARE) return { kind: "straight", confidence: duct.closed * sure(spread, STRAIGHT_SHARE) };
  const sag = far > near ? ((near + far) / 2 - middle) / (far - near) : 0;
  const confidence = duct.closed * sure(spread, STRAIGHT_SHARE) * sure(Math.max(0, sag), CURVE_SHARE);
  return { kind: sag > CURVE_SHARE ? "bellmouth" : "cone", confidence };
}
