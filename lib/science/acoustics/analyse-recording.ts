import { Refusal } from "../refusal";
import { backgroundOf, isBackgroundRead, readBackground, type BackgroundRead } from "./background-read";
import { backgroundReport } from "./background-report";
import { RECORDING_BANDS } from "./bands";
import { readCalibrator, type CalibratorRead } from "./calibrator-read";
import type { RotorSet } from "./fan-tones";
import { LOUDNESS_BANDS, stationaryLoudness } from "./loudness";
import { readRecording, type ByteSource } from "./recording";
import { recordingWarnings } from "./recording-warnings";
import { rounded, type SoundGrade, type SoundReport, type Warning } from "./sound-report";
import { levelsOfPowers, type SpectrumLevels } from "./spectrum-levels";
import { toneReport } from "./tone-report";

export interface SoundOptions {
  /**
   * A calibrator recording with its level in dB, what was read from one before, or the level in dB of a signal whose rms
   * is 1 re full scale.
   */
  calibration: { recording: ByteSource; levelDb: number } | { read: CalibratorRead } | { fullScaleDb: number };
  /** From 1; the first where left out, with a warning if there are more. */
  channel?: number;
  /** A recording, or what was read from one before. */
  background?: ByteSource | BackgroundRead;
  /** engineering where left out. */
  grade?: SoundGrade;
  rotors?: RotorSet;
  /** Called with the bytes gone through so far, of all files, each of which is gone through twice. */
  onProgress?: (bytes: number) => void;
}

export interface SoundAnalysis {
  report: SoundReport;
  /** Narrow-band spectrum over the used seconds: level of each line in dB, -Infinity for none; null for silence. */
  spectrum: { spacingHz: number; levelsDb: Float64Array } | null;
  /** A-weighted level of every second of the recording, dB(A); -Infinity for silence. */
  secondsDba: number[];
  /** What it is where another recording takes it for its background. */
  asBackground: BackgroundRead;
}

/**
 * Everything that is read from a recording: levels, bands, tones, loudness, background.
 *
 * Levels, bands, tones and loudness are over the used seconds and not background-corrected; what is corrected says so in
 * its name. Null where a thing can't be known. Numbers are rounded to 1e-9. Runs alike on a server, in a web worker and
 * on the command line. Refusals carry a code; see readRecording, readCalibration and the checks here.
 * Source: docblocks of the parts.
 */
export async function analyseRecording(source: ByteSource, options: SoundOptions): Promise<SoundAnalysis> {
  const channel = options.channel ?? 1;
  if (!Number.isInteger(channel) || channel < 1) {
    throw new Refusal("channel-invalid", "Channels are whole numbers from 1.", "channel");
  }
  checkRotors(options.rotors);
  const progress = progressOf(options.onProgress);
  const recording = await readRecording(source, {
    channel,
    what: "The recording",
    keep: "undisturbed",
    onBytes: progress(),
  });
  const warnings: Warning[] = recordingWarnings(recording, "The recording", "", options.channel);
  const calibrated = await unitLevel(options, channel, progress());
  const { unitLevelDb } = calibrated;
  warnings.push(...calibrated.warnings);

  const { spectrum } = recording;
  const asBackground = backgroundOf(recording, channel);
  const levels = asBackground.powers === null ? undefined : levelsOfPowers(asBackground.powers, unitLevelDb);
  const corrected = await background(options, channel, unitLevelDb, levels, warnings, progress());
  const tones = spectrum === undefined ? undefined : toneReport(spectrum, unitLevelDb, options.rotors);
  warnings.push(...(tones?.warnings ?? []));
  const report: SoundReport = {
    kind: "sound",
    durationS: recording.durationS,
    usedS: recording.usedS,
    disturbed: recording.disturbed,
    sampleRateHz: recording.format.sampleRateHz,
    levelZDb: levels?.levelZDb ?? null,
    levelCDb: levels?.levelCDb ?? null,
    levelADba: levels?.levelADba ?? null,
    bands: RECORDING_BANDS.map(({ nominalHz, midHz }, i) => ({
      nominalHz,
      midHz,
      levelDb: levels?.bandsDb[i] ?? null,
    })),
    bandsCorrected: corrected?.bands ?? null,
    background: corrected?.report ?? null,
    correctedDba: corrected?.correctedDba ?? null,
    speedsRpm: tones?.speedsRpm ?? null,
    tones: tones?.tones ?? [],
    loudness: loudnessOf(levels, warnings),
    warnings,
  };
  return {
    report: rounded(report),
    spectrum:
      spectrum === undefined
        ? null
        : {
            spacingHz: spectrum.spacingHz,
            levelsDb: spectrum.psd.map((line) => 10 * Math.log10(line * spectrum.spacingHz) + unitLevelDb),
          },
    secondsDba: recording.secondsDb.map((levelDb) => levelDb + unitLevelDb),
    asBackground,
  };
}

