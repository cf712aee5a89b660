/** Balance quality grades of ISO 21940-11:2016 (supersedes ISO 1940-1), mm/s: permissible e · Ω. */
export const balanceGrades = [0.4, 1, 2.5, 6.3, 16, 40, 100, 250, 630, 1600, 4000] as const;

/** Angular speed in rad/s of a speed in r/min. */
export const angularSpeed = (speedRpm: number): number => (speedRpm * Math.PI) / 30;

/**
 * Permissible residual unbalance, g·mm, of a rotor of `massKg` at `speedRpm` for the grade `gradeMmS`:
 * U = 1000 G m / Ω (ISO 21940-11:2016). Throws a RangeError for a speed or mass that isn't above zero.
 */
export function permissibleUnbalanceGmm(gradeMmS: number, massKg: number, speedRpm: number): number {
  if (!(speedRpm > 0) || !(massKg > 0)) throw new RangeError("speed and mass must be above zero");
  return (1000 * gradeMmS * massKg) / angularSpeed(speedRpm);
}

/** Unbalance as a rotor is drawn. */
export interface RotorUnbalance {
  /** m · e, g·mm. */
  readonly staticGmm: number;
  /** Distance of the centre of mass from the axis, mm. */
  readonly eccentricityMm: number;
  /** √(I_xz² + I_yz²) about the centre of mass, z along the axis, g·mm². */
  readonly coupleGmm2: number;
  /** Angle of the heavy side about the axis, rad, anticlockwise from x; undefined when nothing is off. */
  readonly heavyAngleRad: number | undefined;
}

/**
 * Static and couple unbalance from mass properties in a frame whose z is the rotation axis through x = y = 0. Uniform
 * density is assumed: a print differs by infill, seams and flow, so this judges the design, not the printed part.
 */
export function rotorUnbalance(
  massG: number,
  centreMm: readonly [number, number, number],
  productYzGmm2: number,
  productZxGmm2: number,
): RotorUnbalance {
  const eccentricityMm = Math.hypot(centreMm[0], centreMm[1]);
  return {
    staticGmm: massG * eccentricityMm,
    eccentricityMm,
    coupleGmm2: Math.hypot(productYzGmm2, productZxGmm2),
    heavyAngleRad: eccentricityMm > 0 ? Math.atan2(centreMm[1], centreMm[0]) : undefined,
  };
}

/** A unit mass somewhere on a rotor. */
export interface PointMass {
  readonly massG: number;
  readonly radiusMm: number;
  readonly angleRad: number;
  readonly heightMm: number;
}

/** Unbalance of point masses about the axis, couple about their own centre (rigid-body mechanics). */
export function pointMassUnbalance(masses: readonly PointMass[]): RotorUnbalance & { xzGmm2: number; yzGmm2: number } {
  const total = masses.reduce((sum, m) => sum + m.massG, 0);
  const x = (m: PointMass) => m.radiusMm * Math.cos(m.angleRad);
  const y = (m: PointMass) => m.radiusMm * Math.sin(m.angleRad);
  const mean = (pick: (m: PointMass) => number) => masses.reduce((sum, m) => sum + m.massG * pick(m), 0) / total;
  const centre = [mean(x), mean(y), mean((m) => m.heightMm)] as const;
  const xzGmm2 = masses.reduce((sum, m) => sum + m.massG * (x(m) - centre[0]) * (m.heightMm - centre[2]), 0);
  const yzGmm2 = masses.reduce((sum, m) => sum + m.massG * (y(m) - centre[1]) * (m.heightMm - centre[2]), 0);
  return { ...rotorUnbalance(total, centre, yzGmm2, xzGmm2), xzGmm2, yzGmm2 };
}

/** e · Ω in mm/s of an unbalance at a speed: the number that grades are compared with. */
export function unbalanceVelocityMmS(unbalanceGmm: number, massG: number, speedRpm: number): number {
  return (unbalanceGmm / massG) * angularSpeed(speedRpm);
}

/**
 * Indicative grade, such as "G6.3": the finest one that e · Ω stays within. Above the coarsest it is "above G4000". The
 * standard is written for machines of metal; on a printed rotor of some ten grams the grade is an indication only.
 */
export function indicativeGrade(unbalanceGmm: number, massG: number, speedRpm: number): string {
  const velocity = unbalanceVelocityMmS(unbalanceGmm, massG, speedRpm);
  const grade = balanceGrades.find((g) => velocity <= g);
  return grade === undefined ? "above G4000" : `G${grade}`;
}

/** Force in N of an unbalance at a speed: F = U ω². */
export function unbalanceForceN(unbalanceGmm: number, speedRpm: number): number {
  return unbalanceGmm * 1e-6 * angularSpeed(speedRpm) ** 2;
}

/** A mass to add, and where. */
export interface Correction {
  readonly massG: number;
  /** Opposite the heavy side, rad in [0, 2π). */
  readonly angleRad: number;
}

/** Mass at a radius that takes the static unbalance away; undefined where there is none. Radius above zero. */
export function staticCorrection(unbalance: RotorUnbalance, radiusMm: number): Correction | undefined {
  if (!(radiusMm > 0)) throw new RangeError("the radius must be above zero");
  if (unbalance.heavyAngleRad === undefined) return undefined;
  const turn = 2 * Math.PI;
  const angleRad = (((unbalance.heavyAngleRad + Math.PI) % turn) + turn) % turn;
  return { massG: unbalance.staticGmm / radiusMm, angleRad };
}
