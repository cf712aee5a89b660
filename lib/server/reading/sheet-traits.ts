import type { SheetTraits } from "@/lib/contracts/sheet";
import type { SheetAnswer } from "./read-sheet";

/** A revision's traits as the sheet shows them. @throws Error when the revision has none: publishing keeps that out */
export function sheetTraits(found: SheetAnswer["revisions"], revisionId: string): SheetTraits {
  const trait = found.traits.find((each) => each.revision_id === revisionId);
  if (!trait) throw new Error(`the revision ${revisionId} is public without traits`);
  const rotors = found.rotors.filter((rotor) => rotor.revision_id === revisionId);
  const read = [trait, ...rotors].flatMap(({ holds }) =>
    Object.entries(holds).flatMap(([key, from]) => (from === "read" ? [key] : [])),
  );
  return {
    stages: trait.stages,
    counterRotating: trait.counter_rotating,
    spacerMm: trait.spacer_mm,
    inletStack: trait.inlet_stack,
    inletStackMm: trait.inlet_stack_mm,
    struts: trait.struts,
    frameKey: trait.frame_key,
    tipGapMm: trait.tip_gap_mm,
    material: trait.material,
    printTimeMin: trait.print_time_min,
    rotors: rotors.map((rotor) => ({
      position: rotor.position,
      blades: rotor.blades,
      hand: rotor.hand,
      hubDiameterMm: rotor.hub_diameter_mm,
      tipDiameterMm: rotor.tip_diameter_mm,
      pitchMidDeg: rotor.pitch_mid_deg,
      chordMidMm: rotor.chord_mid_mm,
      solidityMid: rotor.solidity_mid,
      shroud: rotor.shroud,
      unequalSpacing: rotor.unequal_spacing,
      massG: rotor.mass_g,
    })),
    readFromMesh: [...new Set(read)].sort(),
  };
}
