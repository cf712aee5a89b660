import { BitWeld } from "./bit-weld";
import { Refusal } from "@/lib/science/refusal";
import type { Mesh } from "./mesh";
import type { ByteSource, MeshWarning, ReadingWatch } from "./reading";

/** Bytes before the first triangle: an 80-byte header and the count. */
export const STL_HEADER_BYTES = 84;
/** Bytes of one triangle: normal, three vertices, attribute. */
export const STL_RECORD_BYTES = 50;
const RECORDS_PER_CHUNK = 10_000;
/** Stored normals are only looked at in a sample. */
const NORMALS_EVERY = 8;
/** Bits of −0, and of the exponent that only infinities and NaN fill (IEEE 754-2019, 3.4, binary32). */
const NEGATIVE_ZERO = 0x80000000 | 0;
const EXPONENT = 0x7f800000;

/** Length in bytes of a binary STL of so many triangles (Library of Congress FDD fdd000505). */
export function binaryStlBytes(triangles: number): number {
  return STL_HEADER_BYTES + STL_RECORD_BYTES * triangles;
}

/** What `readBinaryStl` hands back. Normals that point the other way than the winding are counted (about, from a sample), never used. */
export interface StlReading {
  readonly mesh: Mesh;
  readonly normalsAgainst: number;
  readonly warnings: MeshWarning[];
}

/** A chunk of records as 32-bit words: every other record lies two bytes off a whole word, so it is there twice. */
class AlignedRecords {
  private readonly bytes = RECORDS_PER_CHUNK * STL_RECORD_BYTES;
  readonly even = new Int32Array(this.bytes / 4 + 1);
  readonly odd = new Int32Array(this.bytes / 4 + 1);

  set(chunk: Uint8Array): void {
    new Uint8Array(this.even.buffer).set(chunk);
    new Uint8Array(this.odd.buffer).set(chunk, 2);
  }
}

/**
 * Reads `triangles` records of a binary STL in chunks, welding as it goes; coordinates as in the file.
 * Throws a Refusal for a record with NaN or infinite coordinates (`at` = triangle, from 1) and for a source that ends
 * early. Layout: Library of Congress FDD fdd000505; records lie on even bytes only, so a second copy of each chunk stands two bytes on.
 */
export async function readBinaryStl(source: ByteSource, triangles: number, watch: ReadingWatch): Promise<StlReading> {
  if (triangles > watch.limits.trianglesMax) watch.refuseTriangles(triangles);
  const weld = new BitWeld(0.52 * triangles);
  const out = new Uint32Array(3 * triangles);
  const words = new Int32Array(12);
  const floats = new Float32Array(words.buffer);
  const byParity = new AlignedRecords();
  let against = 0;
  for (let first = 0; first < triangles; first += RECORDS_PER_CHUNK) {
    watch.step(first, triangles);
    const count = Math.min(RECORDS_PER_CHUNK, triangles - first);
    const length = count * STL_RECORD_BYTES;
    const chunk = await source.read(STL_HEADER_BYTES + first * STL_RECORD_BYTES, length);
    if (chunk.length < length) throw new Refusal("truncated", "The file ends inside its triangles.", first + 1);
    byParity.set(chunk);
    for (let record = 0; record < count; record++) {
      const from = (record & 1) === 0 ? byParity.even : byParity.odd;
      const start = (STL_RECORD_BYTES * record + 2) >> 2;
      let finite = true;
      for (let i = 0; i < 12; i++) {
        const word = from[start + i] ?? 0;
        words[i] = word === NEGATIVE_ZERO ? 0 : word;
        if (i > 2 && (word & EXPONENT) === EXPONENT) finite = false;
      }
      if (!finite) throw new Refusal("not-finite", "A vertex is not a finite number.", first + record + 1);
      const to = 3 * (first + record);
      out[to] = weld.add(words[3] ?? 0, words[4] ?? 0, words[5] ?? 0);
      out[to + 1] = weld.add(words[6] ?? 0, words[7] ?? 0, words[8] ?? 0);
      out[to + 2] = weld.add(words[9] ?? 0, words[10] ?? 0, words[11] ?? 0);
      if (record % NORMALS_EVERY === 0 && normalIsAgainst(floats)) against++;
    }
  }
  watch.step(triangles, triangles);
  return { mesh: { positions: weld.finish(), triangles: out }, normalsAgainst: NORMALS_EVERY * against, warnings: [] };
}

/** True when the stored normal (floats 0–2) points against the winding of the vertices (floats 3–11). */
function normalIsAgainst(f: Float32Array): boolean {
  const x0 = f[3] ?? 0;
  const y0 = f[4] ?? 0;
  const z0 = f[5] ?? 0;
  const ax = (f[6] ?? 0) - x0;
  const ay = (f[7] ?? 0) - y0;
  const az = (f[8] ?? 0) - z0;
  const bx = (f[9] ?? 0) - x0;
  const by = (f[10] ?? 0) - y0;
  const bz = (f[11] ?? 0) - z0;
  const dot = (ay * bz - az * by) * (f[0] ?? 0) + (az * bx - ax * bz) * (f[1] ?? 0) + (ax * by - ay * bx) * (f[2] ?? 0);
  return dot < 0;
}
