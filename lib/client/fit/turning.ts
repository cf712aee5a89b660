import { indicativeGrade, permissibleUnbalanceGmm, unbalanceForceN } from "@/lib/science/mechanics/balance";
import { overspeedStressRatio, tipSpeedMs } from "@/lib/science/mechanics/burst";
import { printMaterials, spinCautions, stressAssumptions, type PrintMaterial } from "@/lib/science/mechanics/materials";
import { MEASURED_AT, type RotorTraits } from "./messages";

/** Overspeed of the proof before a first measurement (common practice, no source): 1.15 to 1.25 of bench speed. */
export const OVERSPEED = 1.25;

/** What turns in a rotor at a speed, for a density. Null where the mesh doesn't tell. */
export interface TurningFigures {
  readonly massG: number | null;
  readonly tipSpeedMs: number;
  readonly staticGmm: number | null;
  readonly coupleGmm2: number | null;
  readonly forceN: number | null;
  readonly grade: string | null;
  /** Unbalance that G 6.3 permits, g·mm. */
  readonly permittedGmm: number | null;
  readonly correctionMassG: number | null;
  readonly correctionAngleDeg: number | null;
  readonly hoopMpa: number | null;
  readonly rootMpa: number | null;
  readonly hoopOverMpa: number | null;
  readonly rootOverMpa: number | null;
}

/**
 * Carries a rotor's figures from those of the measurement to a density (g/cm³) and a speed (r/min, above zero): mass and
 * unbalance grow with density, stress with density and the square of speed.
 */
export function turningFigures(rotor: RotorTraits, densityGCm3: number, speedRpm: number): TurningFigures {
  const dense = densityGCm3 / MEASURED_AT.densityGCm3;
  const stressed = dense * (speedRpm / MEASURED_AT.speedRpm) ** 2;
  const times = (value: number | null, factor: number): number | null => (value === null ? null : value * factor);
  const massG = times(rotor.massG, dense);
  const staticGmm = times(rotor.staticUnbalanceGmm, dense);
  const known = massG !== null && massG > 0 && staticGmm !== null;
  const over = stressed * overspeedStressRatio(OVERSPEED);
  return {
    massG,
    tipSpeedMs: tipSpeedMs(rotor.sweptDiameterMm / 1000, speedRpm),
    staticGmm,
    coupleGmm2: times(rotor.coupleUnbalanceGmm2, dense),
    forceN: staticGmm === null ? null : unbalanceForceN(staticGmm, speedRpm),
    grade: known ? indicativeGrade(staticGmm, massG, speedRpm) : null,
    permittedGmm: known ? permissibleUnbalanceGmm(6.3, massG / 1000, speedRpm) : null,
    correctionMassG: times(rotor.correction?.massG ?? null, dense),
    correctionAngleDeg: rotor.correction ? (rotor.correction.angleRad * 180) / Math.PI : null,
    hoopMpa: times(rotor.hoopMpa, stressed),
    rootMpa: times(rotor.rootMpa, stressed),
    hoopOverMpa: times(rotor.hoopMpa, over),
    rootOverMpa: times(rotor.rootMpa, over),
  };
}

/** Materials with their ranges, and what is said wherever a stress is. */
export const stressWords = { materials: printMaterials, assumptions: stressAssumptions, cautions: spinCautions };
export type { PrintMaterial };
