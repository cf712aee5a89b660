/** A point or direction: x, y, z. */
export type Vec3 = readonly [number, number, number];

/**
 * A triangle mesh in millimetres. `positions` holds x, y, z of each vertex in turn; `triangles` holds three vertex
 * numbers a triangle, anticlockwise seen from outside. Vertices are shared: equal positions have one number.
 */
export interface Mesh {
  readonly positions: Float64Array;
  readonly triangles: Uint32Array;
}

/** Axis-aligned box, mm. */
export interface Bounds {
  readonly min: Vec3;
  readonly max: Vec3;
}

/** Number of triangles of a mesh. */
export function triangleCount(mesh: Mesh): number {
  return mesh.triangles.length / 3;
}

/** Number of vertices of a mesh. */
export function vertexCount(mesh: Mesh): number {
  return mesh.positions.length / 3;
}

/** Element of an array of numbers whose index is known to be in range; throws a RangeError outside it. */
export function at(values: ArrayLike<number>, index: number): number {
  const value = values[index];
  if (value === undefined) throw new RangeError(`index ${index} of ${values.length}`);
  return value;
}

/** Position of one vertex, mm. Throws a RangeError for a vertex that isn't there. */
export function vertexAt(mesh: Mesh, vertex: number): Vec3 {
  const start = 3 * vertex;
  return [at(mesh.positions, start), at(mesh.positions, start + 1), at(mesh.positions, start + 2)];
}

/** Box around the vertices that triangles use, mm; undefined for a mesh without triangles. */
export function meshBounds(mesh: Mesh): Bounds | undefined {
  const { positions, triangles } = mesh;
  if (triangles.length === 0) return undefined;
  // Marking is far quicker than fetching each vertex six times over; the marks fit the processor's cache.
  const used = new Uint8Array(positions.length / 3);
  for (let i = 0; i < triangles.length; i++) used[triangles[i] ?? 0] = 1;
  let [x0, y0, z0] = [Infinity, Infinity, Infinity];
  let [x1, y1, z1] = [-Infinity, -Infinity, -Infinity];
  for (let v = 0; v < used.length; v++) {
    if (used[v] === 0) continue;
    const x = positions[3 * v] ?? 0;
    const y = positions[3 * v + 1] ?? 0;
    const z = positions[3 * v + 2] ?? 0;
    if (x < x0) x0 = x;
    if (x > x1) x1 = x;
    if (y < y0) y0 = y;
    if (y > y1) y1 = y;
    if (z < z0) z0 = z;
    if (z > z1) z1 = z;
  }
  return { min: [x0, y0, z0], max: [x1, y1, z1] };
}

/** Volume by signed tetrahedra about the first vertex, mm³; meaningless for an open mesh, 0 for one without triangles. */
export function signedVolume({ positions: p, triangles }: Mesh): number {
  const [ox, oy, oz] = [p[0] ?? 0, p[1] ?? 0, p[2] ?? 0];
  let six = 0;
  for (let i = 0; i < triangles.length; i += 3) {
    const a = 3 * (triangles[i] ?? 0);
    const b = 3 * (triangles[i + 1] ?? 0);
    const c = 3 * (triangles[i + 2] ?? 0);
    const ax = (p[a] ?? 0) - ox;
    const ay = (p[a + 1] ?? 0) - oy;
    const az = (p[a + 2] ?? 0) - oz;
    const bx = (p[b] ?? 0) - ox;
    const by = (p[b + 1] ?? 0) - oy;
    const bz = (p[b + 2] ?? 0) - oz;
    const cx = (p[c] ?? 0) - ox;
    const cy = (p[c + 1] ?? 0) - oy;
    const cz = (p[c + 2] ?? 0) - oz;
    six += ax * (by * cz - bz * cy) + ay * (bz * cx - bx * cz) + az * (bx * cy - by * cx);
  }
  return six / 6;
}

/** Length of the space diagonal of a box, mm. */
export function diagonalMm(bounds: Bounds): number {
  return Math.hypot(bounds.max[0] - bounds.min[0], bounds.max[1] - bounds.min[1], bounds.max[2] - bounds.min[2]);
}

/** Middle of a box, mm. */
export function middleOf({ min, max }: Bounds): Vec3 {
  return [(min[0] + max[0]) / 2, (min[1] + max[1]) / 2, (min[2] + max[2]) / 2];
}

/** The same mesh with every position multiplied by `scale` (for example 25.4 for inches). */
export function scaledMesh(mesh: Mesh, scale: number): Mesh {
  return { positions: mesh.positions.map((value) => value * scale), triangles: mesh.triangles };
}
