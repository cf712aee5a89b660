import type { Mesh } from "./mesh";

/** Distance from the z axis of each vertex, mm, and its angle about it, rad in −π…π, worked out when first asked for. */
export class Polar {
  private readonly angleRad: Float64Array;

  constructor(
    private readonly positions: Float64Array,
    readonly radiusMm: Float64Array,
  ) {
    this.angleRad = new Float64Array(radiusMm.length);
  }

  /** Angle of a vertex about the z axis: most vertices of a fine mesh are never asked for theirs. */
  angleAt(vertex: number): number {
    const kept = this.angleRad[vertex] ?? 0;
    // An angle of just 0 is worked out anew each time; that way no memory is touched but what is asked for.
    if (kept !== 0) return kept;
    const angle = Math.atan2(this.positions[3 * vertex + 1] ?? 0, this.positions[3 * vertex] ?? 0);
    this.angleRad[vertex] = angle;
    return angle;
  }
}

const known = new WeakMap<Float64Array, Polar>();

/**
 * Polar coordinates of positions (x, y, z of each vertex in turn), which aren't changed afterwards. A search looks at
 * one mesh a dozen times, so they are kept as long as the positions are.
 */
export function polarOf(positions: Float64Array): Polar {
  const kept = known.get(positions);
  if (kept) return kept;
  const vertices = positions.length / 3;
  const radiusMm = new Float64Array(vertices);
  for (let v = 0; v < vertices; v++) {
    const x = positions[3 * v] ?? 0;
    const y = positions[3 * v + 1] ?? 0;
    radiusMm[v] = Math.sqrt(x * x + y * y);
  }
  const made = new Polar(positions, radiusMm);
  known.set(positions, made);
  return made;
}

/** Between which distances from the z axis each triangle lies, rounded outwards, mm: a quick way to pass most by. */
export interface RadialSpans {
  readonly innerMm: Float32Array;
  readonly outerMm: Float32Array;
}

const spansKnown = new WeakMap<Float64Array, { triangles: Uint32Array; spans: RadialSpans }>();
/** More than a 32-bit float rounds by. */
const ROUNDING = 2e-7;

/** The radial spans of a mesh's triangles, kept like its polar coordinates. */
export function radialSpans(mesh: Mesh): RadialSpans {
  const kept = spansKnown.get(mesh.positions);
  if (kept?.triangles === mesh.triangles) return kept.spans;
  const { positions: p, triangles } = mesh;
  const { radiusMm } = polarOf(p);
  const count = triangles.length / 3;
  const innerMm = new Float32Array(count);
  const outerMm = new Float32Array(count);
  for (let t = 0; t < count; t++) {
    const a = triangles[3 * t] ?? 0;
    const b = triangles[3 * t + 1] ?? 0;
    const c = triangles[3 * t + 2] ?? 0;
    const ra = radiusMm[a] ?? 0;
    const rb = radiusMm[b] ?? 0;
    const rc = radiusMm[c] ?? 0;
    const outer = ra > rb ? (ra > rc ? ra : rc) : rb > rc ? rb : rc;
    const least = ra < rb ? (ra < rc ? ra : rc) : rb < rc ? rb : rc;
    // No point of an edge is farther from its nearer end than half its length.
    const width = span(p[3 * a] ?? 0, p[3 * b] ?? 0, p[3 * c] ?? 0);
    const depth = span(p[3 * a + 1] ?? 0, p[3 * b + 1] ?? 0, p[3 * c + 1] ?? 0);
    const inner = least - (width + depth) / 2;
    innerMm[t] = inner - ROUNDING * outer;
    outerMm[t] = outer + ROUNDING * outer;
  }
  const spans = { innerMm, outerMm };
  spansKnown.set(p, { triangles, spans });
  return spans;
}

const span = (a: number, b: number, c: number): number => Math.max(a, b, c) - Math.min(a, b, c);

/** Largest distance from the z axis of the triangles that aren't left out (`shellOf` −1), mm; 0 for none. */
export function outerRadius(mesh: Mesh, shellOf: Int32Array): number {
  const { radiusMm } = polarOf(mesh.positions);
  const { triangles } = mesh;
  const { outerMm } = radialSpans(mesh);
  let most = 0;
  for (let t = 0; t < shellOf.length; t++) {
    if ((outerMm[t] ?? 0) <= most || (shellOf[t] ?? -1) < 0) continue;
    for (let i = 3 * t; i < 3 * t + 3; i++) most = Math.max(most, radiusMm[triangles[i] ?? 0] ?? 0);
  }
  return most;
}

/**
 * Largest distance from the z axis of what the triangles that aren't left out (`shellOf` −1) have between two heights,
 * mm; undefined where there is nothing. A wall that reaches past both heights counts with what lies between them.
 */
export function outermostBetween(mesh: Mesh, shellOf: Int32Array, fromMm: number, toMm: number): number | undefined {
  const { positions: p, triangles } = mesh;
  const { radiusMm } = polarOf(p);
  const { outerMm } = radialSpans(mesh);
  let most = -1;
  for (let t = 0; t < shellOf.length; t++) {
    if ((outerMm[t] ?? 0) <= most || (shellOf[t] ?? -1) < 0) continue;
    let v = triangles[3 * t + 2] ?? 0;
    for (let i = 3 * t; i < 3 * t + 3; i++) {
      const w = triangles[i] ?? 0;
      const [a, b] = [p[3 * v + 2] ?? 0, p[3 * w + 2] ?? 0];
      if (b >= fromMm && b <= toMm) most = Math.max(most, radiusMm[w] ?? 0);
      for (const height of [fromMm, toMm]) {
        // The distance is a convex function, so that corners of the cut triangle are farthest.
        if ((a - height) * (b - height) >= 0) continue;
        const share = (height - a) / (b - a);
        const x = (p[3 * v] ?? 0) + share * ((p[3 * w] ?? 0) - (p[3 * v] ?? 0));
        const y = (p[3 * v + 1] ?? 0) + share * ((p[3 * w + 1] ?? 0) - (p[3 * v + 1] ?? 0));
        most = Math.max(most, Math.sqrt(x * x + y * y));
      }
      v = w;
    }
  }
  return most < 0 ? undefined : most;
}
