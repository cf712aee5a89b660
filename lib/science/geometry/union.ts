import { castColumns, type Columns } from "./columns";
import { eachStretch, type Solids } from "./column-solids";
import { addIntegrals, noIntegrals, type SolidIntegrals } from "./mass-properties";
import type { Mesh } from "./mesh";
import { radiiTo } from "./rotor-search";

const FINE_RADII = 256;
const COARSE_RADII = 80;
const ANGLES = 1440;

/** Number of lines around that a whole number of blades shares evenly, so that sampling makes no unbalance. */
export function evenAngles(blades: number): number {
  return blades * Math.max(1, Math.round(ANGLES / blades));
}

/** Sums integrals over line stretches: each line stands for its part of the ring between two radii. */
class LineSum {
  private readonly s = new Float64Array(10);

  add(r: number, dr: number, angle: number, dAngle: number, from: number, to: number, times: number): void {
    const area = r * dr * dAngle * times;
    const x = r * Math.cos(angle);
    const y = r * Math.sin(angle);
    const length = to - from;
    const z1 = (to * to - from * from) / 2;
    const z2 = (to ** 3 - from ** 3) / 3;
    const values = [
      length,
      x * length,
      y * length,
      z1,
      x * x * length,
      y * y * length,
      z2,
      x * y * length,
      y * z1,
      x * z1,
    ];
    values.forEach((value, i) => (this.s[i] = (this.s[i] ?? 0) + area * value));
  }

  finish(): SolidIntegrals {
    const [v = 0, x = 0, y = 0, z = 0, xx = 0, yy = 0, zz = 0, xy = 0, yz = 0, zx = 0] = this.s;
    return { originMm: [0, 0, 0], volumeMm3: v, firstMm4: [x, y, z], secondMm5: [xx, yy, zz, xy, yz, zx] };
  }
}

const PHASE_ANGLE = (grid: Columns["grid"], line: number): number =>
  ((line % grid.angles) + 0.3710678118654752) * ((2 * Math.PI) / grid.angles);

/**
 * What shells that share space have in common, counted as often as the sum of their volumes counts it too much:
 * sum − excess = union. Sampled by lines parallel to z, finely over the radii where anything overlaps; volumes come out
 * within some tenths of a percent of the overlap. Shells face outwards, hollows inwards.
 * @param known the same shells cast before at evenly spaced radii, which tell where they overlap
 */
export function excessIntegrals(
  mesh: Mesh,
  shellOf: Int32Array,
  outerMm: number,
  angles: number,
  known?: Columns,
): SolidIntegrals {
  const coarse =
    known ?? castColumns(mesh, shellOf, { radiiMm: radiiTo(outerMm, COARSE_RADII), angles: evenAngles(24) / 2 });
  const step = outerMm / coarse.grid.radiiMm.length;
  let [low, high] = [Infinity, -Infinity];
  eachExcess(coarse, (line) => {
    const r = coarse.grid.radiiMm[Math.floor(line / coarse.grid.angles)] ?? 0;
    low = Math.min(low, r);
    high = Math.max(high, r);
  });
  if (!(high >= low)) return noIntegrals([0, 0, 0]);
  const [from, to] = [Math.max(0, low - 1.5 * step), high + 1.5 * step];
  const dr = (to - from) / FINE_RADII;
  const radiiMm = Float64Array.from({ length: FINE_RADII }, (_, i) => from + (i + 0.5) * dr);
  const columns = castColumns(mesh, shellOf, { radiiMm, angles });
  const sum = new LineSum();
  eachExcess(columns, (line, a, b, times) => {
    const r = radiiMm[Math.floor(line / angles)] ?? 0;
    sum.add(r, dr, PHASE_ANGLE(columns.grid, line), (2 * Math.PI) / angles, a, b, times);
  });
  return sum.finish();
}

function eachExcess(columns: Columns, visit: (line: number, from: number, to: number, times: number) => void): void {
  const { starts, heights, marks } = columns;
  for (let line = 0; line + 1 < starts.length; line++) {
    let winding = 0;
    const end = (starts[line + 1] ?? 0) - 1;
    for (let i = starts[line] ?? 0; i < end; i++) {
      winding += ((marks[i] ?? 0) & 1) === 0 ? 1 : -1;
      const [a, b] = [heights[i] ?? 0, heights[i + 1] ?? 0];
      if (winding > 1 && b > a) visit(line, a, b, winding - 1);
    }
  }
}

/** Integrals of the solids between two heights, by lines: for one rotor of several that are one body. */
export function zoneIntegrals(solids: Solids, outerMm: number, fromMm: number, toMm: number): SolidIntegrals {
  const { grid } = solids.columns;
  const dr = outerMm / grid.radiiMm.length;
  const sum = new LineSum();
  for (let line = 0; line + 1 < solids.starts.length; line++) {
    const r = grid.radiiMm[Math.floor(line / grid.angles)] ?? 0;
    eachStretch(solids, line, (low, high) => {
      const [a, b] = [Math.max(low, fromMm), Math.min(high, toMm)];
      if (b > a) sum.add(r, dr, PHASE_ANGLE(grid, line), (2 * Math.PI) / grid.angles, a, b, 1);
    });
  }
  return sum.finish();
}

/** Sum of the integrals of some shells. */
export function sumIntegrals(parts: readonly SolidIntegrals[]): SolidIntegrals {
  return parts.reduce((sum, part) => addIntegrals(sum, part), noIntegrals([0, 0, 0]));
}
