import { Refusal } from "@/lib/science/refusal";
import type { StlReading } from "./stl-binary";
import type { ByteSource, ReadingWatch } from "./reading";
import { VertexWeld } from "./weld";

const CHUNK_BYTES = 524_288;
/** No writer needs more; a longer token is an attack on the number parser or not an STL. */
const TOKEN_CHARS_MAX = 1024;
const NUMBER = /^[+-]?(\d+\.?\d*|\.\d+)([eE][+-]?\d{1,4})?$/;
const NOT_FINITE = /^[+-]?(nan|inf|infinity)(\(.*\))?$/i;

/** Words and line numbers of a text that arrives in chunks of bytes. */
class Lines {
  line = 1;
  private rest = "";
  private readonly decoder = new TextDecoder("latin1");

  /** Complete lines of the text so far; the last, incomplete one waits for more. */
  *feed(bytes: Uint8Array, last: boolean): Generator<string> {
    const text = this.rest + this.decoder.decode(bytes, { stream: !last });
    let from = 0;
    for (let i = 0; i < text.length; i++) {
      const c = text.charCodeAt(i);
      if (c !== 10 && c !== 13) continue;
      yield text.slice(from, i);
      // A carriage return before a line feed ends one line, not two.
      if (c === 10 || text.charCodeAt(i + 1) !== 10) this.line++;
      from = i + 1;
    }
    this.rest = text.slice(from);
    if (last && this.rest !== "") yield this.rest;
    else if (this.rest.length > 64 * TOKEN_CHARS_MAX) yield this.longLine();
  }

  /** A file may stand on one line: what is whole of it goes ahead, the last word waits. */
  private longLine(): string {
    const end = Math.max(this.rest.lastIndexOf(" "), this.rest.lastIndexOf("\t"));
    if (end < 0) throw new Refusal("line-too-long", "A word never ends.", this.line);
    const whole = this.rest.slice(0, end);
    this.rest = this.rest.slice(end);
    return whole;
  }
}

/** Reads facets from a stream of words, whatever the line breaks between them. */
class FacetParser {
  triangles: number[] = [];
  against = 0;
  closed = true;
  private readonly weld = new VertexWeld(4096);
  private readonly numbers: number[] = [];
  private wanted = 0;
  private inFacet = false;
  private named = false;
  private vertices = 0;

  word(word: string, line: number): void {
    if (this.wanted > 0) return this.number(word, line);
    switch (word.toLowerCase()) {
      case "facet":
        if (this.inFacet) throw new Refusal("facet-incomplete", "A facet begins inside another one.", line);
        this.inFacet = true;
        this.named = false;
        this.vertices = 0;
        return;
      case "normal":
      case "vertex":
        if (this.inFacet) this.wanted = 3;
        if (this.inFacet && word.toLowerCase() === "vertex") this.vertices++;
        return;
      case "endfacet":
        return this.endFacet(line);
      case "solid":
      case "endsolid":
        if (this.inFacet) throw new Refusal("facet-incomplete", "The solid ends inside a facet.", line);
        this.named = true;
        this.closed = word.toLowerCase() === "endsolid";
        return;
      case "outer":
      case "loop":
      case "endloop":
        return;
      default:
        if (!this.named) throw new Refusal("stl-word", `“${word.slice(0, 40)}” doesn't belong in an STL file.`, line);
    }
  }

  finish(): { positions: Float64Array; triangles: Uint32Array } {
    if (this.inFacet) throw new Refusal("truncated", "The file ends inside a facet.", this.triangles.length / 3 + 1);
    return { positions: this.weld.finish(), triangles: Uint32Array.from(this.triangles) };
  }

  private number(word: string, line: number): void {
    this.wanted--;
    if (NOT_FINITE.test(word)) {
      // A missing normal is harmless, as normals are taken from the winding; a missing vertex is not.
      if (this.vertices > 0) throw new Refusal("not-finite", "A vertex is not a finite number.", line);
      this.numbers.push(0);
      return;
    }
    if (word.length > TOKEN_CHARS_MAX || !NUMBER.test(word)) {
      const comma = word.includes(",") ? " (a decimal comma is not allowed in STL)" : "";
      throw new Refusal("not-a-number", `“${word.slice(0, 40)}” is not a number${comma}.`, line);
    }
    const value = Number(word);
    if (!Number.isFinite(value)) throw new Refusal("not-finite", "A vertex is not a finite number.", line);
    this.numbers.push(value);
  }

  private endFacet(line: number): void {
    const { numbers } = this;
    const start = numbers.length - 9;
    if (!this.inFacet || this.vertices !== 3 || start < 0) {
      throw new Refusal("facet-incomplete", "A facet doesn't have three vertices.", line);
    }
    const n = (i: number) => numbers[i] ?? 0;
    for (let i = 0; i < 3; i++) {
      this.triangles.push(this.weld.add(n(start + 3 * i), n(start + 3 * i + 1), n(start + 3 * i + 2)));
    }
    if (start >= 3 && normalAgainst(numbers.slice(start - 3))) this.against++;
    numbers.length = 0;
    this.inFacet = false;
  }
}

/** True when the normal (first three numbers) points against the winding of the nine that follow. */
function normalAgainst(numbers: number[]): boolean {
  const [nx = 0, ny = 0, nz = 0, x = 0, y = 0, z = 0, bx = 0, by = 0, bz = 0, cx = 0, cy = 0, cz = 0] = numbers;
  const [ux, uy, uz, vx, vy, vz] = [bx - x, by - y, bz - z, cx - x, cy - y, cz - z];
  return nx * (uy * vz - uz * vy) + ny * (uz * vx - ux * vz) + nz * (ux * vy - uy * vx) < 0;
}

/**
 * Reads an ASCII STL: any case, any white space, CRLF, several solids, names missing; coordinates as in the file.
 * A file without its last `endsolid` gives what it holds and a warning; one that ends inside a facet, has a decimal
 * comma, NaN or infinite vertices is a Refusal (`at` = line, from 1). Library of Congress FDD fdd000506.
 */
export async function readAsciiStl(source: ByteSource, watch: ReadingWatch): Promise<StlReading> {
  const lines = new Lines();
  const parser = new FacetParser();
  for (let offset = 0; offset < source.size; offset += CHUNK_BYTES) {
    const chunk = await source.read(offset, CHUNK_BYTES);
    for (const text of lines.feed(chunk, offset + CHUNK_BYTES >= source.size)) {
      // The name of a solid may be any text, so that line is not read word by word.
      const name = /^\uFEFF?(ï»¿)?\s*(end)?solid\b/i.exec(text);
      if (name) parser.word(name[2] ? "endsolid" : "solid", lines.line);
      if (name && !/\bfacet\s+normal\b/i.test(text)) continue;
      const words = (name ? text.slice(text.search(/\bfacet\s+normal\b/i)) : text).match(/\S+/g);
      for (const word of words ?? []) parser.word(word, lines.line);
    }
    watch.step(parser.triangles.length / 3);
  }
  const warnings = parser.closed
    ? []
    : [{ code: "endsolid-missing", message: "The file doesn't end with “endsolid”: it may have been cut short." }];
  return { mesh: parser.finish(), normalsAgainst: parser.against, warnings };
}
