import { DisjointSets } from "../disjoint-sets";
import type { Mesh } from "../mesh";
import { meshEdges, type MeshEdges } from "./mesh-edges";
import { shellSeams, type Seam } from "./shell-seams";

/** What a drawing of a mesh needs whatever it is seen from. */
export interface DrawableMesh {
  readonly mesh: Mesh;
  readonly edges: MeshEdges;
  /** Unit normals, three numbers a triangle; 0, 0, 0 for one without area. */
  readonly normals: Float64Array;
  /** 1 for an edge that is drawn from wherever it is seen: a crease, the border of a flat face, an open edge. */
  readonly sharp: Uint8Array;
  readonly seams: readonly Seam[];
}

/** Triangles within this of one plane are one face. */
const FLAT_COS = Math.cos((0.6 * Math.PI) / 180);
/** Borders of large flat faces are drawn from this angle on, edges inside curved regions only when they are creases. */
const BORDER_COS = Math.cos((18 * Math.PI) / 180);
const CREASE_COS = Math.cos((45 * Math.PI) / 180);
/** A flat face is large above this share of the mesh's area, or when it has many triangles. */
const LARGE_SHARE = 0.004;

/**
 * Finds what is sharp in a mesh. No one angle suits all meshes: the corners of a thin plate may be flatter than the
 * facets of a coarse cylinder. So triangles of one plane are grouped into faces; the border of a large face is drawn
 * from 18° on, and elsewhere an edge has to be a crease of 45° (house values, tried on meshes of rotors).
 */
export function drawableMesh(mesh: Mesh): DrawableMesh {
  const edges = meshEdges(mesh);
  const { normals, areas } = triangleNormals(mesh);
  const cosines = new Float64Array(edges.count);
  const faces = new DisjointSets(areas.length);
  for (let e = 0; e < edges.count; e++) {
    const [s = -1, t = -1] = [edges.sides[2 * e], edges.sides[2 * e + 1]];
    if (t < 0) continue;
    // A triangle without area bends nothing.
    const empty = (areas[s] ?? 0) === 0 || (areas[t] ?? 0) === 0;
    const cosine = empty ? 1 : dotOf(normals, s, t);
    cosines[e] = cosine;
    if (cosine >= FLAT_COS) faces.join(s, t);
  }
  const faceArea = new Float64Array(areas.length);
  let whole = 0;
  areas.forEach((area, t) => {
    const face = faces.find(t);
    faceArea[face] = (faceArea[face] ?? 0) + area;
    whole += area;
  });
  const large = (t: number): boolean => (faceArea[faces.find(t)] ?? 0) > LARGE_SHARE * whole;
  const sharp = new Uint8Array(edges.count);
  for (let e = 0; e < edges.count; e++) {
    const [s = -1, t = -1] = [edges.sides[2 * e], edges.sides[2 * e + 1]];
    const cosine = cosines[e] ?? 1;
    const open = t < 0;
    const border = cosine < BORDER_COS && (large(s) || large(t));
    if (open || cosine < CREASE_COS || border) sharp[e] = 1;
  }
  return { mesh, edges, normals, sharp, seams: shellSeams(mesh, edges) };
}

const dotOf = (n: Float64Array, s: number, t: number): number =>
  (n[3 * s] ?? 0) * (n[3 * t] ?? 0) +
  (n[3 * s + 1] ?? 0) * (n[3 * t + 1] ?? 0) +
  (n[3 * s + 2] ?? 0) * (n[3 * t + 2] ?? 0);

function triangleNormals({ positions: p, triangles }: Mesh): { normals: Float64Array; areas: Float64Array } {
  const count = triangles.length / 3;
  const normals = new Float64Array(3 * count);
  const areas = new Float64Array(count);
  for (let t = 0; t < count; t++) {
    const a = 3 * (triangles[3 * t] ?? 0);
    const b = 3 * (triangles[3 * t + 1] ?? 0);
    const c = 3 * (triangles[3 * t + 2] ?? 0);
    const [ax, ay, az] = [p[a] ?? 0, p[a + 1] ?? 0, p[a + 2] ?? 0];
    const [ux, uy, uz] = [(p[b] ?? 0) - ax, (p[b + 1] ?? 0) - ay, (p[b + 2] ?? 0) - az];
    const [vx, vy, vz] = [(p[c] ?? 0) - ax, (p[c + 1] ?? 0) - ay, (p[c + 2] ?? 0) - az];
    const [nx, ny, nz] = [uy * vz - uz * vy, uz * vx - ux * vz, ux * vy - uy * vx];
    const length = Math.hypot(nx, ny, nz);
    areas[t] = length / 2;
    if (length === 0) continue;
    normals[3 * t] = nx / length;
    normals[3 * t + 1] = ny / length;
    normals[3 * t + 2] = nz / length;
  }
  return { normals, areas };
}
