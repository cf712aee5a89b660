import type { Mesh } from "./mesh";
import { STL_HEADER_BYTES, STL_RECORD_BYTES } from "./stl-binary";

/**
 * A mesh (mm) as a binary STL (LoC fdd000505): header of 80 bytes, count, 50 bytes a triangle, normals by the right-hand
 * rule, single precision. The header begins with `title`, cut to 80 characters of ASCII and never with "solid".
 */
export function writeBinaryStl({ positions, triangles }: Mesh, title: string): Uint8Array<ArrayBuffer> {
  const count = triangles.length / 3;
  const bytes = new Uint8Array(STL_HEADER_BYTES + STL_RECORD_BYTES * count);
  const view = new DataView(bytes.buffer);
  const head = title.replace(/^solid/i, "a solid").replace(/[^\x20-\x7e]/g, "?");
  for (let i = 0; i < 80; i++) bytes[i] = i < head.length ? head.charCodeAt(i) : 0x20;
  view.setUint32(80, count, true);
  for (let t = 0; t < count; t++) {
    const corners = [0, 1, 2].map((k) => {
      const from = 3 * (triangles[3 * t + k] ?? 0);
      return [positions[from] ?? 0, positions[from + 1] ?? 0, positions[from + 2] ?? 0] as const;
    });
    const at = STL_HEADER_BYTES + STL_RECORD_BYTES * t;
    [normalOf(corners), ...corners].forEach((vector, k) =>
      vector.forEach((value, axis) => view.setFloat32(at + 12 * k + 4 * axis, value, true)),
    );
  }
  return bytes;
}

type Point = readonly [number, number, number];

function normalOf([a = [0, 0, 0], b = [0, 0, 0], c = [0, 0, 0]]: readonly Point[]): Point {
  const [ux, uy, uz] = [b[0] - a[0], b[1] - a[1], b[2] - a[2]];
  const [vx, vy, vz] = [c[0] - a[0], c[1] - a[1], c[2] - a[2]];
  const [x, y, z] = [uy * vz - uz * vy, uz * vx - ux * vz, ux * vy - uy * vx];
  const length = Math.hypot(x, y, z);
  return length > 0 ? [x / length, y / length, z / length] : [0, 0, 0];
}

/** Meshes as one; their vertices stay apart. */
export function joinMeshes(meshes: readonly Mesh[]): Mesh {
  const positions = new Float64Array(meshes.reduce((sum, mesh) => sum + mesh.positions.length, 0));
  const triangles = new Uint32Array(meshes.reduce((sum, mesh) => sum + mesh.triangles.length, 0));
  let [atPosition, atTriangle] = [0, 0];
  for (const mesh of meshes) {
    const first = atPosition / 3;
    positions.set(mesh.positions, atPosition);
    for (const vertex of mesh.triangles) triangles[atTriangle++] = first + vertex;
    atPosition += mesh.positions.length;
  }
  return { positions, triangles };
}
