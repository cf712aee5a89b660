import { strToU8, zipSync } from "fflate";
import type { Mesh, Vec3 } from "@/lib/science/geometry/mesh";
import { memorySource } from "@/lib/science/geometry/reading";
import { ReadingWatch, type ReadingControl } from "@/lib/science/geometry/reading";
import { readModelFile, type ModelReading } from "@/lib/science/geometry/model-file";

const MODEL_NAMESPACE = "http://schemas.microsoft.com/3dmanufacturing/core/2015/02";
const MODEL_TYPE = "http://schemas.microsoft.com/3dmanufacturing/2013/01/3dmodel";

/** A mesh from nested arrays. */
export function meshOf(vertices: readonly (readonly number[])[], faces: readonly (readonly number[])[]): Mesh {
  return { positions: Float64Array.from(vertices.flat()), triangles: Uint32Array.from(faces.flat()) };
}

/** Several meshes as one; vertices aren't shared. */
export function together(...meshes: readonly Mesh[]): Mesh {
  const positions: number[] = [];
  const triangles: number[] = [];
  for (const mesh of meshes) {
    const first = positions.length / 3;
    for (const value of mesh.positions) positions.push(value);
    for (const vertex of mesh.triangles) triangles.push(first + vertex);
  }
  return { positions: Float64Array.from(positions), triangles: Uint32Array.from(triangles) };
}

/** A box from its lowest corner and sizes. */
export function boxMesh([x, y, z]: Vec3, [dx, dy, dz]: Vec3): Mesh {
  const corner = (i: number) => [x + (i & 1) * dx, y + ((i >> 1) & 1) * dy, z + ((i >> 2) & 1) * dz];
  const faces = [
    [0, 2, 3, 1],
    [4, 5, 7, 6],
    [0, 1, 5, 4],
    [2, 6, 7, 3],
    [0, 4, 6, 2],
    [1, 3, 7, 5],
  ];
  const triangles = faces.flatMap(([a = 0, b = 0, c = 0, d = 0]) => [
    [a, b, c],
    [a, c, d],
  ]);
  return meshOf(
    Array.from({ length: 8 }, (_, i) => corner(i)),
    triangles,
  );
}

/** A tube about z between two radii (a prism for an inner radius of 0) and two heights. */
export function tubeMesh(inner: number, outer: number, from: number, to: number, facets: number): Mesh {
  const vertices: number[][] = [];
  const faces: number[][] = [];
  const at = (k: number, i: number) => 4 * (k % facets) + i;
  for (let k = 0; k < facets; k++) {
    const [c, s] = [Math.cos((2 * Math.PI * k) / facets), Math.sin((2 * Math.PI * k) / facets)];
    vertices.push([outer * c, outer * s, from], [outer * c, outer * s, to]);
    vertices.push([inner * c, inner * s, to], [inner * c, inner * s, from]);
    for (let i = 0; i < 4; i++) {
      const [a, b, d, e] = [at(k, i), at(k + 1, i), at(k + 1, (i + 1) % 4), at(k, (i + 1) % 4)];
      faces.push([a, b, d], [a, d, e]);
    }
  }
  return meshOf(vertices, faces);
}

/** A body of revolution about z through a closed profile of (radius, height), anticlockwise in the r–z plane. */
export function revolvedMesh(profile: readonly (readonly [number, number])[], facets: number): Mesh {
  const n = profile.length;
  const vertices = Array.from({ length: facets }, (_, k) => {
    const [c, s] = [Math.cos((2 * Math.PI * k) / facets), Math.sin((2 * Math.PI * k) / facets)];
    return profile.map(([r, z]) => [r * c, r * s, z]);
  }).flat();
  const at = (k: number, i: number) => n * (k % facets) + (i % n);
  const faces = Array.from({ length: facets }, (_, k) =>
    profile.flatMap((_point, i) => {
      const [a, b, c, d] = [at(k, i), at(k + 1, i), at(k + 1, i + 1), at(k, i + 1)];
      return [
        [a, b, c],
        [a, c, d],
      ];
    }),
  ).flat();
  return meshOf(vertices, faces);
}

