type InletKind = "straight" | "bellmouth" | "cone";

/** The parts of a mesh reading that traits are made of; masses are at 1 g/cm³. */
export interface ReadingForTraits {
  readonly rotors: readonly {
    readonly blades: number;
    readonly hand: "right" | "left";
    readonly hubDiameterMm: number;
    readonly tipDiameterMm: number;
    readonly sweptDiameterMm: number;
    readonly axialDepthMm: number;
    readonly shroud: boolean;
    readonly massG: number | null;
    readonly stations: readonly { spanFraction: number; pitchDeg: number; chordMm: number; solidity: number }[];
    readonly spacingDeg: readonly number[];
  }[];
  readonly spacingsMm: readonly number[];
  readonly struts: number | null;
  readonly inletStack: { readonly kind: InletKind; readonly lengthMm: number } | null;
  readonly spacer: { readonly lengthMm: number } | null;
}

/** A rotor's traits that a mesh can tell; null where this one doesn't. */
export interface RotorRead {
  blades: number;
  hand: "right" | "left";
  hubDiameterMm: number | null;
  tipDiameterMm: number | null;
  sweptDiameterMm: number | null;
  axialDepthMm: number | null;
  pitchMidDeg: number | null;
  chordMidMm: number | null;
  solidityMid: number | null;
  shroud: boolean;
  unequalSpacing: boolean;
  massG: number | null;
}

export interface TraitsRead {
  rotors: RotorRead[];
  spacerMm: number | null;
  struts: number | null;
  inletStack: InletKind | null;
  inletStackMm: number | null;
}

/** A gap between blades counts as another than equal from this share of it on (house limit, as the reader's warning has it). */
const unequalShare = 0.04;

/**
 * The traits that a reading of the mesh tells. Lengths in mm rounded to 0.01, angles in degrees to 0.1, solidity to
 * 0.001, mass in g to 0.1: a print is no better than that.
 *
 * @param densityGCm3 of the material; undefined gives no mass
 */
export function traitsRead(reading: ReadingForTraits, densityGCm3: number | undefined): TraitsRead {
  const gap = reading.spacingsMm[0];
  return {
    rotors: reading.rotors.map((rotor) => {
      const mid = rotor.stations.find((each) => Math.abs(each.spanFraction - 0.5) < 0.01);
      const equal = 360 / rotor.blades;
      return {
        blades: rotor.blades,
        hand: rotor.hand,
        hubDiameterMm: rounded(rotor.hubDiameterMm, 2),
        tipDiameterMm: rounded(rotor.tipDiameterMm, 2),
        sweptDiameterMm: rounded(rotor.sweptDiameterMm, 2),
        axialDepthMm: rounded(rotor.axialDepthMm, 2),
        pitchMidDeg: rounded(mid?.pitchDeg, 1),
        chordMidMm: rounded(mid?.chordMm, 2),
        solidityMid: rounded(mid?.solidity, 3),
        shroud: rotor.shroud,
        unequalSpacing: rotor.spacingDeg.some((each) => Math.abs(each - equal) > unequalShare * equal),
        massG: densityGCm3 === undefined || rotor.massG === null ? null : rounded(rotor.massG * densityGCm3, 1),
      };
    }),
    // A spacer in the file is told by itself, else the gap is; rotors that reach into each other have none.
    spacerMm:
      rounded(reading.spacer?.lengthMm, 2) ??
      (reading.rotors.length < 2 || gap === undefined ? null : Math.max(0, rounded(gap, 2) ?? 0)),
    struts: reading.struts,
    inletStack: reading.inletStack?.kind ?? null,
    inletStackMm: rounded(reading.inletStack?.lengthMm, 2),
  };
}

/** Null for what is missing, and for 0 and below, which none of these can be. */
function rounded(value: number | undefined, digits: number): number | null {
  if (value === undefined || !Number.isFinite(value)) return null;
  const at = Number(value.toFixed(digits));
  return at > 0 ? at : null;
}
