import type { Mesh } from "./mesh";
import { polarOf } from "./polar";

const BINS = 360;
const FLOOR_EVERY = 2048;

/** Largest radius of some triangles in each degree about z, mm; 0 where there is none. */
export function outline(mesh: Mesh, includes: (triangle: number) => boolean): Float64Array {
  const out = new Float64Array(BINS);
  const { positions: p, triangles } = mesh;
  const polar = polarOf(p);
  const { radiusMm } = polar;
  // No edge below the lowest degree so far says anything; it is looked up anew now and then.
  let [floor, since] = [0, 0];
  for (let i = 0; i < triangles.length; i++) {
    const v = triangles[i] ?? 0;
    const w = triangles[i % 3 === 2 ? i - 2 : i + 1] ?? 0;
    // Every inner edge is seen from both sides; once is enough.
    if (v > w) continue;
    if ((radiusMm[v] ?? 0) <= floor && (radiusMm[w] ?? 0) <= floor) continue;
    if (!includes((i / 3) | 0)) continue;
    edgeInto(out, p, v, w, polar.angleAt(v), polar.angleAt(w));
    if (++since % FLOOR_EVERY === 0) floor = out.reduce((least, radius) => Math.min(least, radius), Infinity);
  }
  return out;
}

function edgeInto(out: Float64Array, p: Float64Array, v: number, w: number, from: number, to: number): void {
  const step = (2 * Math.PI) / BINS;
  let turn = to - from;
  if (turn > Math.PI) turn -= 2 * Math.PI;
  if (turn < -Math.PI) turn += 2 * Math.PI;
  const low = turn >= 0 ? from : from + turn;
  const high = turn >= 0 ? from + turn : from;
  if (Math.ceil(low / step) > Math.floor(high / step)) return;
  const ax = p[3 * v] ?? 0;
  const ay = p[3 * v + 1] ?? 0;
  const bx = p[3 * w] ?? 0;
  const by = p[3 * w + 1] ?? 0;
  const cross = ax * by - ay * bx;
  for (let k = Math.ceil(low / step); k <= Math.floor(high / step); k++) {
    const cos = Math.cos(k * step);
    const sin = Math.sin(k * step);
    const across = cos * (by - ay) - sin * (bx - ax);
    const radius = across === 0 ? Math.hypot(ax, ay) : Math.abs(cross / across);
    const bin = ((k % BINS) + BINS) % BINS;
    if (radius > (out[bin] ?? 0)) out[bin] = radius;
  }
}

/**
 * True for the outline of a frame: a square about the axis, whatever its rotation and corners. Of the directions up to
 * 30° from the middle of a side, nearly all must reach the side's line and none go beyond it.
 */
export function isSquareOutline(radii: Float64Array): boolean {
  const degree = Math.PI / 180;
  for (let turn = 0; turn < 90; turn++) {
    const sides = [0, 90, 180, 270].map((side) => radii[(side + turn) % BINS] ?? 0);
    const [least, most] = [Math.min(...sides), Math.max(...sides)];
    if (least === 0 || most > 1.1 * least) continue;
    let on = 0;
    let tried = 0;
    sides.forEach((half, quarter) => {
      for (let off = -30; off <= 30; off++) {
        const wanted = half / Math.cos(off * degree);
        const found = radii[(quarter * 90 + turn + off + BINS) % BINS] ?? 0;
        tried++;
        if (Math.abs(found - wanted) < 0.02 * wanted) on++;
      }
    });
    if (on > 0.85 * tried) return true;
  }
  return false;
}
