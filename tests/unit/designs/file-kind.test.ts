import { describe, expect, it } from "vitest";
import { fileKind } from "@/lib/domain/designs/file-kind";

const bytes = (...parts: (string | number[])[]): Uint8Array =>
  Uint8Array.from(parts.flatMap((part) => (typeof part === "string" ? [...Buffer.from(part, "latin1")] : part)));
const kindOf = (head: Uint8Array, length = head.length) => fileKind(head, length);

/** A binary STL's head: 80 bytes of header, the count, and no more than the first bytes of the triangles. */
function binaryStlHead(header: string, triangles: number): { head: Uint8Array; length: number } {
  const head = new Uint8Array(1_024);
  head.set(bytes(header).subarray(0, 80));
  new DataView(head.buffer).setUint32(80, triangles, true);
  return { head, length: 84 + 50 * triangles };
}

describe("a file's kind by its content", () => {
  it.each([
    // PNG (W3C Recommendation, third edition, 5.2): the eight signature bytes.
    ["png", bytes([0x89], "PNG\r\n", [0x1a], "\n", [0, 0, 0, 13], "IHDR")],
    // JPEG: SOI, then a marker (ITU-T T.81, B.1.1.3 and table B.1).
    ["jpeg", bytes([0xff, 0xd8, 0xff, 0xe0, 0, 16], "JFIF")],
    // RIFF containers (RFC 9649, 2.4; RF64: EBU Tech 3306, 3).
    ["webp", bytes("RIFF", [26, 0, 0, 0], "WEBPVP8L")],
    ["wav", bytes("RIFF", [36, 0, 0, 0], "WAVEfmt ")],
    ["wav", bytes("RF64", [255, 255, 255, 255], "WAVEds64")],
    // PDF (ISO 32000-1, 7.5.2).
    ["pdf", bytes("%PDF-1.7\n")],
    // A 3MF is a ZIP package (Open Packaging Conventions; APPNOTE.TXT 4.3.7: the local file header's signature).
    ["3mf", bytes("PK", [3, 4, 20, 0])],
    // STEP (ISO 10303-21, 5.2: the file begins with its own name).
    ["step", bytes("ISO-10303-21;\nHEADER;")],
    ["stl", bytes("solid rotor\n  facet normal 0 0 1\n    outer loop\n")],
    ["csv", bytes("time_s,level_dba\n0.0,41.2\n")],
    ["text", bytes("layer height 0.2 mm\nwalls 4\n")],
    ["text", bytes("<html><body>hello</body></html>")],
    ["unknown", bytes([0, 1, 2, 3, 0, 200])],
    ["unknown", bytes()],
  ] as const)("%s", (kind, head) => {
    expect(kindOf(head)).toBe(kind);
  });

  it("knows a binary STL by its length alone, also one that begins with solid", () => {
    for (const header of ["exported", "solid made by a tool that writes binary"]) {
      const { head, length } = binaryStlHead(header, 12);
      expect(kindOf(head, length)).toBe("stl");
      expect(kindOf(head, length + 1)).toBe("unknown");
    }
  });

  it("takes no name of a kind within a text for the kind", () => {
    expect(kindOf(bytes("my solid plan without triangles"))).toBe("text");
    expect(kindOf(bytes("see %PDF-1.7 below"))).toBe("text");
  });
});
