/**
 * The toy model behind every figure of the demo. It is invented: it has the shape that small fans on a finned cooler
 * show (level rising with about 48 lg n, resistance falling with a power of speed towards a floor) and trait effects
 * made up for the trait study to find. It is no statement about real fans.
 */
export interface ToyRotor {
  blades: number;
  hand: "right" | "left";
  hubDiameterMm: number;
  tipDiameterMm: number;
  axialDepthMm: number;
  pitchMidDeg: number;
  chordMidMm: number;
  solidityMid: number;
  shroud: boolean;
  massG: number;
}

export interface ToyFan {
  rotors: readonly ToyRotor[];
  counterRotating: boolean;
  spacerMm: number;
  inletStack: "none" | "bellmouth" | "cone" | "straight";
  inletStackMm: number;
  struts: number;
  tipGapMm: number;
  /** What the model leaves unexplained: relative on the convective resistance, dB on the level. */
  luckCooling: number;
  luckLevelDb: number;
}

const referenceSpeedRpm = 1800;

/** Greatest common divisor of two blade counts. */
function gcd(a: number, b: number): number {
  return b === 0 ? a : gcd(b, a % b);
}

/** Thermal resistance in K/W at a speed in rpm: a floor of conduction and a convective part that falls with speed. */
export function resistanceKPerW(fan: ToyFan, speedRpm: number): number {
  const first = fan.rotors[0];
  if (!first) throw new RangeError("a fan has a rotor");
  const pitch = 1 + 0.0007 * (first.pitchMidDeg - 34) ** 2;
  const solidity = 1 - 0.06 * (first.solidityMid - 0.9);
  const gap = 1 + 0.045 * (fan.tipGapMm - 0.7);
  const stages = fan.rotors.length === 1 ? 1 : fan.counterRotating ? 0.86 : 0.93;
  const inlet = { none: 1, straight: 1.005, cone: 0.985, bellmouth: 0.97 }[fan.inletStack];
  const shroud = first.shroud ? 0.985 : 1;
  const convective = 0.172 * pitch * solidity * gap * stages * inlet * shroud * (1 + fan.luckCooling);
  return 0.2 + convective * (referenceSpeedRpm / speedRpm) ** 0.655;
}

/** A-weighted level in dB at the bench's microphone at a speed in rpm, without background. */
export function levelDba(fan: ToyFan, speedRpm: number): number {
  const [first, second] = fan.rotors;
  if (!first) throw new RangeError("a fan has a rotor");
  const blades = 0.12 * Math.abs(first.blades - 9);
  const load = 0.09 * (first.pitchMidDeg - 34) + 0.9 * (first.solidityMid - 0.9);
  const gap = 1.1 * (fan.tipGapMm - 0.7);
  const inlet = { none: 0, straight: 0.1, cone: -0.4, bellmouth: -1 }[fan.inletStack];
  const struts = fan.struts > 0 && fan.struts === first.blades ? 1.4 : 0.05 * fan.struts;
  const shroud = first.shroud ? 0.4 : 0;
  const stages = second
    ? 2.2 + (gcd(first.blades, second.blades) > 1 ? 1.3 : 0) - 0.06 * Math.min(fan.spacerMm, 15)
    : 0;
  const atReference = 54.2 + blades + load + gap + inlet + struts + shroud + stages + fan.luckLevelDb;
  return atReference + 48 * Math.log10(speedRpm / referenceSpeedRpm);
}

/** The demo's reference fan: seven plain blades, no stack. */
export const referenceFan: ToyFan = {
  rotors: [
    {
      blades: 7,
      hand: "right",
      hubDiameterMm: 42,
      tipDiameterMm: 112.6,
      axialDepthMm: 20,
      pitchMidDeg: 36,
      chordMidMm: 30,
      solidityMid: 0.88,
      shroud: false,
      massG: 24,
    },
  ],
  counterRotating: false,
  spacerMm: 0,
  inletStack: "none",
  inletStackMm: 0,
  struts: 4,
  tipGapMm: 0.7,
  luckCooling: 0,
  luckLevelDb: 0,
};

/** A second printed copy of it, which differs a little, as copies do. */
export const secondReferenceFan: ToyFan = { ...referenceFan, luckCooling: -0.004, luckLevelDb: 0.15 };
