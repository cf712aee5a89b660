import {
  annulusStress,
  bladeRootMpa,
  ringBladeLoadMpa,
  thinRingHoopMpa,
  tipSpeedMs,
} from "@/lib/science/mechanics/burst";
import { indicativeGrade, rotorUnbalance, staticCorrection } from "@/lib/science/mechanics/balance";
import { POISSON_PRINTED } from "@/lib/science/mechanics/materials";
import type { RotorTraits } from "./analysis-types";
import type { BladeRow } from "./blade-row";
import type { MassProperties } from "./mass-properties";

/** A row of blades with what it weighs and how far it reaches. */
export interface MeasuredRow {
  readonly row: BladeRow;
  /** Undefined where mass can't be known. */
  readonly mass: MassProperties | undefined;
  readonly fromMm: number;
  readonly toMm: number;
}

/** Traits of one rotor; stresses and grade only with a speed, mass figures only with a mass. Density in g/cm³. */
export function rotorTraits(measured: MeasuredRow, densityGCm3: number, speedRpm: number | undefined): RotorTraits {
  const { row, mass, fromMm, toMm } = measured;
  const unbalance = mass && rotorUnbalance(mass.massG, mass.centreMm, mass.inertiaGmm2[4], mass.inertiaGmm2[5]);
  const turning = speedRpm === undefined || speedRpm <= 0 ? undefined : speedRpm;
  return {
    blades: row.blades,
    hand: row.hand,
    tipDiameterMm: 2 * row.tipRadiusMm,
    sweptDiameterMm: 2 * row.sweptRadiusMm,
    hubDiameterMm: 2 * row.hubRadiusMm,
    boreDiameterMm: 2 * row.boreRadiusMm,
    axialDepthMm: toMm - fromMm,
    fromMm,
    toMm,
    shroud: row.shroud,
    stations: row.stations,
    spacingDeg: spacing(row.anglesRad),
    massG: mass?.massG ?? null,
    staticUnbalanceGmm: unbalance?.staticGmm ?? null,
    coupleUnbalanceGmm2: unbalance?.coupleGmm2 ?? null,
    correction: (unbalance && staticCorrection(unbalance, row.hubRadiusMm)) ?? null,
    balanceGrade: mass && unbalance && turning ? indicativeGrade(unbalance.staticGmm, mass.massG, turning) : null,
    tipSpeedMs: turning ? tipSpeedMs((2 * row.sweptRadiusMm) / 1000, turning) : null,
    hoopMpa: turning ? hoopMpa(row, densityGCm3 * 1000, turning) : null,
    rootMpa: turning ? rootMpa(row, densityGCm3 * 1000, turning) : null,
    confidence: row.confidence,
  };
}

function spacing(anglesRad: readonly number[]): number[] {
  return anglesRad.map((angle, i) => {
    const next = anglesRad[i + 1] ?? (anglesRad[0] ?? 0) + 2 * Math.PI;
    return ((next - angle) * 180) / Math.PI;
  });
}

/** Section area at the tip over that at the root, both read near the ends of the span; equal where unknown. */
function taper(row: BladeRow): number {
  return row.rootAreaMm2 > 0 && row.tipAreaMm2 > 0 ? row.tipAreaMm2 / row.rootAreaMm2 : 1;
}

function rootMpa(row: BladeRow, densityKgM3: number, speedRpm: number): number {
  return bladeRootMpa(densityKgM3, row.hubRadiusMm / 1000, row.tipRadiusMm / 1000, speedRpm, taper(row));
}

/**
 * Largest hoop stress of the part that runs around: with a ring, the ring as a thin one at its outside, with the outer
 * half of each blade hanging on it; without, the hub as a disc with its bore.
 */
function hoopMpa(row: BladeRow, densityKgM3: number, speedRpm: number): number {
  if (!row.shroud) {
    const [outer, bore] = [row.hubRadiusMm / 1000, row.boreRadiusMm / 1000];
    return annulusStress(densityKgM3, outer, bore, speedRpm, POISSON_PRINTED).hoopMpa;
  }
  const own = thinRingHoopMpa(densityKgM3, row.sweptRadiusMm / 1000, speedRpm);
  const ringAreaM2 = (row.sweptRadiusMm - row.tipRadiusMm) * (row.toZMm - row.fromZMm) * 1e-6;
  const half = (row.tipRadiusMm - row.hubRadiusMm) / 2;
  const bladeKg = densityKgM3 * row.tipAreaMm2 * half * 1e-9;
  const load =
    ringAreaM2 > 0
      ? ringBladeLoadMpa(row.blades, bladeKg, (row.tipRadiusMm - half / 2) / 1000, ringAreaM2, speedRpm)
      : 0;
  return own + load;
}
