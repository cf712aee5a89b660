import { meshBounds, middleOf, type Mesh, type Vec3 } from "../mesh";
import { drawMesh, type LineDrawing } from "./draw-mesh";
import { pathOf, type FanDrawing } from "./drawn-view";
import {
  dimensionedFront,
  dimensionedSide,
  textHeightMm,
  type DimensionedRotor,
  type PlainView,
} from "./fan-dimensions";
import { drawableMesh } from "./sharp-edges";
import { frontView, sideView } from "./view";

/** Where a fan's rotors are in its file, as the analysis finds them. Heights count from the axis point. */
export interface DrawnFan {
  readonly axis: { readonly pointMm: Vec3; readonly direction: Vec3 } | null;
  readonly rotors: readonly DimensionedRotor[];
}

const plain = (drawing: LineDrawing): PlainView => ({
  ...drawing,
  outlines: [{ d: drawing.lines.map(pathOf).join(""), covers: false }],
});

/**
 * Front and side view of a fan's mesh (mm) with dimensions. The front is seen from the end that the axis points to; in
 * the side view the axis runs to the right. Without an axis the file's z is taken and only overall sizes are written.
 */
export function fanDrawing(mesh: Mesh, fan: DrawnFan): FanDrawing {
  const bounds = meshBounds(mesh);
  const direction = fan.axis?.direction ?? [0, 0, 1];
  const about = fan.axis?.pointMm ?? (bounds ? middleOf(bounds) : ([0, 0, 0] as const));
  const drawable = drawableMesh(mesh);
  const front = plain(drawMesh(drawable, frontView(direction), { about }));
  const side = plain(drawMesh(drawable, sideView(direction), { about }));
  const rotors = fan.axis ? centred(fan.rotors) : [];
  const textMm = textHeightMm(front);
  return {
    front: dimensionedFront(front, facing(rotors), textMm),
    side: dimensionedSide(side, rotors, textMm),
    from: "mesh",
  };
}

/** The axis point lies in the middle of all rotors, wherever their heights count from. */
function centred(rotors: readonly DimensionedRotor[]): DimensionedRotor[] {
  const middle =
    (Math.min(...rotors.map((rotor) => rotor.fromMm)) + Math.max(...rotors.map((rotor) => rotor.toMm))) / 2;
  return rotors.map((rotor) => ({ ...rotor, fromMm: rotor.fromMm - middle, toMm: rotor.toMm - middle }));
}

/** From the end that the axis points to, the last rotor is the first one sees. */
const facing = (rotors: readonly DimensionedRotor[]): DimensionedRotor[] => [...rotors].reverse();
