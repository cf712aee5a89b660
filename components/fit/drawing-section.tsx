import { FanDrawingView } from "@/components/drawing/fan-drawing-view";
import { TurnView } from "@/components/turn/turn-view";
import { buttonClass } from "@/components/ui/button-class";
import { Section } from "@/components/ui/sheet";
import { LoadingState } from "@/components/ui/states";
import type { ModelReadingActs, ModelState } from "@/lib/client/fit/use-model-reading";

export type DrawingSectionProps = {
  name: string;
  drawn: Extract<ModelState, { step: "measured" }>["drawn"];
  turn: ModelReadingActs["turn"];
};

/** The model as a line drawing with dimensions, to look at and to take along. */
export function DrawingSection({ name, drawn, turn }: DrawingSectionProps) {
  const base = name.replace(/\.[^.]*$/, "");
  return (
    <Section
      id="drawing"
      title="Drawing"
      note="front and side"
      aside={
        drawn ? (
          <a
            className={buttonClass("outline", true)}
            download={`${base}.svg`}
            href={`data:image/svg+xml;charset=utf-8,${encodeURIComponent(drawn.svg)}`}
          >
            Take the drawing (SVG)
          </a>
        ) : null
      }
    >
      {drawn ? (
        <div className="grid gap-4">
          <FanDrawingView drawing={drawn.drawing} />
          <TurnView label={drawn.drawing.front.title} load={turn} />
        </div>
      ) : (
        <LoadingState label="Drawing" />
      )}
    </Section>
  );
}
