import type { Mesh } from "./mesh";
import { polarOf, radialSpans } from "./polar";

/** Lines parallel to z at radii r and angles θ about the z axis: line number = radius number × angles + angle number. */
export interface ColumnGrid {
  /** Rising radii, mm. */
  readonly radiiMm: Float64Array;
  /** Number of equal steps of θ; line k stands at (k + PHASE) · 2π / angles. */
  readonly angles: number;
}

/** Where the lines of a grid go through the triangles of a mesh, sorted by line, then by height. */
export interface Columns {
  readonly grid: ColumnGrid;
  /** First crossing of each line; one more entry closes the last. */
  readonly starts: Int32Array;
  /** Heights of the crossings, mm. */
  readonly heights: Float64Array;
  /** Crossing going up: 2 × shell when it enters the solid, 2 × shell + 1 when it leaves. */
  readonly marks: Int32Array;
}

/** Thrown when the triangles are so large and many that crossing them would take too long; the caller says so. */
export class TooManyCrossings extends Error {}

/** Points tried in one cast: a fan of a million triangles needs some ten million. */
const WORK_MAX = 200_000_000;
const FIRST_STEPS = 1024;
const CROSSINGS_MAX = 12_000_000;

/** Irrational, so that lines don't go through vertices of models with round angles. */
export const PHASE = 0.3710678118654752;

class Crossings {
  lines = new Int32Array(65_536);
  heights = new Float64Array(65_536);
  marks = new Int32Array(65_536);
  count = 0;

  push(line: number, height: number, mark: number): void {
    if (this.count === this.lines.length) this.grow();
    if (this.count > CROSSINGS_MAX) throw new TooManyCrossings();
    this.lines[this.count] = line;
    this.heights[this.count] = height;
    this.marks[this.count] = mark;
    this.count++;
  }

  private grow(): void {
    const [lines, heights, marks] = [this.lines, this.heights, this.marks];
    this.lines = new Int32Array(2 * lines.length);
    this.heights = new Float64Array(2 * lines.length);
    this.marks = new Int32Array(2 * lines.length);
    this.lines.set(lines);
    this.heights.set(heights);
    this.marks.set(marks);
  }
}

/**
 * A triangle's three edges as seen along z. Each is kept from its lower to its higher vertex, with the sign that turns
 * it back, so that two triangles judge a point on their common edge by the same number.
 */
class EdgeSides {
  private readonly x = new Float64Array(3);
  private readonly y = new Float64Array(3);
  private readonly dx = new Float64Array(3);
  private readonly dy = new Float64Array(3);

  set(edge: number, p: Float64Array, a: number, b: number): void {
    const lo = 3 * (a < b ? a : b);
    const hi = 3 * (a < b ? b : a);
    const sign = a < b ? 1 : -1;
    const x = p[lo] ?? 0;
    const y = p[lo + 1] ?? 0;
    this.x[edge] = x;
    this.y[edge] = y;
    this.dx[edge] = sign * ((p[hi] ?? 0) - x);
    this.dy[edge] = sign * ((p[hi + 1] ?? 0) - y);
  }

  /** Twice the signed area of the edge and a point. */
  of(edge: number, x: number, y: number): number {
    return (this.dx[edge] ?? 0) * (y - (this.y[edge] ?? 0)) - (this.dy[edge] ?? 0) * (x - (this.x[edge] ?? 0));
  }
}

/** Smallest distance of a segment from the z axis, seen along it. */
function segmentRadius(ax: number, ay: number, bx: number, by: number): number {
  const dx = bx - ax;
  const dy = by - ay;
  const length2 = dx * dx + dy * dy;
  const s = length2 > 0 ? Math.min(1, Math.max(0, -(ax * dx + ay * dy) / length2)) : 0;
  return Math.sqrt((ax + s * dx) ** 2 + (ay + s * dy) ** 2);
}

/**
 * Crosses every line of the grid with every triangle. A triangle is tried only with the radii and angles that it
 * spans, so no search structure is needed. The mesh stands with its axis on z. `shellOf` −1 leaves a triangle out.
 */
