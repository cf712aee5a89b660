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
  readonly evenFloats = new Float32Array(this.even.buffer);
  readonly oddFloats = new Float32Array(this.odd.buffer);
  private readonly evenBytes = new Uint8Array(this.even.buffer);
  private readonly oddBytes = new Uint8Array(this.odd.buffer);

  set(chunk: Uint8Array): void {
    this.evenBytes.set(chunk);
    this.oddBytes.set(chunk, 2);
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
  const byParity = new AlignedRecords();
  let against = 0;
  const nextChunk = chunksOf(source, triangles);
  for (let first = 0; first < triangles; first += RECORDS_PER_CHUNK) {
    watch.step(first, triangles);
    const count = Math.min(RECORDS_PER_CHUNK, triangles - first);
    await nextChunk(first, byParity);
    for (let record = 0; record < count; record++) {
      const from = (record & 1) === 0 ? byParity.even : byParity.odd;
      const start = (STL_RECORD_BYTES * record + 2) >> 2;
      const to = 3 * (first + record);
      for (let corner = 0; corner < 3; corner++) {
        const at = start + 3 + 3 * corner;
        const x = from[at] ?? 0;
        const y = from[at + 1] ?? 0;
        const z = from[at + 2] ?? 0;
        if ((x & EXPONENT) === EXPONENT || (y & EXPONENT) === EXPONENT || (z & EXPONENT) === EXPONENT) {
          throw new Refusal("not-finite", "A vertex is not a finite number.", first + record + 1);
        }
        out[to + corner] = weld.add(withoutSign(x), withoutSign(y), withoutSign(z));
      }
      if (record % NORMALS_EVERY !== 0) continue;
      if (normalIsAgainst((record & 1) === 0 ? byParity.evenFloats : byParity.oddFloats, start)) against++;
    }
  }
  watch.step(triangles, triangles);
  return { mesh: { positions: weld.finish(), triangles: out }, normalsAgainst: NORMALS_EVERY * against, warnings: [] };
}

/** Copies one chunk after the other; the next is fetched while the last is gone through. */
function chunksOf(source: ByteSource, triangles: number): (first: number, into: AlignedRecords) => Promise<void> {
  const lengthFrom = (first: number) => STL_RECORD_BYTES * Math.min(RECORDS_PER_CHUNK, triangles - first);
  const fetchFrom = async (first: number) =>
    source.read(STL_HEADER_BYTES + STL_RECORD_BYTES * first, lengthFrom(first));
  let ahead: Promise<Uint8Array> | undefined;
  return async (first, into) => {
    const chunk = await (ahead ?? fetchFrom(first));
    if (chunk.length < lengthFrom(first)) {
      throw new Refusal("truncated", "The file ends inside its triangles.", first + 1);
    }
    into.set(chunk);
    const next = first + RECORDS_PER_CHUNK;
    if (next >= triangles) return;
    ahead = fetchFrom(next);
    // A reading that ends early waits for nothing more.
    ahead.catch(() => undefined);
  };
}

/** The bits of a number, −0 as 0. */
const withoutSign = (word: number): number => (word === NEGATIVE_ZERO ? 0 : word);

/** True when the stored normal (three floats from `at`) points against the winding of the vertices (nine floats more). */
function normalIsAgainst(f: Float32Array, at: number): boolean {
  const x0 = f[at + 3] ?? 0;
  const y0 = f[at + 4] ?? 0;
  const z0 = f[at + 5] ?? 0;
  const ax = (f[at + 6] ?? 0) - x0;
  const ay = (f[at + 7] ?? 0) - y0;
  const az = (f[at + 8] ?? 0) - z0;
  const bx = (f[at + 9] ?? 0) - x0;
  const by = (f[at + 10] ?? 0) - y0;
  const bz = (f[at + 11] ?? 0) - z0;
  const dot =
    (ay * bz - az * by) * (f[at] ?? 0) +
    (az * bx - ax * bz) * (f[at + 1] ?? 0) +
    (ax * by - ay * bx) * (f[at + 2] ?? 0);
  return dot < 0;
}
