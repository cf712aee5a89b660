import type { Recording } from "./recording";
import { RECORDING_BANDS } from "./bands";
import type { Warning } from "./sound-report";

/** Under this, in s, a level is told with a warning. */
export const WANTED_S = 10;

/**
 * What to know about a recording before its levels are believed.
 *
 * In: the recording; what to call it; a prefix for the codes; the channel asked for (from 1; undefined where nobody chose).
 */
export function recordingWarnings(
  recording: Recording,
  what: string,
  prefix: string,
  channel: number | undefined,
): Warning[] {
  const { usedS, format, spectrum, silentSeconds } = recording;
  const warnings: Warning[] = [];
  const warn = (code: string, message: string) => warnings.push({ code: prefix + code, message });
  if (usedS < WANTED_S) warn("short", `${what} has ${usedS.toFixed(1)} s that can be used; 10 s or more are wanted.`);
  if (spectrum === undefined) {
    warn("digital-silence", `${what} is digital silence: every sample is the same, so no level can be known.`);
  } else if (silentSeconds > 0) {
    warn("drop-out", `${what} has ${silentSeconds} s of digital silence, which lower its level.`);
  }
  if (channel === undefined && format.channels > 1) {
    warn("channel-assumed", `${what} has ${format.channels} channels; the first was read.`);
  }
  const last = RECORDING_BANDS.at(-1);
  if (last !== undefined && last.upperHz > format.sampleRateHz / 2) {
    warn("rate-low", `At ${format.sampleRateHz} Hz ${what.toLowerCase()} can't hold every band up to 16 kHz.`);
  }
  return warnings;
}
