import { analyseRecording, type SoundOptions } from "@/lib/science/acoustics/analyse-recording";
import type { BackgroundRead } from "@/lib/science/acoustics/background-read";
import { readCalibrator, type CalibratorRead } from "@/lib/science/acoustics/calibrator-read";
import type { RotorSet } from "@/lib/science/acoustics/fan-tones";
import type { ByteSource } from "@/lib/science/acoustics/recording";
import { rounded, type SoundGrade, type SoundReport } from "@/lib/science/acoustics/sound-report";

/** What a recording's level is told by: a calibrator recorded before, or the level in dB of an rms of 1 re full scale. */
export type RecordingCalibration = { read: CalibratorRead } | { fullScaleDb: number };

/** What to read a bench recording as. `channel` counts from 1; null where nobody chose. */
export type RecordingOrder =
  | {
      purpose: "calibration";
      channel: number | null;
      /** The calibrator's level, dB. */
      levelDb: number;
      /** What its reading is told by; null where it is the first and tells itself. */
      against: RecordingCalibration | null;
    }
  | { purpose: "background"; channel: number | null; calibration: RecordingCalibration }
  | {
      purpose: "run";
      channel: number | null;
      calibration: RecordingCalibration;
      background: BackgroundRead | null;
      grade: SoundGrade;
      rotors: RotorSet | null;
    };

/** What a calibrator recording says. Levels in dB. */
export interface CalibratorReport {
  levelDb: number;
  /** What the chain reads it at; the level itself where it is the first. */
  readDb: number;
  toneHz: number;
  steadyS: number;
  unitLevelDb: number;
  fullScaleSineDb: number;
}

export interface RecordingResult {
  report: SoundReport;
  calibrator: CalibratorReport | null;
  /** What later recordings read this one as, unrounded: null where it isn't such a recording. */
  given: { calibrator: CalibratorRead | null; background: BackgroundRead | null };
}

/** How often a file's bytes are gone through for an order, so that progress has a whole. */
export const passesOf = ({ purpose }: Pick<RecordingOrder, "purpose">): number => (purpose === "calibration" ? 4 : 2);

/**
 * Reads one recording of the bench; browser preview and server call it alike, and its report is the command line's.
 *
 * @param onProgress called with the bytes gone through so far; the whole is `passesOf(order)` times the file
 * @throws Refusal see analyseRecording and readCalibrator
 */
export async function readBenchRecording(
  source: ByteSource,
  order: RecordingOrder,
  onProgress: (bytes: number) => void = () => undefined,
): Promise<RecordingResult> {
  if (order.purpose === "calibration") return readCalibration(source, order, onProgress);
  const options: SoundOptions = { calibration: order.calibration, onProgress };
  if (order.channel !== null) options.channel = order.channel;
  if (order.purpose === "run") {
    options.grade = order.grade;
    if (order.background) options.background = order.background;
    if (order.rotors) options.rotors = order.rotors;
  }
  const { report, asBackground } = await analyseRecording(source, options);
  const background = order.purpose === "background" ? asBackground : null;
  return { report, calibrator: null, given: { calibrator: null, background } };
}

async function readCalibration(
  source: ByteSource,
  { channel, levelDb, against }: RecordingOrder & { purpose: "calibration" },
  onProgress: (bytes: number) => void,
): Promise<RecordingResult> {
  let done = 0;
  const reading = await readCalibrator(source, {
    channel: channel ?? 1,
    levelDb,
    onBytes: (bytes) => onProgress((done = bytes)),
  });
  const { unitLevelDb, warnings } = reading;
  const { report } = await analyseRecording(source, {
    calibration: { read: { unitLevelDb, warnings } },
    ...(channel !== null && { channel }),
    onProgress: (bytes) => onProgress(done + bytes),
  });
  const calibrator = rounded({
    levelDb,
    readDb: against === null ? levelDb : 20 * Math.log10(reading.rms) + unitOf(against),
    toneHz: reading.toneHz,
    steadyS: reading.usedS,
    unitLevelDb,
    fullScaleSineDb: reading.fullScaleSineDb,
  });
  return { report, calibrator, given: { calibrator: { unitLevelDb, warnings }, background: null } };
}

const unitOf = (calibration: RecordingCalibration): number =>
  "read" in calibration ? calibration.read.unitLevelDb : calibration.fullScaleDb;
