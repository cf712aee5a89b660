import { frameAlong, meshInFrame, type AxisFrame } from "../axis-frame";
import type { Mesh, Vec3 } from "../mesh";
import { plus } from "../vectors";
import type { SweptZone } from "./swept-volume";

/** A model in cooler coordinates, mm: the fan's axis is z, 0 is the cooler's mounting face, z points away from it. */
export interface PlacedModel {
  readonly mesh: Mesh;
  readonly zones: readonly SweptZone[];
}

export interface ModelOnAxis {
  readonly mesh: Mesh;
  readonly axis: { readonly pointMm: Vec3; readonly direction: Vec3 };
  readonly rotors: readonly SweptZone[];
}

/**
 * Puts a model before the cooler: its axis on the fan's, its rotors centred in frames of `frameDepthMm` that begin at
 * the mounting face, as many as it has rotors (a stack that is longer begins at the face). Directions across the axis
 * are as in the file. `turned` has the other end of the file towards the cooler.
 */
export function placeBeforeCooler(model: ModelOnAxis, frameDepthMm: number, turned: boolean): PlacedModel {
  const { pointMm, direction } = model.axis;
  const frame = turned ? turnedOver(frameAlong(direction)) : frameAlong(direction);
  const from = Math.min(...model.rotors.map((rotor) => rotor.fromMm));
  const to = Math.max(...model.rotors.map((rotor) => rotor.toMm));
  const room = Math.max(frameDepthMm * model.rotors.length, to - from);
  // The axis point is in the middle of all rotors.
  const mesh = meshInFrame(model.mesh, frame, plus(pointMm, frame.z, -room / 2));
  const zones = model.rotors.map((rotor) => {
    const ends = [rotor.fromMm, rotor.toMm].map((height) => (turned ? -1 : 1) * (height - (from + to) / 2) + room / 2);
    return { sweptDiameterMm: rotor.sweptDiameterMm, fromMm: Math.min(...ends), toMm: Math.max(...ends) };
  });
  return { mesh, zones };
}

const turnedOver = ({ x, y, z }: AxisFrame): AxisFrame => {
  const back = (v: Vec3): Vec3 => [-v[0], -v[1], -v[2]];
  return { x, y: back(y), z: back(z) };
};
