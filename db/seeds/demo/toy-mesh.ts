import { boxAsMesh } from "@/lib/science/geometry/fit/keep-out";
import type { Mesh } from "@/lib/science/geometry/mesh";
import { generateRotors, type RotorSpec } from "@/lib/science/geometry/rotor-generator";
import { joinMeshes } from "@/lib/science/geometry/stl-write";
import type { ToyFan, ToyRotor } from "./toy-model";

const THICKNESS_MM = 2;
/** Rotors that turn beside each other are kept this far apart, beside the spacer. */
const APART_MM = 3;
/** Coarse enough to be read in a moment, fine enough to look round. */
const steps = { facets: 72, bladeSteps: { span: 10, chord: 8 } } as const;

/** Length along the axis of a rotor's blades at their root, where the pitch is steepest, or of its hub. */
function depthOf(rotor: ToyRotor): number {
  const hubRadius = rotor.hubDiameterMm / 2;
  const beta = Math.atan(helixPitch(rotor) / (2 * Math.PI * hubRadius));
  return Math.max(rotor.axialDepthMm, rotor.chordMidMm * Math.sin(beta) + THICKNESS_MM);
}

/** Rise of the helix that has the rotor's pitch at mid-span, mm in a turn. */
const helixPitch = ({ hubDiameterMm, tipDiameterMm, pitchMidDeg }: ToyRotor): number =>
  2 * Math.PI * ((hubDiameterMm + tipDiameterMm) / 4) * Math.tan((pitchMidDeg * Math.PI) / 180);

/** Whether each rotor's blades stay within a depth, mm, so that its mesh fits the frame that the design declares. */
export const isShallow = ({ rotors }: ToyFan, depthMm: number): boolean =>
  rotors.every((rotor) => depthOf(rotor) <= depthMm);

/** A toy fan's rotors as one mesh, the first at z = 0 and below the others: the demo's own parametric rotor. */
export function toyMesh({ rotors, spacerMm }: ToyFan): Mesh {
  let at = 0;
  const specs = rotors.map((rotor, i): RotorSpec => {
    const before = rotors[i - 1];
    if (before) at += (depthOf(before) + depthOf(rotor)) / 2 + spacerMm + APART_MM;
    const ring = rotor.shroud ? { shroud: { thicknessMm: 1.6, depthMm: rotor.axialDepthMm } } : {};
    return {
      blades: rotor.blades,
      hand: rotor.hand,
      helixPitchMm: helixPitch(rotor),
      chordMm: rotor.chordMidMm,
      thicknessMm: THICKNESS_MM,
      camber: 0.04,
      hubRadiusMm: rotor.hubDiameterMm / 2,
      // The ring stands within the declared diameter, so that it turns in the frame's bore.
      tipRadiusMm: rotor.tipDiameterMm / 2 - (rotor.shroud ? 1.6 : 0),
      hubDepthMm: rotor.axialDepthMm,
      boreRadiusMm: 2.5,
      middleZMm: at,
      ...ring,
      ...steps,
    };
  });
  return generateRotors(specs);
}

/** Plates of the invented cooler's fin stack below its mounting face, in cooler coordinates, mm. */
export function toyFinStack(fins: number): Mesh {
  const [width, height, depth, thickness] = [124, 118, 48, 0.5];
  const gap = height / fins;
  return joinMeshes(
    Array.from({ length: fins }, (_, i) => {
      const y = -height / 2 + i * gap;
      return boxAsMesh({ min: [-width / 2, y, -depth - 2], max: [width / 2, y + thickness, -2] });
    }),
  );
}
