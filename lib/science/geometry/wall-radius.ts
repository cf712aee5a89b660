import type { Mesh } from "./mesh";
import { polarOf, radialSpans } from "./polar";

const SECTORS = 12;
const SECTORS_NEEDED = 7;
const BINS = 800;

/** Where to look for a round wall. */
export interface WallSearch {
  /** Radius found by sampling, which a wall of few facets understates, mm. */
  readonly nearMm: number;
  readonly fromZMm: number;
  readonly toZMm: number;
  /** +1 for a wall that faces outwards (hub), −1 for one that faces the axis (inside of a ring). */
  readonly facing: 1 | -1;
}

/**
 * How far the corners of a wall may lie outside its facets' middles, 1 / cos(π / n) − 1: 12 facets and more are looked
 * for first, then 8.
 */
const SAGS = [0.04, 0.09];

/**
 * Radius of the circle on which the vertices of a round wall lie, within −1 % to +9 % of the radius looked for;
 * undefined where no wall goes around. `shellOf` −1 leaves a triangle out. A model's nominal diameter is that of its
 * vertices, not of its facets' middles.
 */
export function wallRadius(mesh: Mesh, shellOf: Int32Array, search: WallSearch): number | undefined {
  for (const sag of SAGS) {
    const found = wallWithin(mesh, shellOf, search, 0.99 * search.nearMm, (1 + sag) * search.nearMm);
    if (found !== undefined) return found;
  }
  return undefined;
}

function wallWithin(
  mesh: Mesh,
  shellOf: Int32Array,
  search: WallSearch,
  low: number,
  high: number,
): number | undefined {
  const sectors = new Uint16Array(BINS);
  const sums = new Float64Array(BINS);
  const counts = new Int32Array(BINS);
  const { positions: p, triangles } = mesh;
  const polar = polarOf(p);
  const { radiusMm } = polar;
  const { innerMm, outerMm } = radialSpans(mesh);
  for (let t = 0; t < shellOf.length; t++) {
    // A corner has to lie near the wall for its triangle to say anything.
    if ((outerMm[t] ?? 0) < low || (innerMm[t] ?? 0) > high || (shellOf[t] ?? -1) < 0) continue;
    const a = triangles[3 * t] ?? 0;
    const b = triangles[3 * t + 1] ?? 0;
    const c = triangles[3 * t + 2] ?? 0;
    if (!standsAsWall(p, a, b, c, search, low, high)) continue;
    for (const v of [a, b, c]) {
      const radius = radiusMm[v] ?? 0;
      const bin = Math.floor(((radius - low) / (high - low)) * BINS);
      if (bin < 0 || bin >= BINS) continue;
      const sector = Math.floor((polar.angleAt(v) / (2 * Math.PI) + 1) * SECTORS) % SECTORS;
      sectors[bin] = (sectors[bin] ?? 0) | (1 << sector);
      sums[bin] = (sums[bin] ?? 0) + radius;
      counts[bin] = (counts[bin] ?? 0) + 1;
    }
  }
  let best: number | undefined;
  let most = { around: SECTORS_NEEDED - 1, count: 0 };
  for (let bin = 0; bin + 1 < BINS; bin++) {
    // Two neighbouring bins, so that rounding at a bin's edge doesn't split a circle.
    const around = bitCount((sectors[bin] ?? 0) | (sectors[bin + 1] ?? 0));
    const count = (counts[bin] ?? 0) + (counts[bin + 1] ?? 0);
    // Where blades cut the facets there are vertices nearer to the axis; the rim's own are more.
    if (around < most.around || (around === most.around && count <= most.count) || count === 0) continue;
    if (around < SECTORS_NEEDED) continue;
    most = { around, count };
    best = ((sums[bin] ?? 0) + (sums[bin + 1] ?? 0)) / count;
  }
  return best;
}

/** True for a triangle between the heights and about at the radius whose normal points along the radius as looked for. */
function standsAsWall(
  p: Float64Array,
  a: number,
  b: number,
  c: number,
  search: WallSearch,
  low: number,
  high: number,
): boolean {
  const ax = p[3 * a] ?? 0;
  const ay = p[3 * a + 1] ?? 0;
  const az = p[3 * a + 2] ?? 0;
  const ux = (p[3 * b] ?? 0) - ax;
  const uy = (p[3 * b + 1] ?? 0) - ay;
  const uz = (p[3 * b + 2] ?? 0) - az;
  const vx = (p[3 * c] ?? 0) - ax;
  const vy = (p[3 * c + 1] ?? 0) - ay;
  const vz = (p[3 * c + 2] ?? 0) - az;
  const z = az + (uz + vz) / 3;
  if (z < search.fromZMm || z > search.toZMm) return false;
  const x = ax + (ux + vx) / 3;
  const y = ay + (uy + vy) / 3;
  const r = Math.sqrt(x * x + y * y);
  // A cone's facets reach far inwards from the circle at its end.
  if (r < 0.75 * low || r > high) return false;
  const nx = uy * vz - uz * vy;
  const ny = uz * vx - ux * vz;
  const nz = ux * vy - uy * vx;
  const length = Math.sqrt(nx * nx + ny * ny + nz * nz);
  return length > 0 && ((nx * x + ny * y) / (length * r)) * search.facing >= 0.9;
}

/** Number of set bits of a mask below 2³¹. */
export function bitCount(mask: number): number {
  let count = 0;
  for (let rest = mask; rest > 0; rest >>= 1) count += rest & 1;
  return count;
}
