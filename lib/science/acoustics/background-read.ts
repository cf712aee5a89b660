import { readRecording, type ByteSource, type Recording } from "./recording";
import { recordingWarnings } from "./recording-warnings";
import type { Warning } from "./sound-report";
import { spectrumPowers, type SpectrumPowers } from "./spectrum-levels";

/**
 * What a background recording gives to others: mean squares re full scale, null for digital silence, and its warnings.
 * Plain JSON without rounding, so that a background read before gives the same digits as one read with the recording.
 */
export interface BackgroundRead {
  powers: SpectrumPowers | null;
  warnings: Warning[];
}

export function isBackgroundRead(background: ByteSource | BackgroundRead): background is BackgroundRead {
  return typeof background === "object" && "powers" in background;
}

/** A recording as background; `channel` (from 1) is the one that was read. */
export function backgroundOf(recording: Recording, channel: number): BackgroundRead {
  const { spectrum } = recording;
  return {
    powers: spectrum === undefined ? null : spectrumPowers(spectrum),
    warnings: recordingWarnings(recording, "The background recording", "background-", channel),
  };
}

/** Reads a background recording, of a mono file its only channel. @throws Refusal see readRecording */
export async function readBackground(
  source: ByteSource,
  { channel, onBytes }: { channel: number; onBytes: (bytes: number) => void },
): Promise<BackgroundRead> {
  const what = "The background recording";
  return backgroundOf(
    await readRecording(source, { channel, orMono: true, what, keep: "undisturbed", onBytes }),
    channel,
  );
}
