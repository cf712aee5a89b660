import { pairAroundEdge, type EdgeUse } from "./crowded-edges";
import { closedShells, joinShells, shellRoot } from "./closed-shells";
import type { Mesh, Vec3 } from "./mesh";
import { vertexAt } from "./mesh";

/** Somewhere to look at in a faulty mesh. */
export interface FaultPlace {
  readonly kind: "open" | "misoriented" | "non-manifold";
  /** Middle of the edge, mm. */
  readonly pointMm: Vec3;
}

/** How the edges of a mesh fit together. */
export interface EdgeReport {
  /** Edges that are left with one triangle after those used in both directions are paired. */
  readonly openEdges: number;
  /** Pairs of triangles that run along their common edge in the same direction. */
  readonly misorientedEdges: number;
  /** Edges used by three triangles or more. */
  readonly nonManifoldEdges: number;
  /** Different undirected edges. */
  readonly edges: number;
  /** Triangles with two equal corners; they take part in nothing. */
  readonly degenerateTriangles: number;
  /** Number of the shell of each triangle, from 0; −1 for a degenerate one. Shells hang together by shared edges. */
  readonly shellOf: Int32Array;
  readonly shellCount: number;
  /** At most `PLACES_MAX` places, in the order of the vertices. */
  readonly places: FaultPlace[];
}

const PLACES_MAX = 200;
/** An edge of more triangles belongs to no solid. */
const CROWD_MAX = 64;
/** Half-edges looked through for pairing: bounds the time that a hub of a hundred thousand crowded edges takes. */
const PAIRING_WORK_MAX = 50_000_000;

/** The triangles at the edge between `v` and `other`, from the run of half-edges of the lower one, `v`. */
function usesOf(triangles: Uint32Array, sorted: SortedHalfEdges, from: number, to: number, other: number): EdgeUse[] {
  const out: EdgeUse[] = [];
  for (let e = from; e < to && out.length <= CROWD_MAX; e++) {
    const code = sorted.codes[e] ?? 0;
    if (code >> 1 !== other) continue;
    const triangle = sorted.owners[e] ?? 0;
    const forward = (code & 1) === 1;
    const corner = [0, 1, 2].find((c) => triangles[3 * triangle + c] === other) ?? 0;
    // Along the triangle the third corner follows the edge's head.
    out.push({ triangle, forward, opposite: triangles[3 * triangle + ((corner + (forward ? 1 : 2)) % 3)] ?? 0 });
  }
  return out;
}

/** Half-edges sorted by their lower vertex: where each vertex's run starts, and what each half-edge is. */
interface SortedHalfEdges {
  readonly starts: Int32Array;
  /** 2 × higher vertex, and 1 more when the half-edge runs from the lower vertex to it. */
  readonly codes: Int32Array;
  readonly owners: Int32Array;
}

function sortHalfEdges(triangles: Uint32Array, parents: Int32Array, vertices: number): SortedHalfEdges {
  const starts = new Int32Array(vertices + 2);
  let used = 0;
  for (let t = 0; t < parents.length; t++) {
    if (parents[t] === -1) continue;
    const a = triangles[3 * t] ?? 0;
    const b = triangles[3 * t + 1] ?? 0;
    const c = triangles[3 * t + 2] ?? 0;
    const ab = (a < b ? a : b) + 2;
    const bc = (b < c ? b : c) + 2;
    const ca = (c < a ? c : a) + 2;
    starts[ab] = (starts[ab] ?? 0) + 1;
    starts[bc] = (starts[bc] ?? 0) + 1;
    starts[ca] = (starts[ca] ?? 0) + 1;
    used += 3;
  }
  for (let v = 2; v < starts.length; v++) starts[v] = (starts[v] ?? 0) + (starts[v - 1] ?? 0);
  const codes = new Int32Array(used);
  const owners = new Int32Array(used);
  for (let t = 0; t < parents.length; t++) {
    if (parents[t] === -1) continue;
    let tail = triangles[3 * t + 2] ?? 0;
    for (let corner = 0; corner < 3; corner++) {
      const head = triangles[3 * t + corner] ?? 0;
      const slot = (tail < head ? tail : head) + 1;
      const position = starts[slot] ?? 0;
      codes[position] = tail < head ? 2 * head + 1 : 2 * tail;
      owners[position] = t;
      starts[slot] = position + 1;
      tail = head;
    }
  }
  return { starts, codes, owners };
}

