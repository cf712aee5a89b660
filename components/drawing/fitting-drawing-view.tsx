import {
  frameDrawing,
  surroundingsDrawing,
  type FittingDrawing,
  type NamedBox,
} from "@/lib/science/geometry/drawing/frame-drawing";
import type { FanLimits } from "@/lib/science/geometry/fit/fan-limits";
import type { FrameSpec } from "@/lib/science/geometry/frames";
import { ViewSvg } from "./view-svg";

const FRONT_PX = 520;

function BothViews({ drawing, caption }: { drawing: FittingDrawing; caption: string }) {
  const pxPerMm = FRONT_PX / drawing.front.width;
  return (
    <figure className="grid gap-2">
      <div className="flex flex-wrap items-center gap-x-10 gap-y-4">
        <ViewSvg view={drawing.front} pxPerMm={pxPerMm} />
        <ViewSvg view={drawing.side} pxPerMm={pxPerMm} />
      </div>
      <figcaption className="small-print">{caption}</figcaption>
    </figure>
  );
}

/** A frame and its limits, dimensioned, in mm. */
export function FrameDrawingView({ frame, limits }: { frame: FrameSpec; limits: FanLimits }) {
  const caption = `Dimensions in mm. Dashed: the widest that may turn, after a tolerance of ${frame.toleranceMm} mm a side; the bore; the room for an inlet stack; the end of the depth allowed in all. The cooler is at the left of the side view.`;
  return <BothViews drawing={frameDrawing(frame, limits)} caption={caption} />;
}

/** What stands around the cooler beside a frame on it, by boxes. */
export function SurroundingsView({ frame, solids }: { frame: FrameSpec; solids: readonly NamedBox[] }) {
  const caption = `With a frame of ${frame.sizeMm} × ${frame.depthMm} mm on the mounting face, to scale. Solids that are kept as meshes are in the STL alone.`;
  return <BothViews drawing={surroundingsDrawing(frame, solids)} caption={caption} />;
}
