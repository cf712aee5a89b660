import { frameDrawing, surroundingsDrawing, type NamedBox } from "@/lib/science/geometry/drawing/frame-drawing";
import type { FanLimits } from "@/lib/science/geometry/fit/fan-limits";
import type { FrameSpec } from "@/lib/science/geometry/frames";
import { BothViews } from "./both-views";

const FRONT_PX = 520;

/** A frame and its limits, dimensioned, in mm. */
export function FrameDrawingView({ frame, limits }: { frame: FrameSpec; limits: FanLimits }) {
  const caption = `Dimensions in mm. Dashed: the widest that may turn, after a tolerance of ${frame.toleranceMm} mm a side; the bore; the room for an inlet stack; the end of the depth allowed in all. The cooler is at the left of the side view.`;
  return <BothViews drawing={frameDrawing(frame, limits)} frontPx={FRONT_PX} caption={caption} />;
}

/** What stands around the cooler beside a frame on it, by boxes. */
export function SurroundingsView({ frame, solids }: { frame: FrameSpec; solids: readonly NamedBox[] }) {
  const caption = `With a frame of ${frame.sizeMm} × ${frame.depthMm} mm on the mounting face, to scale. Solids that are kept as meshes are in the STL alone.`;
  return <BothViews drawing={surroundingsDrawing(frame, solids)} frontPx={FRONT_PX} caption={caption} />;
}
