/** A point of two quantities, both better when lower; each axis has its own unit. */
export interface Point {
  readonly x: number;
  readonly y: number;
}

/** For each point whether no other is at least as low in both and lower in one (Pareto front of minimisation). */
export function onFront(points: readonly Point[]): boolean[] {
  return points.map((p) => !points.some((q) => q.x <= p.x && q.y <= p.y && (q.x < p.x || q.y < p.y)));
}

/** Area that the points dominate below a reference point, in the product of both units; points beyond it add nothing. */
export function dominatedArea(points: readonly Point[], reference: Point): number {
  const inside = points.filter((p) => p.x < reference.x && p.y < reference.y).sort((a, b) => a.x - b.x || a.y - b.y);
  let area = 0;
  let lowest = reference.y;
  for (const { x, y } of inside) {
    if (y >= lowest) continue;
    area += (reference.x - x) * (lowest - y);
    lowest = y;
  }
  return area;
}

/** What each point adds to the area alone: 0 for a dominated one. Depends on the neighbours, so no basis for a rank. */
export function exclusiveAreas(points: readonly Point[], reference: Point): number[] {
  const whole = dominatedArea(points, reference);
  return points.map((_, i) => whole - dominatedArea(points.toSpliced(i, 1), reference));
}
