import type { Bounds, Mesh } from "../mesh";

/**
 * How deep a mesh's surface reaches into a box from each of its sides, mm: from −x, +x, −y, +y, −z, +z. The triangles
 * are clipped to the box, so that one that passes through with its corners outside counts. Undefined where none is in
 * it, also when the whole box is inside the mesh.
 */
export function reachIntoBox({ positions: p, triangles }: Mesh, { min, max }: Bounds): number[] | undefined {
  const reach = [0, 0, 0, 0, 0, 0];
  let met = false;
  for (let t = 0; t < triangles.length; t += 3) {
    let polygon = [0, 1, 2].map((corner) => {
      const at = 3 * (triangles[t + corner] ?? 0);
      return [p[at] ?? 0, p[at + 1] ?? 0, p[at + 2] ?? 0];
    });
    for (let axis = 0; axis < 3 && polygon.length > 0; axis++) {
      polygon = clipped(polygon, axis, 1, min[axis] ?? 0);
      polygon = clipped(polygon, axis, -1, max[axis] ?? 0);
    }
    for (const point of polygon) {
      met = true;
      for (let axis = 0; axis < 3; axis++) {
        const value = point[axis] ?? 0;
        reach[2 * axis] = Math.max(reach[2 * axis] ?? 0, value - (min[axis] ?? 0));
        reach[2 * axis + 1] = Math.max(reach[2 * axis + 1] ?? 0, (max[axis] ?? 0) - value);
      }
    }
  }
  return met ? reach : undefined;
}

/** The part of a polygon on one side of a plane across an axis (Sutherland & Hodgman 1974); `sign` 1 keeps what is above. */
export function clipped(polygon: readonly number[][], axis: number, sign: number, at: number): number[][] {
  return polygon.flatMap((from, i) => {
    const to = polygon[(i + 1) % polygon.length] ?? from;
    const [a, b] = [sign * ((from[axis] ?? 0) - at), sign * ((to[axis] ?? 0) - at)];
    const out = a >= 0 ? [from] : [];
    if (a < 0 === b < 0) return out;
    const share = a / (a - b);
    return [...out, from.map((value, k) => value + ((to[k] ?? 0) - value) * share)];
  });
}
