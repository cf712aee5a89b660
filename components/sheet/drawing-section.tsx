import { TraitsDrawingView } from "@/components/drawing/traits-drawing-view";
import { Section } from "@/components/ui/sheet";
import type { Sheet } from "@/lib/contracts/sheet";

/** Front and side, drawn from the traits; absent where too few of them are known to draw every rotor. */
export function DrawingSection({ sheet: { traits } }: { sheet: Sheet }) {
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