/** Turned about an axis through the origin (length 1, angle in rad, right-handed), then shifted. */
export function moved(mesh: Mesh, axis: Vec3, angleRad: number, shift: Vec3): Mesh {
  const [c, s] = [Math.cos(angleRad), Math.sin(angleRad)];
  const [x, y, z] = axis;
  const out = new Float64Array(mesh.positions.length);
  for (let i = 0; i < out.length; i += 3) {
    const [px = 0, py = 0, pz = 0] = mesh.positions.subarray(i, i + 3);
    const along = (x * px + y * py + z * pz) * (1 - c);
    out[i] = px * c + (y * pz - z * py) * s + x * along + shift[0];
    out[i + 1] = py * c + (z * px - x * pz) * s + y * along + shift[1];
    out[i + 2] = pz * c + (x * py - y * px) * s + z * along + shift[2];
  }
  return { positions: out, triangles: mesh.triangles };
}

/** Without some triangles, by their numbers. */
export function withoutTriangles(mesh: Mesh, numbers: readonly number[]): Mesh {
  const triangles = mesh.triangles.filter((_, i) => !numbers.includes(Math.floor(i / 3)));
  return { positions: mesh.positions, triangles };
}

/** With every triangle the other way round. */
export function insideOut(mesh: Mesh): Mesh {
  const triangles = mesh.triangles.map((_, i, all) => all[i - (i % 3) + ((3 - (i % 3)) % 3)] ?? 0);
  return { positions: mesh.positions, triangles };
}

/** Bytes of a binary STL, normals left at zero; the count field may be made to lie. */
export function binaryStl(mesh: Mesh, header = "made by a test", count = mesh.triangles.length / 3): Uint8Array {
  const triangles = mesh.triangles.length / 3;
  const bytes = new Uint8Array(84 + 50 * triangles);
  const view = new DataView(bytes.buffer);
  bytes.set(strToU8(header.padEnd(80)).subarray(0, 80));
  view.setUint32(80, count, true);
  for (let i = 0; i < mesh.triangles.length; i++) {
    const offset = 84 + 50 * Math.floor(i / 3) + 12 + 12 * (i % 3);
    for (let axis = 0; axis < 3; axis++) {
      view.setFloat32(offset + 4 * axis, mesh.positions[3 * (mesh.triangles[i] ?? 0) + axis] ?? 0, true);
    }
  }
  return bytes;
}

/** XML of one 3MF object. */
export function objectXml(id: number, mesh: Mesh): string {
  const vertices: string[] = [];
  for (let i = 0; i < mesh.positions.length; i += 3) {
    vertices.push(`<vertex x="${mesh.positions[i]}" y="${mesh.positions[i + 1]}" z="${mesh.positions[i + 2]}"/>`);
  }
  const triangles: string[] = [];
  for (let i = 0; i < mesh.triangles.length; i += 3) {
    triangles.push(`<triangle v1="${mesh.triangles[i]}" v2="${mesh.triangles[i + 1]}" v3="${mesh.triangles[i + 2]}"/>`);
  }
  const body = `<vertices>${vertices.join("")}</vertices><triangles>${triangles.join("")}</triangles>`;
  return `<object id="${id}" type="model"><mesh>${body}</mesh></object>`;
}

/** Bytes of a 3MF package around the XML of its resources and build items. */
export function threeMf(resources: string, items: string, unit = "millimeter", before = ""): Uint8Array {
  const model = `<?xml version="1.0"?>${before}<model unit="${unit}" xmlns="${MODEL_NAMESPACE}"><resources>${resources}</resources><build>${items}</build></model>`;
  return threeMfPackage(strToU8(model));
}

/** Bytes of a 3MF package with any model part. */
export function threeMfPackage(model: Uint8Array): Uint8Array {
  const rels = `<Relationships><Relationship Target="/3D/fan.model" Id="r0" Type="${MODEL_TYPE}"/></Relationships>`;
  return zipSync({ "_rels/.rels": strToU8(rels), "3D/fan.model": model });
}

/** Reads bytes as a model file. */
export function readBytes(bytes: Uint8Array, control: ReadingControl = {}): Promise<ModelReading> {
  return readModelFile(memorySource(bytes), control);
}

/** Code of the refusal that reading ends in; "read" when it is read. */
export async function refusalOf(bytes: Uint8Array, control: ReadingControl = {}): Promise<string> {
  try {
    await readBytes(bytes, control);
    return "read";
  } catch (error) {
    return error instanceof Error && "code" in error ? String(error.code) : `unexpected: ${String(error)}`;
  }
}

/** A watch without limits or progress, for readers called directly. */
export const idleWatch = (): ReadingWatch => new ReadingWatch();
