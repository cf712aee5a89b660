import type { Kit, KitFrame } from "@/lib/contracts/kit";
import { frameDrawing } from "@/lib/science/geometry/drawing/frame-drawing";
import { drawingSvg } from "@/lib/science/geometry/drawing/svg-text";
import { kitFrameOf } from "./read-kit";

/** Name of a file of the kit, such as "season-4-120x25.svg". */
export const kitFileName = (kit: Kit, what: string, ending: string): string =>
  `${kit.season.slug}-${what
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, "-")
    .replace(/^-|-$/g, "")}.${ending}`;

/** The dimensioned drawing of a season's frame and its limits; what it shows is what the rows hold. */
export const kitDrawing = (kit: Kit, frame: KitFrame) =>
  frameDrawing(frame, { totalDepthMaxMm: kit.totalDepthMaxMm, inletStackMaxMm: kit.inletStackMaxMm });

/** The same as an SVG document in true size. */
export async function kitSvg(asked: { slug: string; frame: string }): Promise<{ name: string; text: string }> {
  const { kit, frame } = await kitFrameOf(asked);
  return { name: kitFileName(kit, frame.key, "svg"), text: drawingSvg(kitDrawing(kit, frame)) };
}
