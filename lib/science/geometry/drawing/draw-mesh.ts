import { middleOf, meshBounds, type Vec3 } from "../mesh";
import { fillDepth, seenExtent, type DepthBuffer } from "./depth-buffer";
import { withoutOverlaid } from "./overlaid-lines";
import { joinPieces, lineLength, simplified, type Polyline } from "./polylines";
import type { DrawableMesh } from "./sharp-edges";
import type { Seam } from "./shell-seams";
import { seeMesh, seePoint, type SeenMesh, type View } from "./view";
import { visiblePieces, type SeenLine } from "./visible-pieces";

/** A line drawing in mm: x to the right, y up. */
export interface LineDrawing {
  readonly lines: readonly Polyline[];
  readonly minX: number;
  readonly minY: number;
  readonly maxX: number;
  readonly maxY: number;
}

export interface DrawOptions {
  /** Pixels along the longer side of the depth buffer. 1600 where left out. */
  readonly pixels?: number;
  /** The point that lies at 0, 0; the middle of the mesh's box where left out. */
  readonly about?: Vec3;
}

const PIXELS = 1600;
/** A triangle seen within this of edge on faces neither way. */
const EDGE_ON = 1e-4;
const TOLERANCE_SHARE = 1 / 6000;
/** Lines shorter than this share of the drawing are specks at corners. */
const SPECK_SHARE = 1 / 250;

/**
 * Draws a mesh as lines: sharp edges and silhouettes, without what is hidden, joined and thinned. Pure and the same
 * for the same mesh. An empty drawing for a mesh without triangles.
 */
export function drawMesh(drawable: DrawableMesh, view: View, options: DrawOptions = {}): LineDrawing {
  const bounds = meshBounds(drawable.mesh);
  if (!bounds) return { lines: [], minX: 0, minY: 0, maxX: 0, maxY: 0 };
  const about = options.about ?? middleOf(bounds);
  const seen = seeMesh(drawable.mesh, view, about);
  const extent = seenExtent(seen);
  const longer = Math.max(extent.maxX - extent.minX, extent.maxY - extent.minY);
  const buffer = fillDepth(seen, options.pixels ?? PIXELS);
  const facing = facingOf(drawable, view);
  const pieces: number[][] = [];
  const { edges, sharp } = drawable;
  for (let e = 0; e < edges.count; e++) {
    const [s = -1, t = -1] = [edges.sides[2 * e], edges.sides[2 * e + 1]];
    if (!isDrawn(sharp[e] === 1, facing[s] ?? 0, t < 0 ? undefined : (facing[t] ?? 0))) continue;
    addPieces(pieces, buffer, edgeLine(seen, edges.ends[2 * e] ?? 0, edges.ends[2 * e + 1] ?? 0, s, t));
  }
  for (const seam of drawable.seams) {
    if ((facing[seam.triangleS] ?? 0) > 0 || (facing[seam.triangleT] ?? 0) > 0) {
      addPieces(pieces, buffer, seamLine(seam, view, about));
    }
  }
  const tolerance = longer * TOLERANCE_SHARE;
  const joined = joinPieces(pieces).map((line) => simplified(line, tolerance));
  const lines = joinPieces(withoutOverlaid(joined, longer))
    .filter((line) => lineLength(line) > longer * SPECK_SHARE)
    .map((line) => simplified(line, tolerance));
  return { lines, ...extent };
}

/** An edge is drawn when a triangle beside it faces the eye and it is sharp, or the other faces away. */
function isDrawn(sharp: boolean, s: number, t: number | undefined): boolean {
  if (t === undefined) return true;
  if (s <= 0 && t <= 0) return sharp && (s === 0 || t === 0);
  return sharp || s < 0 || t < 0;
}

/** 1 for a triangle that faces the eye, −1 for one that faces away, 0 for one seen edge on. */
function facingOf({ normals }: DrawableMesh, { towards }: View): Int8Array {
  const facing = new Int8Array(normals.length / 3);
  for (let t = 0; t < facing.length; t++) {
    const cosine =
      (normals[3 * t] ?? 0) * towards[0] +
      (normals[3 * t + 1] ?? 0) * towards[1] +
      (normals[3 * t + 2] ?? 0) * towards[2];
    facing[t] = cosine > EDGE_ON ? 1 : cosine < -EDGE_ON ? -1 : 0;
  }
  return facing;
}

/** Appends what is seen of a line, as pieces x, y, x, y. */
function addPieces(pieces: number[][], buffer: DepthBuffer, line: SeenLine): void {
  const visible = visiblePieces(buffer, line);
  for (let i = 0; i < visible.length; i += 2) {
    const [from = 0, to = 0] = [visible[i], visible[i + 1]];
    pieces.push([
      line.ax + (line.bx - line.ax) * from,
      line.ay + (line.by - line.ay) * from,
      line.ax + (line.bx - line.ax) * to,
      line.ay + (line.by - line.ay) * to,
    ]);
  }
}

function edgeLine(seen: SeenMesh, a: number, b: number, ownS: number, ownT: number): SeenLine {
  return {
    ax: seen.x[a] ?? 0,
    ay: seen.y[a] ?? 0,
    ad: seen.depth[a] ?? 0,
    bx: seen.x[b] ?? 0,
    by: seen.y[b] ?? 0,
    bd: seen.depth[b] ?? 0,
    ownS,
    ownT,
  };
}

function seamLine(seam: Seam, view: View, about: Vec3): SeenLine {
  const [ax, ay, ad] = seePoint(seam.from, view, about);
  const [bx, by, bd] = seePoint(seam.to, view, about);
  return { ax, ay, ad, bx, by, bd, ownS: seam.triangleS, ownT: seam.triangleT };
}
