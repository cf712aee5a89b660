import path from "node:path";
import { openSync, type Font, type Glyph } from "fontkit";

export type LetterFont = "words" | "figures";

const folder = "node_modules/@fontsource-variable";
const families: Readonly<Record<LetterFont, string>> = {
  words: "atkinson-hyperlegible-next",
  figures: "atkinson-hyperlegible-mono",
};
const opened = new Map<string, Font>();

/** The site's own typefaces (SIL OFL), from their packages: the Latin part, then its extension. */
function fontsOf(font: LetterFont): Font[] {
  return ["latin", "latin-ext"].map((part) => {
    const name = `${families[font]}/files/${families[font]}-${part}-wght-normal.woff2`;
    const known = opened.get(name);
    if (known) return known;
    const found = openSync(path.join(/* turbopackIgnore: true */ process.cwd(), folder, name));
    if (!("layout" in found)) throw new Error(`${name} is a collection of fonts, not one.`);
    opened.set(name, found);
    return found;
  });
}

interface Placed {
  readonly d: string;
  readonly advance: number;
}

/** The face has no Greek: a triangle of its weight and height, units of a thousandth of the size. */
const delta: Placed = { d: "M40 0L310 668L390 668L660 0ZM160 80L540 80L350 560Z", advance: 700 };

/** Writes figures in a face without arithmetic signs as well as it can. */
function glyphOf(font: LetterFont, letter: string): Placed {
  if (letter === "Δ") return delta;
  for (const face of fontsOf(font)) {
    const glyph: Glyph = face.glyphForCodePoint(letter.codePointAt(0) ?? 0x20);
    if (glyph.id === 0) continue;
    const scale = 1000 / face.unitsPerEm;
    return { d: glyph.path.scale(scale).toSVG(), advance: glyph.advanceWidth * scale };
  }
  return letter === "?" ? { d: "", advance: 500 } : glyphOf(font, "?");
}

export interface Lettering {
  /** Path data in px, y downwards. */
  readonly d: string;
  readonly width: number;
}

/**
 * A line of text as outlines, so that a picture shows it the same wherever it is drawn and no font needs to be
 * installed. Letters that the typeface lacks stand as "?".
 *
 * @param size of the letters in px
 * @param x, y where the line begins on its base line
 */
export function lettering(text: string, font: LetterFont, size: number, x = 0, y = 0): Lettering {
  const scale = size / 1000;
  let at = 0;
  let d = "";
  for (const letter of text) {
    const glyph = glyphOf(font, letter);
    d += moved(glyph.d, scale, x + at * scale, y);
    at += glyph.advance;
  }
  return { d, width: at * scale };
}

const short = (value: number): string => String(Math.round(value * 100) / 100);

/** Path data of a glyph (absolute commands, y upwards) at its place in the line. */
function moved(d: string, scale: number, x: number, y: number): string {
  let odd = true;
  return d.replace(/[A-Z]|-?\d*\.?\d+(?:e-?\d+)?/g, (part) => {
    if (/[A-Z]/.test(part)) {
      odd = true;
      return part;
    }
    const value = odd ? x + Number(part) * scale : y - Number(part) * scale;
    odd = !odd;
    return `${short(value)} `;
  });
}
