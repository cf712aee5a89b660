/** A rectangle in canvas pixels: left, top, width, height. */
export type Box = { x: number; y: number; w: number; h: number };

export type LabelWish = {
  w: number;
  h: number;
  /** The mark that the label belongs to. */
  at: { x: number; y: number };
};

export type LabelPlace = Box & {
  /** It had to move so far that a line must tie it to its mark. */
  tied: boolean;
};

function overlap(a: Box, b: Box): number {
  const w = Math.min(a.x + a.w, b.x + b.w) - Math.max(a.x, b.x);
  const h = Math.min(a.y + a.h, b.y + b.h) - Math.max(a.y, b.y);
  return w > 0 && h > 0 ? w * h : 0;
}

function outside(box: Box, area: Box): number {
  const over =
    Math.max(0, area.x - box.x) +
    Math.max(0, box.x + box.w - area.x - area.w) +
    Math.max(0, area.y - box.y) +
    Math.max(0, box.y + box.h - area.y - area.h);
  return over * 1000;
}

/** Places around a mark, the best first: right of it, then over and under, then left, then further off. */
function candidates({ w, h, at }: LabelWish): LabelPlace[] {
  const places: LabelPlace[] = [];
  for (const gap of [10, 16, 24]) {
    places.push({ x: at.x + gap, y: at.y - h / 2, w, h, tied: false });
    for (const side of [-1, 1]) {
      const y = side < 0 ? at.y - gap - h : at.y + gap;
      places.push({ x: at.x + 6, y, w, h, tied: false });
      places.push({ x: at.x - w / 2, y, w, h, tied: false });
      places.push({ x: at.x - w - 6, y, w, h, tied: false });
    }
    places.push({ x: at.x - gap - w, y: at.y - h / 2, w, h, tied: false });
  }
  for (const far of [36, 50, 66, 84, 104, 126, 150]) {
    for (const side of [-1, 1]) {
      places.push({ x: at.x + 4, y: at.y + side * far - h / 2, w, h, tied: true });
      places.push({ x: at.x - w - 4, y: at.y + side * far - h / 2, w, h, tied: true });
    }
  }
  return places;
}

/**
 * Finds a place for each label, in canvas pixels, clear of the obstacles (marks, bars, lines), of each other and
 * within the area; the least bad place where none is clear. Order and length as given; no labels give none.
 */
export function placeLabels(wishes: readonly LabelWish[], obstacles: readonly Box[], area: Box): LabelPlace[] {
  const taken = [...obstacles];
  return wishes.map((wish) => {
    let best: LabelPlace | undefined;
    let least = Infinity;
    candidates(wish).forEach((place, order) => {
      const hits = taken.reduce((sum, box) => sum + overlap(place, box), 0);
      const cost = hits * 10 + outside(place, area) + order * 0.5;
      if (cost < least) [best, least] = [place, cost];
    });
    const place = best ?? { x: wish.at.x, y: wish.at.y, w: wish.w, h: wish.h, tied: false };
    taken.push({ x: place.x - 2, y: place.y - 1, w: place.w + 4, h: place.h + 2 });
    return place;
  });
}

/** Small boxes along a line, so that a label keeps clear of it. Points in canvas pixels, in drawing order. */
export function lineObstacles(points: readonly { x: number; y: number }[], step = 6): Box[] {
  return points.slice(1).flatMap((to, index) => {
    const from = points[index] ?? to;
    const count = Math.max(1, Math.ceil(Math.hypot(to.x - from.x, to.y - from.y) / step));
    return Array.from({ length: count }, (_, part) => ({
      x: from.x + ((to.x - from.x) * part) / count - 2,
      y: from.y + ((to.y - from.y) * part) / count - 2,
      w: 4,
      h: 4,
    }));
  });
}
