import { readCalibration } from "./calibration";
import { readRecording, type ByteSource } from "./recording";
import type { Warning } from "./sound-report";

/** Under this, in s, a calibrator's steady part is short. Threshold of the house, no source. */
const WANTED_S = 2;

/** What a calibrator recording gives to others: the level in dB of a signal whose rms is 1 re full scale. Not rounded. */
export interface CalibratorRead {
  unitLevelDb: number;
  warnings: Warning[];
}

/** A calibrator recording by itself. */
export interface CalibratorReading extends CalibratorRead {
  durationS: number;
  /** Seconds within half a decibel of the median: the calibrator was on and settled. */
  usedS: number;
  sampleRateHz: number;
  toneHz: number;
  /** Rms of the tone re full scale. */
  rms: number;
  /** Level in dB of a sine that just reaches full scale. */
  fullScaleSineDb: number;
}

/**
 * Reads a calibrator recording at a level in dB. Refusals of readRecording and readCalibration.
 *
 * @param options.orMono reads the only channel of a mono file, whichever is asked for
 */
export async function readCalibrator(
  source: ByteSource,
  options: { channel: number; orMono?: boolean; levelDb: number; onBytes?: (bytes: number) => void },
): Promise<CalibratorReading> {
  const { channel, orMono = false, levelDb, onBytes } = options;
  const recording = await readRecording(source, {
    channel,
    orMono,
    what: "The calibration recording",
    keep: "steady",
    ...(onBytes && { onBytes }),
  });
  const { offsetDb, fullScaleSineDb, toneHz, rms, noisy } = readCalibration(recording, levelDb);
  const warnings: Warning[] = [];
  if (recording.usedS < WANTED_S) {
    const message = `The calibrator is steady for ${recording.usedS.toFixed(1)} s only; 2 s or more are wanted.`;
    warnings.push({ code: "calibration-short", message });
  }
  if (noisy) {
    const message = `The calibrator's tone at ${toneHz.toFixed(0)} Hz holds under 90 % of its recording's power.`;
    warnings.push({ code: "calibration-noisy", message });
  }
  const { durationS, usedS, format } = recording;
  return {
    unitLevelDb: offsetDb,
    warnings,
    ...{ durationS, usedS, sampleRateHz: format.sampleRateHz, toneHz, rms, fullScaleSineDb },
  };
}
