import type { RotorRow, TraitRow } from "@/db/queries/shown/sheet";
import type { DrawnTraitsAnswer } from "@/lib/contracts/compare";

/** What a drawing from traits takes of a revision's rows; lengths in mm, null where they are not known. */
export function drawnTraits(
  trait: Pick<TraitRow, "spacer_mm" | "inlet_stack_mm">,
  rotors: readonly RotorRow[],
): DrawnTraitsAnswer {
  return {
    spacerMm: trait.spacer_mm,
    inletStackMm: trait.inlet_stack_mm,
    rotors: rotors.map((rotor) => ({
      blades: rotor.blades,
      hand: rotor.hand,
      hubDiameterMm: rotor.hub_diameter_mm,
      tipDiameterMm: rotor.tip_diameter_mm,
      axialDepthMm: rotor.axial_depth_mm,
      pitchMidDeg: rotor.pitch_mid_deg,
      chordMidMm: rotor.chord_mid_mm,
      shroud: rotor.shroud,
    })),
  };
}
