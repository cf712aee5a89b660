import type { Mesh, Vec3 } from "./mesh";
import { minus, plus, type Sym3 } from "./vectors";

/** Integrals of 1, of the position and of its products over a solid, about a point `originMm`. */
export interface SolidIntegrals {
  readonly originMm: Vec3;
  readonly volumeMm3: number;
  /** ∫ x, ∫ y, ∫ z, mm⁴. */
  readonly firstMm4: Vec3;
  /** ∫ xx, yy, zz, xy, yz, zx, mm⁵. */
  readonly secondMm5: Sym3;
}

/** Mass, centre and inertia of a body of uniform density. */
export interface MassProperties {
  readonly volumeMm3: number;
  readonly massG: number;
  readonly centreMm: Vec3;
  /** Inertia about the centre, g·mm²: xx, yy, zz, then the off-diagonals xy, yz, zx (the negative products). */
  readonly inertiaGmm2: Sym3;
}

const SLOTS = 11;
const BLOCK = 4096;

/** Integrals and area of each shell; `shellOf` −1 leaves a triangle out. Areas in mm², shells in their order. */
export interface ShellIntegrals {
  readonly integrals: SolidIntegrals[];
  readonly areasMm2: number[];
}

/**
 * Signed tetrahedra from `originMm` to every triangle, summed for each shell in blocks, which keeps rounding small.
 * Triangles run anticlockwise seen from outside; an inverted shell has a negative volume; an open one a meaningless
 * one. Zhang & Chen, ICIP 2001; same integrals as Mirtich, JGT 1(2) 1996.
 */
export function shellIntegrals(mesh: Mesh, shellOf: Int32Array, shells: number, originMm: Vec3): ShellIntegrals {
  const total = new Float64Array(SLOTS * shells);
  const block = new Float64Array(SLOTS * shells);
  const { positions: p, triangles } = mesh;
  const count = triangles.length / 3;
  const [ox, oy, oz] = originMm;
  const flush = shells > 64 ? count : BLOCK;
  for (let t = 0; t < count; t++) {
    const shell = shellOf[t] ?? -1;
    if (shell < 0) continue;
    const i = 3 * (triangles[3 * t] ?? 0);
    const j = 3 * (triangles[3 * t + 1] ?? 0);
    const k = 3 * (triangles[3 * t + 2] ?? 0);
    const ax = (p[i] ?? 0) - ox;
    const ay = (p[i + 1] ?? 0) - oy;
    const az = (p[i + 2] ?? 0) - oz;
    const bx = (p[j] ?? 0) - ox;
    const by = (p[j + 1] ?? 0) - oy;
    const bz = (p[j + 2] ?? 0) - oz;
    const cx = (p[k] ?? 0) - ox;
    const cy = (p[k + 1] ?? 0) - oy;
    const cz = (p[k + 2] ?? 0) - oz;
    const d = ax * (by * cz - bz * cy) + ay * (bz * cx - bx * cz) + az * (bx * cy - by * cx);
    const sx = ax + bx + cx;
    const sy = ay + by + cy;
    const sz = az + bz + cz;
    const to = SLOTS * shell;
    // Written out, without a helper or tuples: this runs for every triangle.
    block[to] = (block[to] ?? 0) + d / 6;
    block[to + 1] = (block[to + 1] ?? 0) + (d * sx) / 24;
    block[to + 2] = (block[to + 2] ?? 0) + (d * sy) / 24;
    block[to + 3] = (block[to + 3] ?? 0) + (d * sz) / 24;
    const e = d / 120;
    block[to + 4] = (block[to + 4] ?? 0) + e * (sx * sx + ax * ax + bx * bx + cx * cx);
    block[to + 5] = (block[to + 5] ?? 0) + e * (sy * sy + ay * ay + by * by + cy * cy);
    block[to + 6] = (block[to + 6] ?? 0) + e * (sz * sz + az * az + bz * bz + cz * cz);
    block[to + 7] = (block[to + 7] ?? 0) + e * (sx * sy + ax * ay + bx * by + cx * cy);
    block[to + 8] = (block[to + 8] ?? 0) + e * (sy * sz + ay * az + by * bz + cy * cz);
    block[to + 9] = (block[to + 9] ?? 0) + e * (sz * sx + az * ax + bz * bx + cz * cx);
    const nx = (by - ay) * (cz - az) - (bz - az) * (cy - ay);
    const ny = (bz - az) * (cx - ax) - (bx - ax) * (cz - az);
    const nz = (bx - ax) * (cy - ay) - (by - ay) * (cx - ax);
    block[to + 10] = (block[to + 10] ?? 0) + Math.sqrt(nx * nx + ny * ny + nz * nz) / 2;
    if ((t + 1) % flush === 0) fold(block, total);
  }
  fold(block, total);
  const of = (shell: number, slot: number): number => total[SLOTS * shell + slot] ?? 0;
  const integrals = Array.from({ length: shells }, (_, s): SolidIntegrals => ({
    originMm,
    volumeMm3: of(s, 0),
    firstMm4: [of(s, 1), of(s, 2), of(s, 3)],
    secondMm5: [of(s, 4), of(s, 5), of(s, 6), of(s, 7), of(s, 8), of(s, 9)],
  }));
  return { integrals, areasMm2: Array.from({ length: shells }, (_, s) => of(s, 10)) };
}

function fold(block: Float64Array, total: Float64Array): void {
  for (let i = 0; i < total.length; i++) total[i] = (total[i] ?? 0) + (block[i] ?? 0);
  block.fill(0);
}

/** a + factor · b, both about the same origin. */
export function addIntegrals(a: SolidIntegrals, b: SolidIntegrals, factor = 1): SolidIntegrals {
  const [p, q] = [a.secondMm5, b.secondMm5];
  return {
    originMm: a.originMm,
    volumeMm3: a.volumeMm3 + factor * b.volumeMm3,
    firstMm4: plus(a.firstMm4, b.firstMm4, factor),
    secondMm5: [
      p[0] + factor * q[0],
      p[1] + factor * q[1],
      p[2] + factor * q[2],
      p[3] + factor * q[3],
      p[4] + factor * q[4],
      p[5] + factor * q[5],
    ],
  };
}

/** Integrals of nothing, about a point. */
export function noIntegrals(originMm: Vec3): SolidIntegrals {
  return { originMm, volumeMm3: 0, firstMm4: [0, 0, 0], secondMm5: [0, 0, 0, 0, 0, 0] };
}

/**
 * Mass properties of a solid of uniform density (g/cm³). Undefined when the volume is not above zero: an open or
 * inverted mesh has no mass. I = ρ (tr(M) 1 − M) about the centre.
 */
export function massProperties(integrals: SolidIntegrals, densityGCm3: number): MassProperties | undefined {
  const volume = integrals.volumeMm3;
  if (!(volume > 0)) return undefined;
  const [x, y, z] = integrals.firstMm4.map((value) => value / volume) as [number, number, number];
  const m = integrals.secondMm5;
  const [xx, yy, zz] = [m[0] - volume * x * x, m[1] - volume * y * y, m[2] - volume * z * z];
  const [xy, yz, zx] = [m[3] - volume * x * y, m[4] - volume * y * z, m[5] - volume * z * x];
  const density = densityGCm3 / 1000;
  return {
    volumeMm3: volume,
    massG: density * volume,
    centreMm: minus([x, y, z], minus([0, 0, 0], integrals.originMm)),
    inertiaGmm2: [
      density * (yy + zz),
      density * (zz + xx),
      density * (xx + yy),
      -density * xy,
      -density * yz,
      -density * zx,
    ],
  };
}
