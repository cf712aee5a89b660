import { pathOf, type FanDrawing } from "./drawn-view";
import { dimensionedFront, dimensionedSide, textHeightMm, type DimensionedRotor } from "./fan-dimensions";
import { bladeDepthMm, frontBlades, sideBlades, type TraitBlades } from "./trait-blades";

/** A rotor as declared. Lengths in mm, angles in degrees from the plane of rotation. */
export interface DeclaredRotor {
  readonly blades: number;
  readonly hand: "right" | "left";
  readonly hubDiameterMm: number;
  readonly tipDiameterMm: number;
  /** Undefined where it wasn't declared: the blades' own depth is drawn then, and none is written. */
  readonly axialDepthMm?: number;
  readonly pitchMidDeg: number;
  readonly chordMidMm: number;
  readonly shroud: boolean;
}

/** A fan as declared: rotors from the inlet on. */
export interface DeclaredFan {
  readonly rotors: readonly DeclaredRotor[];
  /** Free length between neighbouring rotors, mm. */
  readonly spacerMm: number;
  readonly inletStackMm: number;
}

/** Width of a ring that is only declared to be there, mm (house value). */
const RING_MM = 1.6;
const CIRCLE_STEPS = 96;

function circle(radius: number): number[] {
  const out: number[] = [];
  for (let k = 0; k <= CIRCLE_STEPS; k++) {
    const angle = (2 * Math.PI * k) / CIRCLE_STEPS;
    out.push(radius * Math.cos(angle), radius * Math.sin(angle));
  }
  return out;
}

const rectangle = (fromX: number, toX: number, half: number): string =>
  `${pathOf([fromX, -half, toX, -half, toX, half, fromX, half])}Z`;

const bladesOf = (rotor: DeclaredRotor): TraitBlades => ({
  ...rotor,
  hubRadiusMm: rotor.hubDiameterMm / 2,
  tipRadiusMm: rotor.tipDiameterMm / 2,
});

/**
 * Front (from the inlet) and side view of a fan drawn from declared traits alone: plain helical blades, a plain hub, a
 * ring where one is declared; an inlet stack is a dashed box. A picture of the traits, not of the part; it says so in
 * `from`. Undefined without a rotor, or where a rotor's diameters, depth or blades don't make one.
 */
export function drawingOfTraits(fan: DeclaredFan): FanDrawing | undefined {
  const [first] = fan.rotors;
  if (!first || !fan.rotors.every(isDrawable)) return undefined;
  const placed = place(fan);
  const outer = Math.max(...placed.map((rotor) => rotor.sweptDiameterMm)) / 2;
  const extent = { minX: -outer, minY: -outer, maxX: outer, maxY: outer };
  const ring = first.shroud ? [circle(first.tipDiameterMm / 2 + RING_MM), circle(first.tipDiameterMm / 2)] : [];
  const front = {
    ...extent,
    outlines: [...ring, ...frontBlades(bladesOf(first)), circle(first.hubDiameterMm / 2)].map((line) => ({
      d: pathOf(line),
      covers: false,
    })),
  };
  const length = placed.at(-1)?.toMm ?? 0;
  const side = {
    minX: -fan.inletStackMm,
    maxX: length,
    minY: -outer,
    maxY: outer,
    outlines: fan.rotors.flatMap((rotor, index) => sideOutlines(rotor, placed[index])),
    dashed: fan.inletStackMm > 0 ? rectangle(-fan.inletStackMm, 0, outer) : "",
  };
  const textMm = textHeightMm(front);
  return {
    front: dimensionedFront(front, placed, textMm),
    side: dimensionedSide(
      side,
      placed,
      textMm,
      fan.rotors.every((rotor) => rotor.axialDepthMm !== undefined),
    ),
    from: "traits",
  };
}

const isDrawable = (rotor: DeclaredRotor): boolean =>
  rotor.blades >= 1 &&
  rotor.hubDiameterMm > 0 &&
  rotor.tipDiameterMm > rotor.hubDiameterMm &&
  (rotor.axialDepthMm ?? 1) > 0 &&
  rotor.chordMidMm > 0 &&
  rotor.pitchMidDeg > 0 &&
  rotor.pitchMidDeg < 90;

/** Rotors one after the other from height 0, the spacer between them. */
function place({ rotors, spacerMm }: DeclaredFan): DimensionedRotor[] {
  let from = 0;
  return rotors.map((rotor) => {
    const fromMm = from;
    const toMm = fromMm + (rotor.axialDepthMm ?? bladeDepthMm(bladesOf(rotor)));
    from = toMm + spacerMm;
    return { ...rotor, sweptDiameterMm: rotor.tipDiameterMm + (rotor.shroud ? 2 * RING_MM : 0), fromMm, toMm };
  });
}

function sideOutlines(rotor: DeclaredRotor, at: DimensionedRotor | undefined) {
  const [from, to] = [at?.fromMm ?? 0, at?.toMm ?? 0];
  const { behind, before } = sideBlades(bladesOf(rotor), (from + to) / 2, (to - from) / 2);
  const cover = (line: readonly number[]) => ({ d: `${pathOf(line)}Z`, covers: true });
  const hub = { d: rectangle(from, to, rotor.hubDiameterMm / 2), covers: true };
  const ring = { d: rectangle(from, to, rotor.tipDiameterMm / 2 + RING_MM), covers: true };
  return rotor.shroud ? [ring] : [...behind.map(cover), hub, ...before.map(cover)];
}
