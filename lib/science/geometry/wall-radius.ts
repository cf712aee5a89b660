import type { Faces } from "./faces";
import type { Mesh } from "./mesh";

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
 * Radius of the circle on which the vertices of a round wall lie, within −1 % to +4 % of the radius looked for;
 * undefined where no wall goes around. A model's nominal diameter is that of its vertices, not of its facets' middles.
 */
export function wallRadius(mesh: Mesh, faces: Faces, search: WallSearch): number | undefined {
  const [low, high] = [0.99 * search.nearMm, 1.04 * search.nearMm];
  const sectors = new Uint16Array(BINS);
  const sums = new Float64Array(BINS);
  const counts = new Int32Array(BINS);
  for (let t = 0; t < faces.areasMm2.length; t++) {
    const [mx, my, mz] = [
      faces.middlesMm[3 * t] ?? 0,
      faces.middlesMm[3 * t + 1] ?? 0,
      faces.middlesMm[3 * t + 2] ?? 0,
    ];
    const r = Math.sqrt(mx * mx + my * my);
    if (r < 0.93 * low || r > high || mz < search.fromZMm || mz > search.toZMm) continue;
    const radial = ((faces.normals[3 * t] ?? 0) * mx + (faces.normals[3 * t + 1] ?? 0) * my) / r;
    if (radial * search.facing < 0.9) continue;
    for (let corner = 0; corner < 3; corner++) {
      const v = mesh.triangles[3 * t + corner] ?? 0;
      const [x, y] = [mesh.positions[3 * v] ?? 0, mesh.positions[3 * v + 1] ?? 0];
      const radius = Math.sqrt(x * x + y * y);
      const bin = Math.floor(((radius - low) / (high - low)) * BINS);
      if (bin < 0 || bin >= BINS) continue;
      const sector = Math.floor((Math.atan2(y, x) / (2 * Math.PI) + 1) * SECTORS) % SECTORS;
      sectors[bin] = (sectors[bin] ?? 0) | (1 << sector);
      sums[bin] = (sums[bin] ?? 0) + radius;
      counts[bin] = (counts[bin] ?? 0) + 1;
    }
  }
  let best: number | undefined;
  let most = { around: SECTORS_NEEDED - 1, count: 0 };
  for (let bin = 0; bin + 1 < BINS; bin++) {
    // Two neighbouring bins, so that rounding at a bin's edge doesn't split a circle.
    const around = bits((sectors[bin] ?? 0) | (sectors[bin + 1] ?? 0));
    const count = (counts[bin] ?? 0) + (counts[bin + 1] ?? 0);
    // Where blades cut the facets there are vertices nearer to the axis; the rim's own are more.
    if (around < most.around || (around === most.around && count <= most.count) || count === 0) continue;
    if (around < SECTORS_NEEDED) continue;
    most = { around, count };
    best = ((sums[bin] ?? 0) + (sums[bin + 1] ?? 0)) / count;
  }
  return best;
}

function bits(mask: number): number {
  let count = 0;
  for (let rest = mask; rest > 0; rest >>= 1) count += rest & 1;
  return count;
}
