import { angularSpeed } from "./balance";

/** Pascal to megapascal. */
const MPA = 1e-6;

/** Speed of the tip, m/s: π d n / 60. */
export function tipSpeedMs(diameterM: number, speedRpm: number): number {
  return (Math.PI * diameterM * speedRpm) / 60;
}

/** Hoop stress of a thin ring, MPa: ρ v² (Timoshenko, Strength of Materials II; Roark, rotating bodies). */
export function thinRingHoopMpa(densityKgM3: number, radiusM: number, speedRpm: number): number {
  return densityKgM3 * (radiusM * angularSpeed(speedRpm)) ** 2 * MPA;
}

/** Stress in the middle of a solid disc, MPa: (3 + ν)/8 ρ ω² R² (Roark). */
export function solidDiscMpa(densityKgM3: number, radiusM: number, speedRpm: number, poisson: number): number {
  return ((3 + poisson) / 8) * densityKgM3 * (radiusM * angularSpeed(speedRpm)) ** 2 * MPA;
}

/** Largest stresses of a disc with a hole, MPa. */
export interface AnnulusStress {
  /** At the bore. */
  readonly hoopMpa: number;
  /** At √(R r₀). */
  readonly radialMpa: number;
}

/**
 * Disc of radius R with a bore r₀: hoop ρω²/4 [(3+ν)R² + (1−ν)r₀²] at the bore, radial (3+ν)/8 ρω² (R − r₀)² (Shigley,
 * Mechanical Engineering Design, eq. 3-55; Roark). A bore however small doubles the solid disc's stress.
 */
export function annulusStress(
  densityKgM3: number,
  outerM: number,
  boreM: number,
  speedRpm: number,
  poisson: number,
): AnnulusStress {
  const load = densityKgM3 * angularSpeed(speedRpm) ** 2 * MPA;
  return {
    hoopMpa: (load / 4) * ((3 + poisson) * outerM ** 2 + (1 - poisson) * boreM ** 2),
    radialMpa: (load * (3 + poisson) * (outerM - boreM) ** 2) / 8,
  };
}

/**
 * Mean pull at a blade's root, MPa, for a cross-section that changes linearly to `areaRatio` (tip over root) of it:
 * ρω² [ (r_t² − r_h²)/2 − (1−λ)/L ((r_t³ − r_h³)/3 − r_h (r_t² − r_h²)/2) ]. Bending, stress concentration (2 to 3 at a
 * sharp root) and press fits are left out.
 */
export function bladeRootMpa(
  densityKgM3: number,
  rootRadiusM: number,
  tipRadiusM: number,
  speedRpm: number,
  areaRatio: number,
): number {
  const squares = (tipRadiusM ** 2 - rootRadiusM ** 2) / 2;
  const cubes = (tipRadiusM ** 3 - rootRadiusM ** 3) / 3;
  const taper = ((1 - areaRatio) / (tipRadiusM - rootRadiusM)) * (cubes - rootRadiusM * squares);
  return densityKgM3 * angularSpeed(speedRpm) ** 2 * (squares - taper) * MPA;
}

/** Hoop stress that blades hanging on a ring add to it, MPa: B m r_cg ω² / (2 π A). */
export function ringBladeLoadMpa(
  blades: number,
  bladeMassKg: number,
  centreRadiusM: number,
  ringAreaM2: number,
  speedRpm: number,
): number {
  return ((blades * bladeMassKg * centreRadiusM * angularSpeed(speedRpm) ** 2) / (2 * Math.PI * ringAreaM2)) * MPA;
}

/** Formal ratios of a strength to a stress: numbers to compare designs with, never a proof of anything. */
export interface StressRatio {
  readonly onStress: number;
  /** √ of it, as stress grows with the square of speed. */
  readonly onSpeed: number;
  /** Speed at which the formula alone reaches the strength, r/min. */
  readonly nominalSpeedRpm: number;
}

/** Ratio of `strengthMpa` (taken down to the share between layers) to a stress at a speed. */
export function stressRatio(stressMpa: number, strengthMpa: number, layerShare: number, speedRpm: number): StressRatio {
  const onStress = (strengthMpa * layerShare) / stressMpa;
  const onSpeed = Math.sqrt(onStress);
  return { onStress, onSpeed, nominalSpeedRpm: speedRpm * onSpeed };
}

/** Energy of a blade that comes off, J: m v² / 2 at its centre of mass. */
export function bladeEnergyJ(massKg: number, centreRadiusM: number, speedRpm: number): number {
  return (massKg * (centreRadiusM * angularSpeed(speedRpm)) ** 2) / 2;
}

/** Stress at an overspeed as a multiple of that at speed. */
export const overspeedStressRatio = (overspeed: number): number => overspeed ** 2;
