import { FanDrawingView } from "@/components/drawing/fan-drawing-view";
import { TraitsDrawingView } from "@/components/drawing/traits-drawing-view";
import { TurnSheetModel } from "@/components/turn/turn-sheet-model";
import { buttonClass } from "@/components/ui/button-class";
import { Section } from "@/components/ui/sheet";
import type { SheetDrawing } from "@/lib/contracts/drawing";
import type { Sheet } from "@/lib/contracts/sheet";
import { formatBytes } from "@/lib/format/bytes";

/** Front and side: from the mesh where one was read, else from the traits; absent where too few of them are known. */
export function DrawingSection({ sheet: { traits }, drawn }: { sheet: Sheet; drawn: SheetDrawing | null }) {
  if (drawn) {
    const { model, drawing, readerVersion } = drawn;
    const address = `/api/v1/files/${model.attachmentId}`;
    return (
      <Section
        id="drawing"
        title="Drawing"
        note="from the mesh, in millimetres"
        className="grid gap-4"
        aside={
          <a className={buttonClass("outline", true)} download href={address}>
            Take {model.name} ({formatBytes(model.bytes)})
          </a>
        }
      >
        <FanDrawingView drawing={drawing} caption={`read from ${model.name} by reader ${readerVersion}`} />
        <TurnSheetModel address={address} name={model.name} bytes={model.bytes} label={drawing.front.title} />
      </Section>
    );
  }
  const known = traits.rotors.every(
    (rotor) =>
      rotor.hubDiameterMm !== null &&
      rotor.tipDiameterMm !== null &&
      rotor.pitchMidDeg !== null &&
      rotor.chordMidMm !== null,
  );
  if (!known || traits.rotors.length === 0) return null;
  return (
    <Section id="drawing" title="Drawing" note="from the traits, in millimetres">
      <TraitsDrawingView traits={traits} />
    </Section>
  );
}
