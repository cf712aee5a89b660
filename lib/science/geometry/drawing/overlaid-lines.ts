import { lineLength, type Polyline } from "./polylines";

const CELL_MM_SHARE = 1 / 1400;
/** A line gives way to another that it runs along for longer than this many cells. */
const ALONG_CELLS = 5;

/**
 * Takes away what is drawn twice: the far rim of a cylinder seen along its axis lies on the near one. Lines are walked,
 * the longest first; where one runs along an earlier one for more than a few cells, it is left out there. `extentMm` is
 * the longer side of the drawing.
 */
export function withoutOverlaid(lines: readonly Polyline[], extentMm: number): number[][] {
  const cell = Math.max(extentMm * CELL_MM_SHARE, 1e-6);
  const grid = new MarkGrid(lines, cell);
  const out: number[][] = [];
  const sorted = lines.map((line) => ({ line, length: lineLength(line) })).sort((a, b) => b.length - a.length);
  sorted.forEach(({ line }, index) => {
    const points = walked(line, cell);
    const taken = longRuns(
      points.map((point) => grid.takenByOther(point.x, point.y, index)),
      ALONG_CELLS,
    );
    let piece: number[] = [];
    const end = (): void => {
      if (piece.length >= 4) out.push(piece);
      piece = [];
    };
    points.forEach((point, i) => {
      if (taken[i]) {
        // The corner itself still belongs to the piece before.
        end();
        return;
      }
      grid.mark(point.x, point.y, index);
      const last = i === points.length - 1 || taken[i + 1] === true;
      if (point.corner || piece.length === 0 || last) piece.push(point.x, point.y);
    });
    end();
  });
  return out;
}

/** Which line came through each cell of the drawing, the latest. */
class MarkGrid {
  private readonly marks: Int32Array;
  private readonly columns: number;
  private readonly minX: number;
  private readonly minY: number;

  constructor(
    lines: readonly Polyline[],
    private readonly cell: number,
  ) {
    let [minX, minY, maxX, maxY] = [Infinity, Infinity, -Infinity, -Infinity];
    for (const line of lines) {
      for (let i = 0; i < line.length; i += 2) {
        const [x = 0, y = 0] = [line[i], line[i + 1]];
        minX = Math.min(minX, x);
        maxX = Math.max(maxX, x);
        minY = Math.min(minY, y);
        maxY = Math.max(maxY, y);
      }
    }
    const size = (from: number, to: number): number => (to > from ? Math.ceil((to - from) / cell) : 0) + 4;
    this.columns = size(minX, maxX);
    this.minX = minX - 1.5 * cell;
    this.minY = minY - 1.5 * cell;
    this.marks = new Int32Array(this.columns * size(minY, maxY)).fill(-1);
  }

  private at(x: number, y: number): number {
    return Math.floor((y - this.minY) / this.cell) * this.columns + Math.floor((x - this.minX) / this.cell);
  }

  mark(x: number, y: number, line: number): void {
    this.marks[this.at(x, y)] = line;
  }

  /** Whether another line came through the cell or one of the eight around it. */
  takenByOther(x: number, y: number, line: number): boolean {
    const middle = this.at(x, y);
    for (let row = -this.columns; row <= this.columns; row += this.columns) {
      for (let column = -1; column <= 1; column++) {
        const mark = this.marks[middle + row + column] ?? -1;
        if (mark >= 0 && mark !== line) return true;
      }
    }
    return false;
  }
}

interface Walked {
  readonly x: number;
  readonly y: number;
  readonly corner: boolean;
}

function walked(line: Polyline, step: number): Walked[] {
  const out: Walked[] = [];
  for (let i = 0; i + 3 < line.length; i += 2) {
    const [ax = 0, ay = 0, bx = 0, by = 0] = line.slice(i, i + 4);
    const steps = Math.max(1, Math.ceil(Math.hypot(bx - ax, by - ay) / step));
    for (let k = 0; k < steps; k++) {
      out.push({ x: ax + ((bx - ax) * k) / steps, y: ay + ((by - ay) * k) / steps, corner: k === 0 });
    }
  }
  if (line.length >= 4) out.push({ x: line.at(-2) ?? 0, y: line.at(-1) ?? 0, corner: true });
  return out;
}

/** Cells by which a line reaches into what is taken, so that no gap shows. */
const REACH_CELLS = 2;

/** True only inside runs of more than `least`; a line that is taken all along, however short, goes as a whole. */
function longRuns(taken: readonly boolean[], least: number): boolean[] {
  if (taken.every(Boolean)) return taken.map(() => true);
  const out = taken.map(() => false);
  let from = 0;
  for (let i = 0; i <= taken.length; i++) {
    if (i < taken.length && taken[i]) continue;
    const [first, last] = [from === 0 ? 0 : from + REACH_CELLS, i === taken.length ? i : i - REACH_CELLS];
    if (i - from > least && last > first) out.fill(true, first, last);
    from = i + 1;
  }
  return out;
}
