import type { RotorSpec } from "@/lib/science/geometry/rotor-generator";

/** As the generator is told, so the traits must be: 9 blades, left-handed, tip diameter 110 mm, hub diameter 40 mm. */
export const nineBlades: RotorSpec = {
  blades: 9,
  hand: "left",
  helixPitchMm: 110,
  chordMm: 24,
  thicknessMm: 2,
  hubRadiusMm: 20,
  tipRadiusMm: 55,
  hubDepthMm: 22,
};
