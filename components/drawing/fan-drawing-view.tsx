import type { FanDrawing } from "@/lib/science/geometry/drawing/drawn-view";
import { BothViews } from "./both-views";

const FRONT_PX = 460;

/** Front and side of a fan with dimensions in mm, side by side or one under the other, and what they were drawn from. */
export function FanDrawingView({ drawing, caption }: { drawing: FanDrawing; caption?: string }) {
  const from = drawing.from === "mesh" ? "Drawn from the mesh" : "Drawn from declared traits, not from a mesh";
  const words = `${from}; dimensions in mm${caption ? `; ${caption}` : ""}.`;
  return <BothViews drawing={drawing} frontPx={FRONT_PX} caption={words} />;
}
