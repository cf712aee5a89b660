import type { FanDrawing } from "@/lib/science/geometry/drawing/drawn-view";
import { drawingOfTraits, type DeclaredRotor } from "@/lib/science/geometry/drawing/traits-drawing";
import { FanDrawingView } from "./fan-drawing-view";

/** Traits as a sheet has them: what is unknown is null. */
export type DrawnTraits = {
  rotors: readonly {
    blades: number;
    hand: string;
    hubDiameterMm: number | null;
    tipDiameterMm: number | null;
    axialDepthMm?: number | null;
    pitchMidDeg: number | null;
    chordMidMm: number | null;
    shroud: boolean;
  }[];
  spacerMm: number;
  inletStackMm: number;
};

function declared(rotor: DrawnTraits["rotors"][number]): DeclaredRotor[] {
  const { hubDiameterMm, tipDiameterMm, pitchMidDeg, chordMidMm, axialDepthMm, hand } = rotor;
  if (hubDiameterMm === null || tipDiameterMm === null || pitchMidDeg === null || chordMidMm === null) return [];
  return [
    {
      blades: rotor.blades,
      hand: hand === "left" ? "left" : "right",
      hubDiameterMm,
      tipDiameterMm,
      axialDepthMm: axialDepthMm ?? undefined,
      pitchMidDeg,
      chordMidMm,
      shroud: rotor.shroud,
    },
  ];
}

/** The drawing of declared traits; undefined where too few of them are known to draw every rotor. */
export function drawingOf({ rotors: given, spacerMm, inletStackMm }: DrawnTraits): FanDrawing | undefined {
  const rotors = given.flatMap(declared);
  return rotors.length === given.length ? drawingOfTraits({ rotors, spacerMm, inletStackMm }) : undefined;
}

/** A drawing made from declared traits, which says so; nothing where too few of them are known to draw every rotor. */
export function TraitsDrawingView({ traits }: { traits: DrawnTraits }) {
  const drawing = drawingOf(traits);
  return drawing ? <FanDrawingView drawing={drawing} /> : null;
}
