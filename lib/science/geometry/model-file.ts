import { Refusal } from "@/lib/science/refusal";
import type { Mesh } from "./mesh";
import { placed } from "./placed";
import { ReadingWatch, type ByteSource, type MeshWarning, type ReadingControl } from "./reading";
import { readAsciiStl } from "./stl-ascii";
import { STL_HEADER_BYTES, STL_RECORD_BYTES, binaryStlBytes, readBinaryStl, type StlReading } from "./stl-binary";
import { readThreeMf } from "./three-mf";

/** Formats that are recognised; STEP is kept and offered for download, not measured. */
export type ModelFormat = "stl-binary" | "stl-ascii" | "3mf" | "step";

/** A model file as read. Coordinates are in the file's unit: `mmPerUnit` is undefined where the file names none. */
export interface ModelReading {
  readonly format: ModelFormat;
  readonly mesh: Mesh;
  readonly mmPerUnit: number | undefined;
  readonly warnings: MeshWarning[];
}

interface Sniffed {
  readonly format: ModelFormat;
  readonly triangles: number;
  readonly warnings: MeshWarning[];
}

const SNIFF_BYTES = 8192;

/**
 * What a file is, from its bytes and length, never from its name: exact length of a binary STL first, whatever its
 * header says; then "solid" with a facet; then a binary STL with bytes left over. Throws a Refusal for anything else.
 */
export async function sniffModel(source: ByteSource): Promise<Sniffed> {
  if (source.size === 0) throw new Refusal("empty", "The file is empty.");
  const head = await source.read(0, SNIFF_BYTES);
  const text = new TextDecoder("latin1").decode(head).replace(/^ï»¿/, "").trimStart();
  if (text.startsWith("ISO-10303-21;")) return { format: "step", triangles: 0, warnings: [] };
  if (text.startsWith("PK\u0003\u0004")) return { format: "3mf", triangles: 0, warnings: [] };
  const ascii = /^solid\b/i.test(text);
  if (head.length >= STL_HEADER_BYTES) {
    const claimed = new DataView(head.buffer, head.byteOffset).getUint32(80, true);
    if (source.size === binaryStlBytes(claimed)) return { format: "stl-binary", triangles: claimed, warnings: [] };
    if (ascii && /\bfacet\b/i.test(text)) return { format: "stl-ascii", triangles: 0, warnings: [] };
    // Control characters are what a binary header's count and numbers are full of; a text has none.
    if (!ascii && !/[\u0000-\u0008\u000e-\u001f\u007f-\u009f]/.test(text)) throw unknown();
    return sniffUnevenBinary(claimed, source.size, ascii);
  }
  if (ascii) return { format: "stl-ascii", triangles: 0, warnings: [] };
  throw unknown();
}

const unknown = (): Refusal => new Refusal("unknown-format", "The file is neither STL nor 3MF nor STEP.");

function sniffUnevenBinary(claimed: number, size: number, ascii: boolean): Sniffed {
  const held = Math.floor((size - STL_HEADER_BYTES) / STL_RECORD_BYTES);
  if (claimed > held) {
    // Text that isn't a mesh has a count of a thousand million or so at byte 80.
    if (ascii) throw new Refusal("empty", "The file begins like an ASCII STL but holds no facet.");
    const message = `The file says it has ${claimed} triangles, but there is room for ${held}: cut short, or not an STL.`;
    throw new Refusal("truncated", message, 80);
  }
  const even = size === binaryStlBytes(held);
  const triangles = even ? held : claimed;
  const message = even
    ? `The file says it has ${claimed} triangles but holds ${held}; all were read.`
    : `${size - binaryStlBytes(claimed)} bytes after the last triangle were ignored.`;
  return { format: "stl-binary", triangles, warnings: [{ code: even ? "count-mismatch" : "trailing-bytes", message }] };
}

/**
 * Reads a model file of any known format in bounded memory, off the request's own thread by the caller's choice.
 * Throws a Refusal for what can't be read, for STEP (code "step-not-measured") and for a file without triangles.
 */
export async function readModelFile(source: ByteSource, control: ReadingControl = {}): Promise<ModelReading> {
  const watch = new ReadingWatch(control);
  if (source.size > watch.limits.bytesMax) {
    throw new Refusal("too-large", `The file has ${source.size} bytes; at most ${watch.limits.bytesMax} are read.`);
  }
  const { format, triangles, warnings } = await sniffModel(source);
  if (format === "step") {
    throw new Refusal(
      "step-not-measured",
      "STEP files are kept and offered for download; Fanfold doesn't measure them.",
    );
  }
  if (format === "3mf") {
    const { mesh, mmPerUnit, warnings: found } = await readThreeMf(source, watch);
    return { format, mesh: placed(mesh), mmPerUnit, warnings: [...warnings, ...found] };
  }
  const reading =
    format === "stl-binary" ? await readBinaryStl(source, triangles, watch) : await readAsciiStl(source, watch);
  if (reading.mesh.triangles.length === 0) throw new Refusal("empty", "The file holds no triangles.");
  return { format, mesh: placed(reading.mesh), mmPerUnit: undefined, warnings: [...warnings, ...stlWarnings(reading)] };
}

function stlWarnings(reading: StlReading): MeshWarning[] {
  const share = reading.normalsAgainst / (reading.mesh.triangles.length / 3);
  if (share <= 0.05) return reading.warnings;
  const message = `${Math.round(100 * share)} % of the stored normals point against their triangles; the triangles' own order counts.`;
  return [...reading.warnings, { code: "normals-disagree", message }];
}
