import type { DepthBuffer } from "./depth-buffer";

/** A line in the view, with depth; the triangles on its sides never hide it. */
export interface SeenLine {
  readonly ax: number;
  readonly ay: number;
  readonly ad: number;
  readonly bx: number;
  readonly by: number;
  readonly bd: number;
  readonly ownS: number;
  readonly ownT: number;
}

/** Hidden or seen stretches shorter than this, in pixels, follow what is around them. */
const SPECK_PX = 2.5;
/** Depth that counts as the same surface, in pixels. */
const BIAS_PX = 2;

/** Stretches of a line that nothing hides, as pairs of fractions of its length, in order; empty when all is hidden. */
export function visiblePieces(buffer: DepthBuffer, line: SeenLine): number[] {
  const { scale } = buffer;
  const lengthPx = Math.hypot(line.bx - line.ax, line.by - line.ay) * scale;
  const steps = Math.max(2, Math.ceil(lengthPx));
  const pieces: number[] = [];
  let begun = -1;
  for (let i = 0; i < steps; i++) {
    const seen = isSeen(buffer, line, (i + 0.5) / steps);
    if (seen && begun < 0) begun = i;
    if (!seen && begun >= 0) {
      pieces.push(begun / steps, i / steps);
      begun = -1;
    }
  }
  if (begun >= 0) pieces.push(begun / steps, 1);
  return withoutSpecks(pieces, Math.min(0.34, SPECK_PX / Math.max(lengthPx, 1e-9)));
}

/** Closes gaps and drops pieces below `speck` of the line's length, and moves ends that nearly reach the line's. */
function withoutSpecks(pieces: readonly number[], speck: number): number[] {
  const closed: number[] = [];
  for (let i = 0; i < pieces.length; i += 2) {
    const [from = 0, to = 0] = [pieces[i], pieces[i + 1]];
    const last = closed.at(-1);
    if (last !== undefined && from - last < speck) closed[closed.length - 1] = to;
    else closed.push(from, to);
  }
  const kept: number[] = [];
  for (let i = 0; i < closed.length; i += 2) {
    const from = (closed[i] ?? 0) < speck ? 0 : (closed[i] ?? 0);
    const to = (closed[i + 1] ?? 0) > 1 - speck ? 1 : (closed[i + 1] ?? 0);
    if (to - from >= speck) kept.push(from, to);
  }
  return kept;
}

function isSeen(buffer: DepthBuffer, line: SeenLine, t: number): boolean {
  const { width, height, scale, originX, originY, depth, triangle } = buffer;
  const x = (line.ax + (line.bx - line.ax) * t - originX) * scale;
  const y = (line.ay + (line.by - line.ay) * t - originY) * scale;
  const limit = line.ad + (line.bd - line.ad) * t + BIAS_PX / scale;
  const [column, row] = [Math.floor(x), Math.floor(y)];
  // The line runs between pixel middles, so one free one of the four around it is enough.
  for (let j = 0; j < 2; j++) {
    for (let i = 0; i < 2; i++) {
      const [u, v] = [column + i, row + j];
      if (u < 0 || v < 0 || u >= width || v >= height) return true;
      const at = v * width + u;
      if ((depth[at] ?? 0) <= limit) return true;
      const own = triangle[at];
      if (own === line.ownS || own === line.ownT) return true;
    }
  }
  return false;
}