/**
 * Pairs the edges of a mesh in linear time: half-edges are sorted by their lower vertex and, inside one vertex's run,
 * counted by their other end. Rule: watertight and consistently oriented means that every edge is used once in each
 * direction (3MF Core Specification 1.4.0, §4.1). Edges used 2 k times, k in each direction, count as closed.
 */
export function edgeReport(mesh: Mesh): EdgeReport {
  const { triangles } = mesh;
  const vertices = mesh.positions.length / 3;
  const count = triangles.length / 3;
  const parents = new Int32Array(count);
  let degenerateTriangles = 0;
  for (let t = 0; t < count; t++) {
    const a = triangles[3 * t];
    const b = triangles[3 * t + 1];
    const c = triangles[3 * t + 2];
    const degenerate = a === b || b === c || c === a;
    parents[t] = degenerate ? -1 : t;
    if (degenerate) degenerateTriangles++;
  }
  if (closedShells(triangles, parents, vertices)) {
    const { shellOf, shellCount } = numberShells(parents);
    const sound = { openEdges: 0, misorientedEdges: 0, nonManifoldEdges: 0, places: [] };
    return { ...sound, edges: (3 * (count - degenerateTriangles)) / 2, degenerateTriangles, shellOf, shellCount };
  }
  const sorted = sortHalfEdges(triangles, parents, vertices);
  const { starts, codes, owners } = sorted;
  // For the higher vertex of each edge of a run: lower vertex + 1, uses forward, uses backward, first and last owner.
  const tally = new Int32Array(5 * vertices);
  const ends: number[] = [];
  const places: FaultPlace[] = [];
  let pairingWork = 0;
  let [edges, openEdges, misorientedEdges, nonManifoldEdges] = [0, 0, 0, 0];
  const note = (kind: FaultPlace["kind"], v: number, w: number): void => {
    if (places.length >= PLACES_MAX) return;
    const [p, q] = [vertexAt(mesh, v), vertexAt(mesh, w)];
    places.push({ kind, pointMm: [(p[0] + q[0]) / 2, (p[1] + q[1]) / 2, (p[2] + q[2]) / 2] });
  };
  for (let v = 0; v < vertices; v++) {
    const from = starts[v] ?? 0;
    const to = starts[v + 1] ?? 0;
    ends.length = 0;
    for (let e = from; e < to; e++) {
      const code = codes[e] ?? 0;
      const record = 5 * (code >> 1);
      if (tally[record] !== v + 1) {
        tally[record] = v + 1;
        tally[record + 1] = 0;
        tally[record + 2] = 0;
        tally[record + 3] = owners[e] ?? 0;
        ends.push(code >> 1);
      }
      const side = record + 2 - (code & 1);
      tally[side] = (tally[side] ?? 0) + 1;
      tally[record + 4] = owners[e] ?? 0;
    }
    edges += ends.length;
    for (const other of ends) {
      const record = 5 * other;
      const f = tally[record + 1] ?? 0;
      const b = tally[record + 2] ?? 0;
      if (f + b === 2) joinShells(parents, tally[record + 3] ?? 0, tally[record + 4] ?? 0);
      if (f === 1 && b === 1) continue;
      const rest = Math.abs(f - b);
      if (rest % 2 === 1) {
        openEdges++;
        note("open", v, other);
      }
      if (rest >= 2) {
        misorientedEdges += rest >> 1;
        note("misoriented", v, other);
      }
      if (f + b > 2) {
        nonManifoldEdges++;
        note("non-manifold", v, other);
        pairingWork += to - from;
        if (pairingWork > PAIRING_WORK_MAX) continue;
        const uses = usesOf(triangles, sorted, from, to, other);
        if (uses.length <= CROWD_MAX)
          for (const [a, c] of pairAroundEdge(mesh, v, other, uses)) joinShells(parents, a, c);
      }
    }
  }
  const { shellOf, shellCount } = numberShells(parents);
  return { openEdges, misorientedEdges, nonManifoldEdges, edges, degenerateTriangles, shellOf, shellCount, places };
}

/** Turns the union-find forest into shell numbers in the order of their first triangles, in place. */
function numberShells(parents: Int32Array): { shellOf: Int32Array; shellCount: number } {
  let shellCount = 0;
  // Roots are the lowest triangle of their shell, so a root comes before its members.
  for (let t = 0; t < parents.length; t++) if (parents[t] !== -1) parents[t] = shellRoot(parents, t);
  for (let t = 0; t < parents.length; t++) {
    const root = parents[t] ?? -1;
    if (root === -1) continue;
    parents[t] = root === t ? shellCount++ : (parents[root] ?? -1);
  }
  return { shellOf: parents, shellCount };
}
