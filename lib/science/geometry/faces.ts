import type { Mesh, Vec3 } from "./mesh";

/** Unit normal, middle and area of each triangle of a mesh, in flat arrays (three numbers a triangle for vectors). */
export interface Faces {
  readonly normals: Float64Array;
  readonly middlesMm: Float64Array;
  readonly areasMm2: Float64Array;
}

/** Normals (by winding), middles and areas; a triangle without area has the normal 0, 0, 0. */
export function facesOf(mesh: Mesh): Faces {
  const { positions: p, triangles } = mesh;
  const count = triangles.length / 3;
  const normals = new Float64Array(3 * count);
  const middlesMm = new Float64Array(3 * count);
  const areasMm2 = new Float64Array(count);
  for (let t = 0; t < count; t++) {
    const i = 3 * (triangles[3 * t] ?? 0);
    const j = 3 * (triangles[3 * t + 1] ?? 0);
    const k = 3 * (triangles[3 * t + 2] ?? 0);
    const ax = p[i] ?? 0;
    const ay = p[i + 1] ?? 0;
    const az = p[i + 2] ?? 0;
    const ux = (p[j] ?? 0) - ax;
    const uy = (p[j + 1] ?? 0) - ay;
    const uz = (p[j + 2] ?? 0) - az;
    const vx = (p[k] ?? 0) - ax;
    const vy = (p[k + 1] ?? 0) - ay;
    const vz = (p[k + 2] ?? 0) - az;
    const nx = uy * vz - uz * vy;
    const ny = uz * vx - ux * vz;
    const nz = ux * vy - uy * vx;
    const double = Math.sqrt(nx * nx + ny * ny + nz * nz);
    areasMm2[t] = double / 2;
    middlesMm[3 * t] = ax + (ux + vx) / 3;
    middlesMm[3 * t + 1] = ay + (uy + vy) / 3;
    middlesMm[3 * t + 2] = az + (uz + vz) / 3;
    if (double === 0) continue;
    normals[3 * t] = nx / double;
    normals[3 * t + 1] = ny / double;
    normals[3 * t + 2] = nz / double;
  }
  return { normals, middlesMm, areasMm2 };
}

/** One row of a flat array of vectors. */
export function vectorAt(values: Float64Array, index: number): Vec3 {
  return [values[3 * index] ?? 0, values[3 * index + 1] ?? 0, values[3 * index + 2] ?? 0];
}
