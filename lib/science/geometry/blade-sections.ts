import type { Solids } from "./column-solids";

/** One blade cut by a cylinder about the axis and unrolled: s = r θ along the circle, z along the axis. */
export interface BladeSection {
  readonly areaMm2: number;
  /** Angle of the middle, rad. */
  readonly angleRad: number;
  readonly middleZMm: number;
  readonly fromZMm: number;
  readonly toZMm: number;
  /** Angle of the chord line from the circle, degrees in (−90, 90]; above zero the blade rises with θ. */
  readonly slopeDeg: number;
  /** Extent along the chord line. */
  readonly chordMm: number;
  /** Extent across it. */
  readonly heightMm: number;
}

/** All sections on one cylinder. */
export interface CylinderSections {
  readonly sections: BladeSection[];
  /** True when something solid goes all the way around. */
  readonly closedRing: boolean;
}

interface Piece {
  readonly column: number;
  readonly from: number;
  readonly to: number;
  turnColumn: number | undefined;
}

/**
 * Connected pieces of the unrolled cylinder number `radiusIndex` between two heights: stretches of neighbouring lines
 * belong together where they overlap. Chord line = principal direction of the area; exact along z, one line wide along
 * s (unrolled-cylinder method).
 */
export function cylinderSections(solids: Solids, radiusIndex: number, fromMm: number, toMm: number): CylinderSections {
  const { angles, radiiMm } = solids.columns.grid;
  const width = ((radiiMm[radiusIndex] ?? 0) * 2 * Math.PI) / angles;
  const columns: Piece[][] = [];
  for (let k = 0; k < angles; k++) {
    const line = radiusIndex * angles + k;
    const pieces: Piece[] = [];
    for (let i = solids.starts[line] ?? 0; i < (solids.starts[line + 1] ?? 0); i += 2) {
      const from = Math.max(fromMm, solids.ends[i] ?? 0);
      const to = Math.min(toMm, solids.ends[i + 1] ?? 0);
      if (to > from) pieces.push({ column: k, from, to, turnColumn: undefined });
    }
    columns.push(pieces);
  }
  const sections: BladeSection[] = [];
  let closedRing = false;
  for (const start of columns.flat()) {
    if (start.turnColumn !== undefined) continue;
    const { members, wraps } = gather(columns, start);
    if (wraps) closedRing = true;
    else sections.push(measure(members, width, angles));
  }
  return { sections, closedRing };
}

/** Everything connected with a piece; columns are counted on over the seam, and meeting oneself one turn later wraps. */
function gather(columns: Piece[][], start: Piece): { members: Piece[]; wraps: boolean } {
  start.turnColumn = start.column;
  const members = [start];
  let wraps = false;
  for (let i = 0; i < members.length; i++) {
    const piece = members[i];
    if (!piece) break;
    for (const side of [-1, 1]) {
      const turnColumn = (piece.turnColumn ?? 0) + side;
      const neighbours = columns[(piece.column + side + columns.length) % columns.length] ?? [];
      for (const other of neighbours) {
        if (other.to <= piece.from || other.from >= piece.to) continue;
        if (other.turnColumn === undefined) {
          other.turnColumn = turnColumn;
          members.push(other);
        } else if (other.turnColumn !== turnColumn) wraps = true;
      }
    }
  }
  return { members, wraps };
}

function measure(members: readonly Piece[], width: number, angles: number): BladeSection {
  let [area, sumS, sumZ] = [0, 0, 0];
  for (const { turnColumn = 0, from, to } of members) {
    area += to - from;
    sumS += (to - from) * turnColumn;
    sumZ += ((to - from) * (to + from)) / 2;
  }
  const [s0, z0] = [sumS / area, sumZ / area];
  let [ss, sz, zz] = [0, 0, 0];
  for (const { turnColumn = 0, from, to } of members) {
    const s = (turnColumn - s0) * width;
    const [low, high] = [from - z0, to - z0];
    ss += (to - from) * (s * s + (width * width) / 12);
    sz += (s * (high * high - low * low)) / 2;
    zz += (high ** 3 - low ** 3) / 3;
  }
  const slope = Math.atan2(2 * sz, ss - zz) / 2;
  const [cos, sin] = [Math.cos(slope), Math.sin(slope)];
  let [uMin, uMax, wMin, wMax, zMin, zMax] = [Infinity, -Infinity, Infinity, -Infinity, Infinity, -Infinity];
  for (const { turnColumn = 0, from, to } of members) {
    for (const s of [(turnColumn - s0 - 0.5) * width, (turnColumn - s0 + 0.5) * width]) {
      for (const z of [from - z0, to - z0]) {
        uMin = Math.min(uMin, s * cos + z * sin);
        uMax = Math.max(uMax, s * cos + z * sin);
        wMin = Math.min(wMin, -s * sin + z * cos);
        wMax = Math.max(wMax, -s * sin + z * cos);
      }
    }
    zMin = Math.min(zMin, from);
    zMax = Math.max(zMax, to);
  }
  return {
    areaMm2: area * width,
    angleRad: ((s0 + 0.371) * 2 * Math.PI) / angles,
    middleZMm: z0,
    fromZMm: zMin,
    toZMm: zMax,
    slopeDeg: (slope * 180) / Math.PI,
    chordMm: uMax - uMin,
    heightMm: wMax - wMin,
  };
}