function progressOf(onProgress: SoundOptions["onProgress"]): () => (bytes: number) => void {
  let before = 0;
  let latest = 0;
  return () => {
    before = latest;
    return (bytes) => {
      latest = before + bytes;
      onProgress?.(latest);
    };
  };
}

function checkRotors(rotors: RotorSet | undefined): void {
  if (rotors === undefined) return;
  const { blades, rpm, struts } = rotors;
  const whole = (value: number) => Number.isInteger(value) && value >= 1 && value <= 200;
  if (blades.length < 1 || blades.length > 2 || !blades.every(whole)) {
    throw new Refusal("blades-invalid", "Blades are one or two whole numbers from 1 to 200.", "blades");
  }
  if (rpm.length !== blades.length || !rpm.every((value) => value > 0 && Number.isFinite(value))) {
    throw new Refusal("rpm-invalid", "Speeds are numbers above 0, one for each blade count.", "rpm");
  }
  if (struts !== undefined && !(Number.isInteger(struts) && struts >= 0 && struts <= 200)) {
    throw new Refusal("struts-invalid", "Struts are a whole number from 0 to 200.", "struts");
  }
}

async function unitLevel(
  { calibration }: SoundOptions,
  channel: number,
  onBytes: (bytes: number) => void,
): Promise<CalibratorRead> {
  if ("read" in calibration) return calibration.read;
  if ("recording" in calibration) {
    return readCalibrator(calibration.recording, { channel, orMono: true, levelDb: calibration.levelDb, onBytes });
  }
  if (!Number.isFinite(calibration.fullScaleDb)) {
    throw new Refusal("full-scale-invalid", "The full-scale level is a number in dB.", "full-scale");
  }
  return { unitLevelDb: calibration.fullScaleDb, warnings: [] };
}

async function background(
  options: SoundOptions,
  channel: number,
  unitLevelDb: number,
  levels: SpectrumLevels | undefined,
  warnings: Warning[],
  onBytes: (bytes: number) => void,
): Promise<ReturnType<typeof backgroundReport> | undefined> {
  if (options.background === undefined) return undefined;
  const read = isBackgroundRead(options.background)
    ? options.background
    : await readBackground(options.background, { channel, onBytes });
  warnings.push(...read.warnings);
  if (levels === undefined || read.powers === null) return undefined;
  const result = backgroundReport(levels, levelsOfPowers(read.powers, unitLevelDb), options.grade ?? "engineering");
  warnings.push(...result.warnings);
  return result;
}

/** Null without sound, with bands beyond half the sample rate, and beyond the method's range (with a warning). */
function loudnessOf(levels: SpectrumLevels | undefined, warnings: Warning[]): SoundReport["loudness"] {
  const bands = levels?.bandsDb.slice(0, LOUDNESS_BANDS).filter((level) => level !== undefined);
  if (bands?.length !== LOUDNESS_BANDS) return null;
  try {
    return stationaryLoudness(bands);
  } catch (error) {
    if (!(error instanceof Refusal)) throw error;
    warnings.push({ code: error.code, message: error.message });
    return null;
  }
}
