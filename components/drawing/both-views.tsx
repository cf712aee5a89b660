import type { ReactNode } from "react";
import type { DrawnView } from "@/lib/science/geometry/drawing/drawn-view";
import { ViewSvg } from "./view-svg";

export type BothViewsProps = { drawing: { front: DrawnView; side: DrawnView }; frontPx: number; caption: ReactNode };

/** Front, `frontPx` wide, and side at its scale: side by side, or one under the other. */
export function BothViews({ drawing: { front, side }, frontPx, caption }: BothViewsProps) {
  const pxPerMm = frontPx / front.width;
  return (
    <figure className="grid gap-2">
      <div className="flex flex-wrap items-center gap-x-10 gap-y-4">
        <ViewSvg view={front} pxPerMm={pxPerMm} />
        <ViewSvg view={side} pxPerMm={pxPerMm} />
      </div>
      <figcaption className="small-print">{caption}</figcaption>
    </figure>
  );
}
