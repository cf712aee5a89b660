import { FrameDrawingView } from "@/components/drawing/fitting-drawing-view";
import { buttonClass } from "@/components/ui/button-class";
import { Section } from "@/components/ui/sheet";
import type { Kit } from "@/lib/contracts/kit";
import { formatFrame } from "@/lib/format/frames";

export const kitPath = (kit: Kit): string => `/api/v1/seasons/${kit.season.slug}/kit`;

/** Each frame that the season allows, dimensioned, to look at and to take along. */
export function KitFrames({ kit, note }: { kit: Kit; note: string }) {
  return kit.frames.map((frame) => {
    const path = `${kitPath(kit)}/frames/${frame.key}`;
    const name = formatFrame(frame.key);
    return (
      <Section
        key={frame.key}
        id={`frame-${frame.key}`}
        title={`Frame ${name}`}
        note={note}
        className="grid gap-4"
        aside={
          <span className="flex flex-wrap gap-3">
            <a className={buttonClass("outline", true)} download href={`${path}/drawing.svg`}>
              Take the drawing of {name} (SVG)
            </a>
            <a className={buttonClass("outline", true)} download href={`${path}/drawing.pdf`}>
              On A4 (PDF)
            </a>
          </span>
        }
      >
        <FrameDrawingView frame={frame} limits={kit} />
      </Section>
    );
  });
}
