import { edgeReport, type EdgeReport } from "./edges";
import { separateDuplicates } from "./layers";
import { shellIntegrals, type SolidIntegrals } from "./mass-properties";
import type { Mesh, Vec3 } from "./mesh";

/** A mesh taken apart into shells. */
export interface ShellReport {
  /** The mesh as judged: repeated triangles stand on vertices of their own. */
  readonly mesh: Mesh;
  readonly edges: EdgeReport;
  readonly integrals: SolidIntegrals[];
  readonly areasMm2: number[];
  /** For each shell the earlier one that it repeats exactly, or undefined. */
  readonly copyOf: (number | undefined)[];
  readonly duplicateTriangles: number;
}

/** More shells than this are a soup of triangles: no shell is judged by itself then. */
export const SHELLS_MAX = 2000;

/**
 * Edges, shells and each shell's volume and area about `originMm`. Repeated triangles are taken apart first where edges
 * are used more than twice, so that a shell saved twice counts as two closed ones.
 */
export function shellReport(meshIn: Mesh, originMm: Vec3): ShellReport {
  let mesh = meshIn;
  let edges = edgeReport(mesh);
  let duplicateTriangles = 0;
  if (edges.nonManifoldEdges > 0) {
    const layered = separateDuplicates(mesh);
    duplicateTriangles = layered.duplicateTriangles;
    if (duplicateTriangles > 0) {
      mesh = layered.mesh;
      edges = edgeReport(mesh);
    }
  }
  const many = edges.shellCount > SHELLS_MAX;
  const shellOf = many ? edges.shellOf.map((shell) => Math.min(shell, 0)) : edges.shellOf;
  const { integrals, areasMm2 } = shellIntegrals(mesh, shellOf, many ? 1 : edges.shellCount, originMm);
  const copyOf = duplicateTriangles > 0 && !many ? copies(integrals, areasMm2) : integrals.map(() => undefined);
  return { mesh, edges, integrals, areasMm2, copyOf, duplicateTriangles };
}

/** A shell with less than this share of the whole surface is a crumb: a slip of the modelling, not a part (house limit). */
const CRUMB_SHARE = 1e-4;

/** Shell of each triangle, −1 for those of crumbs too: one far off would make every search coarse. */
export function withoutCrumbs(
  shellOf: Int32Array,
  areasMm2: readonly number[],
): { searched: Int32Array; crumbs: number } {
  const total = areasMm2.reduce((sum, area) => sum + area, 0);
  const crumb = areasMm2.map((area) => area < CRUMB_SHARE * total);
  const crumbs = crumb.filter(Boolean).length;
  return { searched: crumbs === 0 ? shellOf : shellOf.map((shell) => (crumb[shell] ? -1 : shell)), crumbs };
}

/** Shell of each triangle, −1 for those of other shells than these; not to be changed, as it may be the array handed in. */
export function onlyShells(shellOf: Int32Array, shells: ReadonlySet<number>): Int32Array {
  let most = -1;
  for (let t = 0; t < shellOf.length; t++) if ((shellOf[t] ?? -1) > most) most = shellOf[t] ?? -1;
  const kept = Int32Array.from({ length: most + 1 }, (_, shell) => (shells.has(shell) ? shell : -1));
  if (!kept.includes(-1)) return shellOf;
  const own = new Int32Array(shellOf.length);
  for (let t = 0; t < own.length; t++) own[t] = kept[shellOf[t] ?? -1] ?? -1;
  return own;
}

/** Pairs shells of the same place, volume and area; only asked for when triangles do repeat. */
function copies(integrals: SolidIntegrals[], areasMm2: number[]): (number | undefined)[] {
  const same = (a: number, b: number): boolean => Math.abs(a - b) <= 1e-9 * (Math.abs(a) + Math.abs(b));
  return integrals.map((one, i) => {
    const earlier = integrals.findIndex(
      (other, j) =>
        j < i &&
        same(one.volumeMm3, other.volumeMm3) &&
        same(areasMm2[i] ?? 0, areasMm2[j] ?? 0) &&
        one.firstMm4.every(
          (value, axis) => Math.abs(value - (other.firstMm4[axis] ?? 0)) <= 1e-6 * Math.abs(one.volumeMm3),
        ),
    );
    return earlier < 0 ? undefined : earlier;
  });
}

/** The mesh with the triangles of some shells turned round. */
export function withShellsTurned(mesh: Mesh, shellOf: Int32Array, turn: (shell: number) => boolean): Mesh {
  const triangles = mesh.triangles.slice();
  for (let t = 0; t < triangles.length / 3; t++) {
    if (!turn(shellOf[t] ?? -1)) continue;
    const second = triangles[3 * t + 1] ?? 0;
    triangles[3 * t + 1] = triangles[3 * t + 2] ?? 0;
    triangles[3 * t + 2] = second;
  }
  return { positions: mesh.positions, triangles };
}
