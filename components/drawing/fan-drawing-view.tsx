import type { FanDrawing } from "@/lib/science/geometry/drawing/drawn-view";
import { ViewSvg } from "./view-svg";

const FRONT_PX = 460;

/** Front and side of a fan with dimensions in mm, side by side or one under the other, and what they were drawn from. */
export function FanDrawingView({ drawing, caption }: { drawing: FanDrawing; caption?: string }) {
  const pxPerMm = FRONT_PX / drawing.front.width;
  const from = drawing.from === "mesh" ? "Drawn from the mesh" : "Drawn from declared traits, not from a mesh";
  return (
    <figure className="grid gap-2">
      <div className="flex flex-wrap items-center gap-x-10 gap-y-4">
        <ViewSvg view={drawing.front} pxPerMm={pxPerMm} />
        <ViewSvg view={drawing.side} pxPerMm={pxPerMm} />
      </div>
      <figcaption className="small-print">
        {from}; dimensions in mm{caption ? `; ${caption}` : ""}.
      </figcaption>
    </figure>
  );
}
