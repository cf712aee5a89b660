import { besselJ1 } from "./bessel";

/**
 * Change of level in dB from one distance to another, point source in a free far field: −20 lg(r₂/r₁).
 * Not to be used on a reading close to the fan. Distances in the same unit, above 0. Source: spherical spreading.
 */
export function inverseSquareDb(fromM: number, toM: number): number {
  return -20 * Math.log10(toM / fromM);
}

/** Error in dB of a reading at a distance when the microphone stands nearer or farther by an amount (same unit). */
export function placementErrorDb(distanceMm: number, errorMm: number): { closerDb: number; fartherDb: number } {
  return {
    closerDb: inverseSquareDb(distanceMm, distanceMm - errorMm),
    fartherDb: inverseSquareDb(distanceMm, distanceMm + errorMm),
  };
}

/** Speed of sound in air in m/s at a temperature in °C: 20.05·√(273 + θ). Source: ISO 3741:2010 9.1.4. */
export function speedOfSoundMS(temperatureC: number): number {
  return 20.05 * Math.sqrt(273 + temperatureC);
}

/**
 * Frequency in Hz below which a distance in m lies inside the hydrodynamic near field, λ/2π.
 * Source: Bies & Hansen, Engineering Noise Control (value from memory).
 */
export function nearFieldFrequencyHz(distanceM: number, speedMS: number): number {
  return speedMS / (2 * Math.PI * distanceM);
}

/** Level in dB of an incoherent disc of a radius, on its axis, over the point-source law. Source: elementary integral. */
export function discOverPointDb(radiusM: number, distanceM: number): number {
  const ratio = (radiusM / distanceM) ** 2;
  return 10 * Math.log10(Math.log1p(ratio) / ratio);
}

/**
 * Excess in dB of a compact dipole's pressure over its far-field law: 10 lg(1 + 1/(kr)²). An illustration of how much
 * a close reading inflates low tones; never a correction. Source: Morse & Ingard, elementary dipole field.
 */
export function dipoleExcessDb(frequencyHz: number, distanceM: number, speedMS: number): number {
  const kr = (2 * Math.PI * frequencyHz * distanceM) / speedMS;
  return 10 * Math.log10(1 + 1 / (kr * kr));
}

/**
 * Level off the axis over that on it, dB, for a baffled piston; shows how an opening beams, and is no fan model.
 * In: frequency in Hz, radius in m, angle in degrees (0 to 90), speed of sound in m/s. Source: Kinsler, Fundamentals of
 * Acoustics, 20 lg|2J₁(x)/x| with x = ka·sin θ.
 */
export function pistonDirectivityDb(frequencyHz: number, radiusM: number, angleDeg: number, speedMS: number): number {
  const x = ((2 * Math.PI * frequencyHz * radiusM) / speedMS) * Math.sin((angleDeg * Math.PI) / 180);
  return x === 0 ? 0 : 20 * Math.log10(Math.abs((2 * besselJ1(x)) / x));
}
