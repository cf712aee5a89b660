import type { Polyline } from "./polylines";

/** Words in a drawing, in its units (mm), y downwards as in SVG. */
export interface DrawnWords {
  readonly x: number;
  readonly y: number;
  readonly text: string;
  /** Turned a quarter anticlockwise, to read from the right. */
  readonly upright: boolean;
}

/** One view, ready for SVG: all lengths in mm, y downwards, path data without style. */
export interface DrawnView {
  /** Said of it: "Front view: 7 blades, tip Ø 112.0 mm …". */
  readonly title: string;
  readonly minX: number;
  readonly minY: number;
  readonly width: number;
  readonly height: number;
  /** Outlines, the furthest first; a closed one covers what is behind it. */
  readonly outlines: readonly { readonly d: string; readonly covers: boolean }[];
  /** Axis and centre lines, dash-dotted. */
  readonly centres: string;
  /** Hidden or imagined outlines, dashed. */
  readonly dashed: string;
  /** Dimension lines with their ticks. */
  readonly dimensions: string;
  readonly words: readonly DrawnWords[];
  readonly textMm: number;
}

/** Two views of one fan, drawn to one scale. */
export interface FanDrawing {
  readonly front: DrawnView;
  readonly side: DrawnView;
  /** What it was drawn from. */
  readonly from: "mesh" | "traits";
}

const short = (value: number): string => String(Math.round(value * 100) / 100);

/** A polyline (y up) as path data (y down). */
export function pathOf(line: Polyline): string {
  let d = "";
  for (let i = 0; i < line.length; i += 2) {
    d += `${i === 0 ? "M" : "L"}${short(line[i] ?? 0)} ${short(-(line[i + 1] ?? 0) + 0)}`;
  }
  return d;
}

/** Collects dimensions around a view, y up, and the room that they need. */
export class DimensionWriter {
  private d = "";
  private readonly texts: DrawnWords[] = [];
  private box: { minX: number; minY: number; maxX: number; maxY: number };

  constructor(
    extent: { minX: number; minY: number; maxX: number; maxY: number },
    readonly textMm: number,
  ) {
    this.box = { ...extent };
  }

  /** A level dimension from x to x at height y, with witness lines from the heights where the measured points are. */
  level(fromX: number, toX: number, y: number, witnessY: number, text: string): void {
    const beyond = Math.sign(y - witnessY) * 0.4 * this.textMm;
    for (const x of [fromX, toX]) this.d += pathOf([x, witnessY, x, y + beyond]) + this.tick(x, y);
    this.d += pathOf([fromX, y, toX, y]);
    // A number wider than its dimension stands beside it.
    const wide = 0.62 * this.textMm * text.length;
    const fits = wide < Math.abs(toX - fromX);
    const x = fits ? (fromX + toX) / 2 : Math.max(fromX, toX) + wide / 2 + this.textMm;
    this.texts.push({ x, y: -(y + 0.35 * this.textMm), text, upright: false });
    this.reach(x - wide / 2, y - 0.5 * this.textMm);
    this.reach(x + wide / 2, y + 1.4 * this.textMm);
    this.reach(fromX, y + beyond);
    this.reach(toX, y + beyond);
  }

  /** An upright dimension from y to y at x. */
  upright(fromY: number, toY: number, x: number, witnessX: number, text: string): void {
    const beyond = Math.sign(x - witnessX) * 0.4 * this.textMm;
    for (const y of [fromY, toY]) this.d += pathOf([witnessX, y, x + beyond, y]) + this.tick(x, y);
    this.d += pathOf([x, fromY, x, toY]);
    this.texts.push({ x: x - 0.35 * this.textMm, y: -(fromY + toY) / 2, text, upright: true });
    this.reach(x - 1.4 * this.textMm, fromY);
    this.reach(x + 0.5 * this.textMm, toY);
  }

  /** Words in the middle of a place, and how far they reach. */
  note(x: number, y: number, text: string, upright = false): void {
    this.texts.push({
      x: upright ? x + 0.35 * this.textMm : x,
      y: -(y - (upright ? 0 : 0.35 * this.textMm)),
      text,
      upright,
    });
    const [along, across] = [0.31 * this.textMm * text.length, 0.7 * this.textMm];
    this.reach(x - (upright ? across : along), y - (upright ? along : across));
    this.reach(x + (upright ? across : along), y + (upright ? along : across));
  }

  /** The finished view. */
  view(rest: Pick<DrawnView, "title" | "outlines" | "centres" | "dashed">): DrawnView {
    const margin = 0.5 * this.textMm;
    const { minX, minY, maxX, maxY } = this.box;
    return {
      ...rest,
      minX: minX - margin,
      minY: -maxY - margin,
      width: maxX - minX + 2 * margin,
      height: maxY - minY + 2 * margin,
      dimensions: this.d,
      words: this.texts,
      textMm: this.textMm,
    };
  }

  private tick(x: number, y: number): string {
    const half = 0.28 * this.textMm;
    return pathOf([x - half, y - half, x + half, y + half]);
  }

  private reach(x: number, y: number): void {
    const { minX, minY, maxX, maxY } = this.box;
    this.box = {
      minX: Math.min(minX, x),
      minY: Math.min(minY, y),
      maxX: Math.max(maxX, x),
      maxY: Math.max(maxY, y),
    };
  }
}
