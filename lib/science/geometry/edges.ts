import { pairAroundEdge, type EdgeUse } from "./crowded-edges";
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

function find(parents: Int32Array, triangle: number): number {
  let t = triangle;
  for (;;) {
    const parent = parents[t] ?? t;
    if (parent === t) return t;
    const grand = parents[parent] ?? parent;
    parents[t] = grand;
    t = grand;
  }
}

/** The triangles at the edge between `v` and `other`, from the run of half-edges of the lower one, `v`. */
function usesOf(triangles: Uint32Array, parents: Int32Array, run: Int32Array, v: number, other: number): EdgeUse[] {
  const out: EdgeUse[] = [];
  for (const h of run) {
    const triangle = (h / 3) | 0;
    const corner = h % 3;
    const tail = triangles[h] ?? 0;
    const head = triangles[3 * triangle + ((corner + 1) % 3)] ?? 0;
    if (parents[triangle] === -1 || Math.max(tail, head) !== other) continue;
    out.push({ triangle, forward: tail === v, opposite: triangles[3 * triangle + ((corner + 2) % 3)] ?? 0 });
    if (out.length > CROWD_MAX) break;
  }
  return out;
}

/** Joins the shells of two triangles. */
function join(parents: Int32Array, s: number, t: number): void {
  const a = find(parents, s);
  const b = find(parents, t);
  if (a !== b) parents[Math.max(a, b)] = Math.min(a, b);
}

/** Half-edges sorted by their lower vertex: where each vertex's run starts, and the half-edges (3 × triangle + corner). */
function sortHalfEdges(triangles: Uint32Array, vertices: number): { starts: Int32Array; halfEdges: Int32Array } {
  const starts = new Int32Array(vertices + 2);
  const lower = (h: number): number => {
    const next = h % 3 === 2 ? h - 2 : h + 1;
    return Math.min(triangles[h] ?? 0, triangles[next] ?? 0);
  };
  for (let h = 0; h < triangles.length; h++) starts[lower(h) + 2] = (starts[lower(h) + 2] ?? 0) + 1;
  for (let v = 2; v < starts.length; v++) starts[v] = (starts[v] ?? 0) + (starts[v - 1] ?? 0);
  const halfEdges = new Int32Array(triangles.length);
  for (let h = 0; h < triangles.length; h++) {
    const slot = lower(h) + 1;
    const position = starts[slot] ?? 0;
    halfEdges[position] = h;
    starts[slot] = position + 1;
  }
  return { starts, halfEdges };
}

/**
 * Pairs the edges of a mesh in linear time: half-edges are sorted by their lower vertex and, inside one vertex's run,
 * counted by their other end. Rule: watertight and consistently oriented means that every edge is used once in each
 * direction (3MF Core Specification 1.4.0, §4.1). Edges used 2 k times, k in each direction, count as closed.
 */
export function edgeReport(mesh: Mesh): EdgeReport {
  const { triangles } = mesh;
  const vertices = mesh.positions.length / 3;
  const { starts, halfEdges } = sortHalfEdges(triangles, vertices);
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
  const stamp = new Int32Array(vertices).fill(-1);
  const forward = new Int32Array(vertices);
  const backward = new Int32Array(vertices);
  const firstTriangle = new Int32Array(vertices);
  const lastTriangle = new Int32Array(vertices);
  const places: FaultPlace[] = [];
  let pairingWork = 0;
  let [edges, openEdges, misorientedEdges, nonManifoldEdges] = [0, 0, 0, 0];
  const note = (kind: FaultPlace["kind"], v: number, w: number) => {
    if (places.length >= PLACES_MAX) return;
    const [p, q] = [vertexAt(mesh, v), vertexAt(mesh, w)];
    places.push({ kind, pointMm: [(p[0] + q[0]) / 2, (p[1] + q[1]) / 2, (p[2] + q[2]) / 2] });
  };
  for (let v = 0; v < vertices; v++) {
    const from = starts[v] ?? 0;
    const to = starts[v + 1] ?? 0;
    for (let e = from; e < to; e++) {
      const h = halfEdges[e] ?? 0;
      const t = (h / 3) | 0;
      if (parents[t] === -1) continue;
      const tail = triangles[h] ?? 0;
      const head = triangles[h % 3 === 2 ? h - 2 : h + 1] ?? 0;
      const other = tail === v ? head : tail;
      if (stamp[other] !== v) {
        stamp[other] = v;
        forward[other] = 0;
        backward[other] = 0;
        firstTriangle[other] = t;
        edges++;
      }
      const side = tail === v ? forward : backward;
      side[other] = (side[other] ?? 0) + 1;
      lastTriangle[other] = t;
    }
    for (let e = from; e < to; e++) {
      const h = halfEdges[e] ?? 0;
      if (parents[(h / 3) | 0] === -1) continue;
      const tail = triangles[h] ?? 0;
      const other = tail === v ? (triangles[h % 3 === 2 ? h - 2 : h + 1] ?? 0) : tail;
      if (stamp[other] !== v) continue;
      stamp[other] = -1;
      const f = forward[other] ?? 0;
      const b = backward[other] ?? 0;
      if (f + b === 2) join(parents, firstTriangle[other] ?? 0, lastTriangle[other] ?? 0);
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
        const uses = usesOf(triangles, parents, halfEdges.subarray(from, to), v, other);
        if (uses.length <= CROWD_MAX) for (const [a, b] of pairAroundEdge(mesh, v, other, uses)) join(parents, a, b);
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
  for (let t = 0; t < parents.length; t++) if (parents[t] !== -1) parents[t] = find(parents, t);
  for (let t = 0; t < parents.length; t++) {
    const root = parents[t] ?? -1;
    if (root === -1) continue;
    parents[t] = root === t ? shellCount++ : (parents[root] ?? -1);
  }
  return { shellOf: parents, shellCount };
}
