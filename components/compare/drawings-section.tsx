import { drawingOf } from "@/components/drawing/traits-drawing-view";
import { ViewSvg } from "@/components/drawing/view-svg";
import { Section } from "@/components/ui/sheet";
import type { ComparedHead } from "@/lib/contracts/compare";
import { nameOf } from "./names";

/** Front and side of each, side by side and all at one scale, as long as the page is wide enough for them to stand so. */
export function DrawingsSection({ heads }: { heads: readonly ComparedHead[] }) {
  const drawn = heads.map((head) => ({ head, drawing: drawingOf(head.drawnFrom) }));
  const views = drawn.flatMap(({ drawing }) => (drawing ? [drawing.front, drawing.side] : []));
  if (views.length === 0) return null;
  const widest = Math.max(...views.map((view) => view.width));
  const share = (width: number) => `${((100 * width) / widest).toFixed(2)}%`;
  return (
    <Section id="drawings" title="Drawings at one scale" note="in millimetres">
      <div className="grid grid-cols-[repeat(auto-fill,minmax(min(15rem,100%),1fr))] gap-x-8 gap-y-6">
        {drawn.map(({ head, drawing }) => (
          <figure key={head.entryId} className="grid content-start gap-3">
            <figcaption className="font-bold">{nameOf(head, heads)}</figcaption>
            {drawing ? (
              [drawing.front, drawing.side].map((view) => (
                <ViewSvg
                  key={view.title}
                  view={{ ...view, title: `${nameOf(head, heads)}: ${view.title}` }}
                  width={share(view.width)}
                />
              ))
            ) : (
              <p className="small-print">Too few traits are declared to draw it.</p>
            )}
          </figure>
        ))}
      </div>
      <p className="small-print mt-2">Drawn from declared traits, not from a mesh; the inlet side is on the left.</p>
    </Section>
  );
}
