import { Inflate } from "fflate";
import { Refusal } from "@/lib/science/refusal";
import type { ByteSource, ReadingWatch } from "./reading";

/** One file inside a zip, as its central directory names it. */
export interface ZipEntry {
  readonly name: string;
  readonly method: number;
  readonly packedBytes: number;
  readonly headerOffset: number;
}

const ENTRIES_MAX = 512;
const DIRECTORY_BYTES_MAX = 1_048_576;
const COMMENT_BYTES_MAX = 65_535;
const CHUNK_BYTES = 65_536;
/** Deflate can expand 1032 times; text of a mesh expands some 3 to 30 times. */
const EXPANSION_MAX = 200;
/** Small entries may expand more: a short file of spaces is harmless. */
const EXPANSION_FREE_BYTES = 4_194_304;

const broken = (why: string) => new Refusal("zip-broken", `The zip container can't be read: ${why}.`);

/**
 * The central directory of a zip. Nothing is inflated. Throws a Refusal for too many entries, encryption, methods
 * other than stored and Deflate, duplicate names, entries that overlap, Zip64 and split archives. PKWARE APPNOTE 4.3.
 */
export async function zipDirectory(source: ByteSource): Promise<ZipEntry[]> {
  const tailLength = Math.min(source.size, 22 + COMMENT_BYTES_MAX);
  const tail = view(await source.read(source.size - tailLength, tailLength));
  let end = tail.byteLength - 22;
  while (end >= 0 && tail.getUint32(end, true) !== 0x06054b50) end--;
  if (end < 0) throw broken("its directory is missing, so the file may have been cut short");
  const count = tail.getUint16(end + 10, true);
  const length = tail.getUint32(end + 12, true);
  const offset = tail.getUint32(end + 16, true);
  if (count === 0xffff || offset === 0xffffffff) throw broken("it is a Zip64 archive");
  if (count > ENTRIES_MAX || length > DIRECTORY_BYTES_MAX)
    throw new Refusal("zip-entries", "The zip has too many entries.");
  if (offset + length > source.size) throw broken("its directory lies outside the file");
  const entries = parseDirectory(view(await source.read(offset, length)), count);
  refuseOverlaps(entries, offset);
  return entries;
}

function view(bytes: Uint8Array): DataView {
  return new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
}

function parseDirectory(directory: DataView, count: number): ZipEntry[] {
  const entries: ZipEntry[] = [];
  const names = new Set<string>();
  let cursor = 0;
  for (let i = 0; i < count; i++) {
    if (cursor + 46 > directory.byteLength || directory.getUint32(cursor, true) !== 0x02014b50) {
      throw broken("its directory is damaged");
    }
    const nameLength = directory.getUint16(cursor + 28, true);
    const next =
      cursor + 46 + nameLength + directory.getUint16(cursor + 30, true) + directory.getUint16(cursor + 32, true);
    if (next > directory.byteLength) throw broken("its directory is damaged");
    const nameBytes = new Uint8Array(directory.buffer, directory.byteOffset + cursor + 46, nameLength);
    const name = new TextDecoder().decode(nameBytes).replace(/^\//, "");
    if ((directory.getUint16(cursor + 8, true) & 1) !== 0) throw broken("it is encrypted");
    if (names.has(name.toLowerCase())) throw broken("a name stands in it twice");
    names.add(name.toLowerCase());
    entries.push({
      name,
      method: directory.getUint16(cursor + 10, true),
      packedBytes: directory.getUint32(cursor + 20, true),
      headerOffset: directory.getUint32(cursor + 42, true),
    });
    cursor = next;
  }
  return entries;
}

function refuseOverlaps(entries: readonly ZipEntry[], directoryOffset: number): void {
  const sorted = [...entries].sort((a, b) => a.headerOffset - b.headerOffset);
  sorted.forEach((entry, i) => {
    const limit = sorted[i + 1]?.headerOffset ?? directoryOffset;
    if (entry.headerOffset + 30 + entry.packedBytes > limit) {
      throw new Refusal("zip-overlap", "Entries of the zip overlap, as in a zip bomb.");
    }
  });
}

/**
 * The bytes of one entry in pieces. The size that the zip claims is not believed: what comes out is counted, and a
 * Refusal is thrown when it expands too much or passes the limit.
 * @param spent bytes inflated so far over the whole file; it is added to
 */
export async function* zipEntryBytes(
  source: ByteSource,
  entry: ZipEntry,
  watch: ReadingWatch,
  spent: { bytes: number },
): AsyncGenerator<Uint8Array> {
  if (entry.method !== 0 && entry.method !== 8) throw broken("it is packed by a method other than Deflate");
  const header = view(await source.read(entry.headerOffset, 30));
  if (header.byteLength < 30 || header.getUint32(0, true) !== 0x04034b50) throw broken("an entry has no header");
  const start = entry.headerOffset + 30 + header.getUint16(26, true) + header.getUint16(28, true);
  const out: Uint8Array[] = [];
  const inflate = new Inflate((bytes) => out.push(bytes));
  let [packed, unpacked] = [0, 0];
  for (let done = 0; done < entry.packedBytes; done += CHUNK_BYTES) {
    const chunk = await source.read(start + done, Math.min(CHUNK_BYTES, entry.packedBytes - done));
    if (chunk.length === 0) throw broken("an entry is cut short");
    packed += chunk.length;
    if (entry.method === 0) out.push(chunk);
    // Small pieces bound what one step can expand to: 4 kB give 4 MB at the very most.
    else
      for (let i = 0; i < chunk.length; i += 4096)
        push(inflate, chunk.slice(i, i + 4096), done + i + 4096 >= entry.packedBytes);
    for (const bytes of out) {
      unpacked += bytes.length;
      spent.bytes += bytes.length;
      if (spent.bytes > watch.limits.inflatedBytesMax)
        throw new Refusal("zip-bomb", "The zip expands to too many bytes.");
      if (unpacked > EXPANSION_FREE_BYTES && unpacked > EXPANSION_MAX * packed) {
        throw new Refusal("zip-bomb", `The zip expands more than ${EXPANSION_MAX} times, as no mesh does.`);
      }
      yield bytes;
    }
    out.length = 0;
  }
}

function push(inflate: Inflate, bytes: Uint8Array, last: boolean): void {
  try {
    inflate.push(bytes, last);
  } catch {
    throw broken("an entry's data are damaged");
  }
}
