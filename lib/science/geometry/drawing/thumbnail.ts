import { meshBounds, middleOf, type Mesh } from "../mesh";
import { drawMesh } from "./draw-mesh";
import { pathOf } from "./drawn-view";
import type { DrawnFan } from "./fan-drawing";
import { simplified } from "./polylines";
import { drawableMesh } from "./sharp-edges";
import { frontView } from "./view";

/** A front view as one path, mm, y downwards. */
export interface SmallFront {
  readonly minX: number;
  readonly minY: number;
  readonly width: number;
  readonly height: number;
  readonly d: string;
}

const PIXELS = 500;
/** A thumbnail is some 80 px across, so that a third of a pixel is thinned away. */
const TOLERANCE_SHARE = 1 / 240;
const MARGIN_SHARE = 1 / 60;

/** The front view of a fan's mesh (mm) without dimensions, thinned for a small picture. */
export function smallFront(mesh: Mesh, fan: DrawnFan): SmallFront {
  const bounds = meshBounds(mesh);
  const about = fan.axis?.pointMm ?? (bounds ? middleOf(bounds) : ([0, 0, 0] as const));
  const drawn = drawMesh(drawableMesh(mesh), frontView(fan.axis?.direction ?? [0, 0, 1]), { about, pixels: PIXELS });
  const longer = Math.max(drawn.maxX - drawn.minX, drawn.maxY - drawn.minY);
  const margin = longer * MARGIN_SHARE;
  return {
    minX: drawn.minX - margin,
    minY: -drawn.maxY - margin,
    width: drawn.maxX - drawn.minX + 2 * margin,
    height: drawn.maxY - drawn.minY + 2 * margin,
    d: drawn.lines.map((line) => pathOf(simplified(line, longer * TOLERANCE_SHARE))).join(""),
  };
}
