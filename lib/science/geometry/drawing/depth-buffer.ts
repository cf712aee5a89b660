import type { SeenMesh } from "./view";

/** What is nearest to the eye at each pixel. Row 0 is the lowest. */
export interface DepthBuffer {
  readonly width: number;
  readonly height: number;
  /** Pixels in a millimetre. */
  readonly scale: number;
  /** View coordinates of the middle of pixel 0, 0. */
  readonly originX: number;
  readonly originY: number;
  /** Depth towards the eye, mm; −Infinity where nothing is. */
  readonly depth: Float32Array;
  /** Triangle seen there; −1 where nothing is. */
  readonly triangle: Int32Array;
}

const MARGIN = 3;

/** Extent of what the triangles use, in view coordinates; zero extents for a mesh without triangles. */
export function seenExtent({ x, y, triangles }: SeenMesh): { minX: number; minY: number; maxX: number; maxY: number } {
  let [minX, minY, maxX, maxY] = [Infinity, Infinity, -Infinity, -Infinity];
  for (const v of triangles) {
    const [px, py] = [x[v] ?? 0, y[v] ?? 0];
    if (px < minX) minX = px;
    if (px > maxX) maxX = px;
    if (py < minY) minY = py;
    if (py > maxY) maxY = py;
  }
  return triangles.length === 0 ? { minX: 0, minY: 0, maxX: 0, maxY: 0 } : { minX, minY, maxX, maxY };
}

/** Draws every triangle into a depth buffer whose longer side has `pixels`, by spans: row by row, from edge to edge. */
export function fillDepth(seen: SeenMesh, pixels: number): DepthBuffer {
  const { minX, minY, maxX, maxY } = seenExtent(seen);
  const scale = (pixels - 2 * MARGIN) / Math.max(maxX - minX, maxY - minY, 1e-9);
  const width = Math.ceil((maxX - minX) * scale) + 2 * MARGIN;
  const height = Math.ceil((maxY - minY) * scale) + 2 * MARGIN;
  const buffer: DepthBuffer = {
    width,
    height,
    scale,
    originX: minX - MARGIN / scale,
    originY: minY - MARGIN / scale,
    depth: new Float32Array(width * height).fill(-Infinity),
    triangle: new Int32Array(width * height).fill(-1),
  };
  const count = seen.triangles.length / 3;
  for (let t = 0; t < count; t++) fillTriangle(buffer, seen, t);
  return buffer;
}

function fillTriangle(buffer: DepthBuffer, seen: SeenMesh, t: number): void {
  const { width, height, scale, originX, originY, depth, triangle } = buffer;
  const a = seen.triangles[3 * t] ?? 0;
  const b = seen.triangles[3 * t + 1] ?? 0;
  const c = seen.triangles[3 * t + 2] ?? 0;
  const ax = ((seen.x[a] ?? 0) - originX) * scale;
  const ay = ((seen.y[a] ?? 0) - originY) * scale;
  const bx = ((seen.x[b] ?? 0) - originX) * scale;
  const by = ((seen.y[b] ?? 0) - originY) * scale;
  const cx = ((seen.x[c] ?? 0) - originX) * scale;
  const cy = ((seen.y[c] ?? 0) - originY) * scale;
  const twice = (bx - ax) * (cy - ay) - (cx - ax) * (by - ay);
  // Seen edge on it covers nothing; its edges are drawn all the same.
  if (Math.abs(twice) < 1e-9) return;
  const [ad, bd, cd] = [seen.depth[a] ?? 0, seen.depth[b] ?? 0, seen.depth[c] ?? 0];
  const dx = ((bd - ad) * (cy - ay) - (cd - ad) * (by - ay)) / twice;
  const dy = ((cd - ad) * (bx - ax) - (bd - ad) * (cx - ax)) / twice;
  const nearest = Math.max(ad, bd, cd);
  const low = Math.max(0, Math.ceil(Math.min(ay, by, cy)));
  const high = Math.min(height - 1, Math.floor(Math.max(ay, by, cy)));
  for (let row = low; row <= high; row++) {
    // Where the row cuts the sides; a level side is met at its ends by the others.
    const p = crossing(ax, ay, bx, by, row);
    const q = crossing(bx, by, cx, cy, row);
    const r = crossing(cx, cy, ax, ay, row);
    const from = Math.min(p, q, r);
    const to = Math.max(p === Infinity ? -p : p, q === Infinity ? -q : q, r === Infinity ? -r : r);
    const first = Math.max(0, Math.ceil(from));
    const last = Math.min(width - 1, Math.floor(to));
    let at = row * width + first;
    let d = ad + (first - ax) * dx + (row - ay) * dy;
    for (let column = first; column <= last; column++, at++, d += dx) {
      // Steep triangles would overshoot their own corners by rounding.
      const here = d > nearest ? nearest : d;
      if (here > (depth[at] ?? 0)) {
        depth[at] = here;
        triangle[at] = t;
      }
    }
  }
}

/** Where the line from p to q is at a height, or Infinity where it isn't. */
function crossing(px: number, py: number, qx: number, qy: number, row: number): number {
  if (py === qy || (row < py && row < qy) || (row > py && row > qy)) return Infinity;
  return px + ((qx - px) * (row - py)) / (qy - py);
}
