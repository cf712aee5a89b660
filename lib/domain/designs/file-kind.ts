/** What a file is by its content; its name and the type that was claimed for it say nothing. */
export type FileKind = "stl" | "3mf" | "step" | "csv" | "wav" | "png" | "jpeg" | "webp" | "pdf" | "text" | "unknown";

const ascii = (bytes: Uint8Array, from: number, to: number): string =>
  String.fromCharCode(...bytes.subarray(from, Math.min(to, bytes.length)));

/**
 * The kind of a file from its first bytes and its length. A binary STL is known by its length alone: 84 + 50 × the count
 * at byte 80 (common practice of the format; a binary one may begin with "solid").
 * @param head the first bytes, 1,024 are enough @param bytes the length of the whole file
 */
export function fileKind(head: Uint8Array, bytes: number): FileKind {
  if (head.length === 0) return "unknown";
  if (ascii(head, 0, 8) === "\x89PNG\r\n\x1a\n") return "png";
  if (head[0] === 0xff && head[1] === 0xd8 && head[2] === 0xff) return "jpeg";
  if (ascii(head, 0, 4) === "RIFF" && ascii(head, 8, 12) === "WEBP") return "webp";
  if (["RIFF", "RF64"].includes(ascii(head, 0, 4)) && ascii(head, 8, 12) === "WAVE") return "wav";
  if (ascii(head, 0, 5) === "%PDF-") return "pdf";
  if (ascii(head, 0, 4) === "PK\x03\x04") return "3mf";
  if (ascii(head, 0, 13) === "ISO-10303-21;") return "step";
  if (head.length >= 84) {
    const count = new DataView(head.buffer, head.byteOffset).getUint32(80, true);
    if (bytes === 84 + 50 * count) return "stl";
  }
  if (/^\s*solid\b/.test(ascii(head, 0, 80)) && /facet|endsolid/.test(ascii(head, 0, head.length))) return "stl";
  if (head.some((byte) => byte === 0)) return "unknown";
  return /[,;\t]/.test(ascii(head, 0, head.length)) ? "csv" : "text";
}
