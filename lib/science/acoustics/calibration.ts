import { Refusal } from "../refusal";
import type { Recording } from "./recording";
import { bandPower } from "./spectrum-levels";

/** Reference sound pressure, Pa. */
export const REFERENCE_PA = 20e-6;
/** Two calibrations of a session may differ by this, dB. ISO 3744:2010 clause 5 (value from memory). */
export const DRIFT_LIMIT_DB = 0.5;

/** Sound pressure (rms) in Pa of a level in dB re 20 µPa. Source: definition. */
export function pressurePa(levelDb: number): number {
  return REFERENCE_PA * 10 ** (levelDb / 20);
}

export interface Calibration {
  /** Pa for a sample value of 1. */
  paPerFullScale: number;
  /** Level in dB of a signal whose rms is 1 re full scale: added to 20 lg of an rms. */
  offsetDb: number;
  /** Level in dB of a sine that just reaches full scale: where the recorder clips. */
  fullScaleSineDb: number;
}

/** Calibration from the rms (re full scale, above 0) that a known level in dB gave. Source: definition. */
export function calibrate(rmsFullScale: number, levelDb: number): Calibration {
  if (!(rmsFullScale > 0 && Number.isFinite(rmsFullScale) && Number.isFinite(levelDb))) {
    throw new Refusal("calibration-invalid", "A calibration needs a level and an rms above 0.");
  }
  const offsetDb = levelDb - 20 * Math.log10(rmsFullScale);
  return {
    paPerFullScale: pressurePa(levelDb) / rmsFullScale,
    offsetDb,
    fullScaleSineDb: offsetDb + 20 * Math.log10(Math.SQRT1_2),
  };
}

/** Change in dB between the calibrations before and after a session, and whether it is within 0.5 dB (value from memory). */
export function calibrationDrift(beforeDb: number, afterDb: number): { driftDb: number; withinLimit: boolean } {
  const driftDb = afterDb - beforeDb;
  return { driftDb, withinLimit: Math.round(Math.abs(driftDb) * 1e9) / 1e9 <= DRIFT_LIMIT_DB };
}

/** Share of the power that a calibrator's tone should have; below it a warning. Threshold of the house, no source. */
const TONAL_SHARE = 0.9;

export interface CalibrationReading extends Calibration {
  toneHz: number;
  /** Rms of the tone re full scale. */
  rms: number;
  /** True where the tone holds less than nine tenths of the recording's power. */
  noisy: boolean;
}

/**
 * Calibration from a recording of a calibrator at a level in dB.
 *
 * The rms is taken over the settled seconds and one third-octave either side of the strongest line above 100 Hz, so
 * that room noise doesn't bias it. Silence is refused. Source: definition; IEC 60942:2017 for calibrators.
 */
export function readCalibration(recording: Recording, levelDb: number): CalibrationReading {
  const { spectrum } = recording;
  if (spectrum === undefined) {
    throw new Refusal("calibration-silent", "The calibration recording is digital silence.");
  }
  const { psd, spacingHz } = spectrum;
  let peak = Math.ceil(100 / spacingHz);
  for (let k = peak; k < psd.length; k += 1) if ((psd[k] ?? 0) > (psd[peak] ?? 0)) peak = k;
  const toneHz = peak * spacingHz;
  const power = bandPower(spectrum, toneHz * 10 ** -0.1, toneHz * 10 ** 0.1);
  const rms = Math.sqrt(power);
  const noisy = power < TONAL_SHARE * bandPower(spectrum, 20, Infinity);
  return { ...calibrate(rms, levelDb), toneHz, rms, noisy };
}
