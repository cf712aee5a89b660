/** A line through points: x and y in turn, mm in the view. */
export type Polyline = readonly number[];

const NODE_MM = 0.02;

/**
 * Joins pieces (x, y, x, y) end to end into polylines: where exactly two ends meet, they become one line. Ends within
 * 0.02 mm are one. Pieces without length are left out; a closed line ends in its first point.
 */
export function joinPieces(pieces: readonly Polyline[]): number[][] {
  const nodes = new Map<string, number[]>();
  const key = (x: number, y: number): string => `${Math.round(x / NODE_MM)},${Math.round(y / NODE_MM)}`;
  const startKey = (piece: Polyline): string => key(piece[0] ?? 0, piece[1] ?? 0);
  const endKey = (piece: Polyline): string => key(piece.at(-2) ?? 0, piece.at(-1) ?? 0);
  const seen = new Set<string>();
  const kept = pieces.filter((piece) => {
    const [from, to] = [startKey(piece), endKey(piece)];
    // A longer one that ends where it begins is a closed line.
    if (piece.length > 4) return true;
    const both = from < to ? `${from} ${to}` : `${to} ${from}`;
    // The same short line drawn twice would never join.
    if (from === to || seen.has(both)) return false;
    seen.add(both);
    return true;
  });
  kept.forEach((piece, index) => {
    for (const node of [startKey(piece), endKey(piece)]) nodes.set(node, [...(nodes.get(node) ?? []), index]);
  });
  const used = new Uint8Array(kept.length);
  const follow = (line: number[]): void => {
    for (;;) {
      const node = endKey(line);
      const meeting = nodes.get(node) ?? [];
      const next = meeting.length === 2 ? meeting.find((index) => used[index] === 0) : undefined;
      if (next === undefined) return;
      used[next] = 1;
      const piece = kept[next] ?? [];
      const forwards = startKey(piece) === node ? piece : reversed(piece);
      for (let i = 2; i < forwards.length; i++) line.push(forwards[i] ?? 0);
    }
  };
  const lines: number[][] = [];
  kept.forEach((piece, index) => {
    if (used[index] === 1) return;
    used[index] = 1;
    const line = [...piece];
    follow(line);
    const back = reversed(line);
    follow(back);
    lines.push(back);
  });
  return lines;
}

/** The same line from its other end. */
export function reversed(line: Polyline): number[] {
  const out: number[] = [];
  for (let i = line.length - 2; i >= 0; i -= 2) out.push(line[i] ?? 0, line[i + 1] ?? 0);
  return out;
}

/** Length of a line, mm. */
export function lineLength(line: Polyline): number {
  let sum = 0;
  for (let i = 2; i < line.length; i += 2) {
    sum += Math.hypot((line[i] ?? 0) - (line[i - 2] ?? 0), (line[i + 1] ?? 0) - (line[i - 1] ?? 0));
  }
  return sum;
}

/** The line with fewer points, nowhere further than `toleranceMm` from what it was (Douglas & Peucker 1973). */
export function simplified(line: Polyline, toleranceMm: number): number[] {
  const count = line.length / 2;
  const keep = new Uint8Array(count);
  keep[0] = 1;
  keep[count - 1] = 1;
  const open: [number, number][] = [[0, count - 1]];
  for (let span = open.pop(); span; span = open.pop()) {
    const [from, to] = span;
    let [furthest, at] = [toleranceMm, -1];
    for (let i = from + 1; i < to; i++) {
      const off = distanceToChord(line, i, from, to);
      if (off > furthest) [furthest, at] = [off, i];
    }
    if (at < 0) continue;
    keep[at] = 1;
    open.push([from, at], [at, to]);
  }
  const out: number[] = [];
  for (let i = 0; i < count; i++) if (keep[i] === 1) out.push(line[2 * i] ?? 0, line[2 * i + 1] ?? 0);
  return out;
}

function distanceToChord(line: Polyline, i: number, from: number, to: number): number {
  const [ax, ay] = [line[2 * from] ?? 0, line[2 * from + 1] ?? 0];
  const [bx, by] = [(line[2 * to] ?? 0) - ax, (line[2 * to + 1] ?? 0) - ay];
  const [px, py] = [(line[2 * i] ?? 0) - ax, (line[2 * i + 1] ?? 0) - ay];
  const length = bx * bx + by * by;
  const t = length > 0 ? Math.min(1, Math.max(0, (px * bx + py * by) / length)) : 0;
  return Math.hypot(px - t * bx, py - t * by);
}
