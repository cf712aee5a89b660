import { closeSync, openSync, writeSync } from "node:fs";

const AROUND = 1000;
const ACROSS = 500;

/** Number of triangles in the file. */
export const MESH_TRIANGLES = 2 * AROUND * ACROSS;

/**
 * How the triangles of a grid come to lie in the file: strip by strip, both halves of each square together; all first
 * halves before all second ones, as array programs write grids; or shuffled (seeded).
 */
export type MeshOrder = "strips" | "halves" | "shuffled";

/** Writes a wavy torus of a million triangles as a binary STL in one of the orders; returns its bytes. */
export function writeMesh(file: string, written: MeshOrder): number {
  const half = MESH_TRIANGLES / 2;
  const order = Uint32Array.from({ length: MESH_TRIANGLES }, (_, i) =>
    written === "halves" ? 2 * (i % half) + Math.floor(i / half) : i,
  );
  if (written === "shuffled") shuffle(order);
  const bytes = new Uint8Array(84 + 50 * MESH_TRIANGLES);
  const view = new DataView(bytes.buffer);
  view.setUint32(80, MESH_TRIANGLES, true);
  order.forEach((triangle, slot) => {
    const quad = triangle >> 1;
    const [i, j] = [Math.floor(quad / ACROSS), quad % ACROSS];
    const corners = triangle % 2 === 0 ? [i, j, i + 1, j, i + 1, j + 1] : [i, j, i + 1, j + 1, i, j + 1];
    for (let corner = 0; corner < 3; corner++) {
      const [x, y, z] = point((corners[2 * corner] ?? 0) % AROUND, (corners[2 * corner + 1] ?? 0) % ACROSS);
      const at = 84 + 50 * slot + 12 + 12 * corner;
      view.setFloat32(at, x, true);
      view.setFloat32(at + 4, y, true);
      view.setFloat32(at + 8, z, true);
    }
  });
  const handle = openSync(file, "w");
  for (let done = 0; done < bytes.length;) done += writeSync(handle, bytes, done);
  closeSync(handle);
  return bytes.length;
}

function point(i: number, j: number): [number, number, number] {
  const [u, v] = [(2 * Math.PI * i) / AROUND, (2 * Math.PI * j) / ACROSS];
  const r = 40 + (14 + Math.sin(9 * u)) * Math.cos(v);
  return [r * Math.cos(u), r * Math.sin(u), 14 * Math.sin(v)];
}

function shuffle(order: Uint32Array): void {
  let seed = 12_345;
  for (let i = order.length - 1; i > 0; i--) {
    seed = (16_807 * seed) % 2_147_483_647;
    const other = seed % (i + 1);
    const kept = order[i] ?? 0;
    order[i] = order[other] ?? 0;
    order[other] = kept;
  }
}