export function castColumns(mesh: Mesh, shellOf: Int32Array, grid: ColumnGrid): Columns {
  const { positions: p, triangles } = mesh;
  const { radiiMm, angles } = grid;
  const found = new Crossings();
  const step = (2 * Math.PI) / angles;
  const cos = Float64Array.from({ length: angles }, (_, k) => Math.cos((k + PHASE) * step));
  const sin = Float64Array.from({ length: angles }, (_, k) => Math.sin((k + PHASE) * step));
  const polar = polarOf(p);
  const radius = polar.radiusMm;
  const sides = new EdgeSides();
  let work = 0;
  const { innerMm, outerMm } = radialSpans(mesh);
  const innermost = radiiMm[0] ?? Infinity;
  const outermost = radiiMm[radiiMm.length - 1] ?? -1;
  const firstFrom = firstRadii(radiiMm);
  const scale = FIRST_STEPS / outermost;
  for (let t = 0; t < triangles.length / 3; t++) {
    const shell = shellOf[t] ?? -1;
    if (shell < 0) continue;
    const reach = outerMm[t] ?? 0;
    const nearest = innerMm[t] ?? 0;
    if (reach < innermost || nearest > outermost) continue;
    let from = nearest > 0 ? (firstFrom[(nearest * scale) | 0] ?? 0) : 0;
    while ((radiiMm[from] ?? Infinity) < nearest) from++;
    if ((radiiMm[from] ?? Infinity) > reach) continue;
    const a = triangles[3 * t] ?? 0;
    const b = triangles[3 * t + 1] ?? 0;
    const c = triangles[3 * t + 2] ?? 0;
    const outer = Math.max(radius[a] ?? 0, radius[b] ?? 0, radius[c] ?? 0);
    const ax = p[3 * a] ?? 0;
    const ay = p[3 * a + 1] ?? 0;
    const bx = p[3 * b] ?? 0;
    const by = p[3 * b + 1] ?? 0;
    const cx = p[3 * c] ?? 0;
    const cy = p[3 * c + 1] ?? 0;
    const area = (bx - ax) * (cy - ay) - (by - ay) * (cx - ax);
    if (area === 0) continue;
    sides.set(0, p, b, c);
    sides.set(1, p, c, a);
    sides.set(2, p, a, b);
    const sign = area > 0 ? 1 : -1;
    const around = sign * sides.of(0, 0, 0) >= 0 && sign * sides.of(1, 0, 0) >= 0 && sign * sides.of(2, 0, 0) >= 0;
    const inner = around
      ? 0
      : Math.min(segmentRadius(ax, ay, bx, by), segmentRadius(bx, by, cx, cy), segmentRadius(cx, cy, ax, ay));
    while ((radiiMm[from] ?? Infinity) < inner) from++;
    if (!((radiiMm[from] ?? Infinity) <= outer)) continue;
    let kFrom = 0;
    let kTo = angles - 1;
    if (!around) {
      const ta = polar.angleAt(a);
      const tb = near(polar.angleAt(b), ta);
      const tc = near(polar.angleAt(c), ta);
      kFrom = Math.ceil(Math.min(ta, tb, tc) / step - PHASE - 1e-9);
      kTo = Math.floor(Math.max(ta, tb, tc) / step - PHASE + 1e-9);
      if (kTo < kFrom) continue;
    }
    // Seen along +z the line enters through a triangle that faces down, whose projection runs clockwise.
    const mark = 2 * shell + (area < 0 ? 0 : 1);
    if (work > WORK_MAX) throw new TooManyCrossings();
    for (; from < radiiMm.length; from++) {
      const r = radiiMm[from] ?? Infinity;
      if (r > outer) break;
      work += kTo - kFrom + 1;
      for (let kk = kFrom; kk <= kTo; kk++) {
        const k = kk < 0 ? kk + angles : kk >= angles ? kk - angles : kk;
        const x = r * (cos[k] ?? 0);
        const y = r * (sin[k] ?? 0);
        const u = sides.of(0, x, y);
        if (sign * u < 0) continue;
        const v = sides.of(1, x, y);
        if (sign * v < 0) continue;
        const w = sides.of(2, x, y);
        if (sign * w < 0) continue;
        const sum = u + v + w;
        if (sum === 0) continue;
        const height = (u * (p[3 * a + 2] ?? 0) + v * (p[3 * b + 2] ?? 0) + w * (p[3 * c + 2] ?? 0)) / sum;
        found.push(from * angles + k, height, mark);
      }
    }
  }
  return sorted(found, grid);
}

/** The angle that differs from `reference` by at most half a turn. */
function near(angle: number, reference: number): number {
  if (angle - reference > Math.PI) return angle - 2 * Math.PI;
  return reference - angle > Math.PI ? angle + 2 * Math.PI : angle;
}

/** For equal steps up to the last radius: the first radius that a distance in the step may have to look at. */
function firstRadii(radiiMm: Float64Array): Int32Array {
  const last = radiiMm[radiiMm.length - 1] ?? 0;
  const out = new Int32Array(FIRST_STEPS + 1);
  let from = 0;
  for (let step = 0; step <= FIRST_STEPS; step++) {
    while ((radiiMm[from] ?? Infinity) < (step / FIRST_STEPS) * last * (1 - 1e-12)) from++;
    out[step] = from;
  }
  return out;
}

function sorted(found: Crossings, grid: ColumnGrid): Columns {
  const lines = grid.radiiMm.length * grid.angles;
  const starts = new Int32Array(lines + 1);
  for (let i = 0; i < found.count; i++) {
    const slot = (found.lines[i] ?? 0) + 1;
    starts[slot] = (starts[slot] ?? 0) + 1;
  }
  for (let line = 1; line <= lines; line++) starts[line] = (starts[line] ?? 0) + (starts[line - 1] ?? 0);
  const heights = new Float64Array(found.count);
  const marks = new Int32Array(found.count);
  const filled = new Int32Array(lines);
  for (let i = 0; i < found.count; i++) {
    const line = found.lines[i] ?? 0;
    const start = starts[line] ?? 0;
    const height = found.heights[i] ?? 0;
    // Insertion keeps each line sorted; a line has a handful of crossings.
    let slot = start + (filled[line] ?? 0);
    for (; slot > start && (heights[slot - 1] ?? 0) > height; slot--) {
      heights[slot] = heights[slot - 1] ?? 0;
      marks[slot] = marks[slot - 1] ?? 0;
    }
    heights[slot] = height;
    marks[slot] = found.marks[i] ?? 0;
    filled[line] = (filled[line] ?? 0) + 1;
  }
  return { grid, starts, heights, marks };
}
