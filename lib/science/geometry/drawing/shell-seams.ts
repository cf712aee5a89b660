import { DisjointSets } from "../disjoint-sets";
import { apartByPlane, cornersOf, cutSegment } from "../fit/triangle-meeting";
import { eachClosePair, triangleBoxes, triangleTree } from "../fit/triangle-tree";
import type { Mesh, Vec3 } from "../mesh";
import type { MeshEdges } from "./mesh-edges";

/** A line along which two overlapping shells cut each other, such as a blade's root in a hub. */
export interface Seam {
  readonly from: Vec3;
  readonly to: Vec3;
  readonly triangleS: number;
  readonly triangleT: number;
}

/** More shells than these are a soup, whose seams would say nothing. */
const SHELLS_MAX = 80;

/**
 * Lines along which shells cut each other. Models are often drawn as shells that overlap; the joint between them has no
 * edge in the mesh, yet is what one sees. Empty for one shell, and for more than eighty.
 */
export function shellSeams(mesh: Mesh, edges: MeshEdges): Seam[] {
  const groups = shellTriangles(mesh, edges);
  if (groups.length < 2 || groups.length > SHELLS_MAX) return [];
  const boxes = triangleBoxes(mesh);
  const trees = groups.map((group) => triangleTree(mesh, group, boxes));
  const seams: Seam[] = [];
  trees.forEach((a, i) =>
    trees.slice(i + 1).forEach((b) =>
      eachClosePair(a, b, 0, (triangleS, triangleT) => {
        // Most close pairs lie on one side of each other.
        if (apartByPlane(mesh, triangleS, triangleT) || apartByPlane(mesh, triangleT, triangleS)) return;
        const cut = cutSegment(cornersOf(mesh, triangleS), cornersOf(mesh, triangleT));
        if (cut) seams.push({ from: cut[0], to: cut[1], triangleS, triangleT });
      }),
    ),
  );
  return seams;
}

function shellTriangles(mesh: Mesh, edges: MeshEdges): number[][] {
  const count = mesh.triangles.length / 3;
  const shells = new DisjointSets(count);
  for (let e = 0; e < edges.count; e++) {
    const [s = -1, t = -1] = [edges.sides[2 * e], edges.sides[2 * e + 1]];
    if (t >= 0) shells.join(s, t);
  }
  const groups = new Map<number, number[]>();
  for (let t = 0; t < count; t++) {
    const shell = shells.find(t);
    const group = groups.get(shell);
    if (group) group.push(t);
    else groups.set(shell, [t]);
  }
  return [...groups.values()];
}
