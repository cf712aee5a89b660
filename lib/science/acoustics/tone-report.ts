import { isProminent } from "./ecma-tones";
import { predictTones, type RotorSet } from "./fan-tones";
import { findTones } from "./found-tones";
import { matchTone } from "./match-tones";
import { estimateSpeeds } from "./speed-estimate";
import type { ReportedTone, Warning } from "./sound-report";
import type { Spectrum } from "./welch";

/** The estimated speed may differ from the tachometer by this share before a warning. Threshold of the house, no source. */
const TACHOMETER_SHARE = 0.005;

/**
 * Tones of a recording with ratios, prominence and what they are: speeds first, then matches at those speeds.
 *
 * In: spectrum; level in dB of a signal whose rms is 1 in its unit; rotors where known. Where no family gives a speed, the
 * tachometer's speeds are matched and a warning says so.
 * Source: ECMA-418-1:2024 for ratios; rule of the house for matching.
 */
export function toneReport(
  spectrum: Spectrum,
  unitLevelDb: number,
  rotors: RotorSet | undefined,
): { tones: ReportedTone[]; speedsRpm: number[] | null; warnings: Warning[] } {
  const found = findTones(spectrum);
  const warnings: Warning[] = [];
  let speedsRpm: number[] | null = null;
  if (rotors !== undefined) {
    const estimate = estimateSpeeds(found, rotors.blades, rotors.rpm, spectrum.spacingHz);
    speedsRpm = estimate?.speedsRpm ?? null;
    warnings.push(...speedWarnings(rotors, estimate));
  }
  const predicted = rotors === undefined ? [] : predictTones({ ...rotors, rpm: speedsRpm ?? rotors.rpm });
  const tones = found.map((tone): ReportedTone => {
    const [best, ...alsoMatches] = matchTone(tone.frequencyHz, predicted, spectrum.spacingHz);
    return {
      frequencyHz: tone.frequencyHz,
      levelDb: 10 * Math.log10(tone.power) + unitLevelDb,
      toneToNoiseDb: tone.toneToNoiseDb,
      prominenceDb: tone.prominenceDb ?? null,
      prominent: isProminent(tone.frequencyHz, tone.toneToNoiseDb, tone.leads ? tone.prominenceDb : undefined),
      match: best === undefined ? null : { ...best, alsoMatches },
    };
  });
  return { tones, speedsRpm, warnings };
}

function speedWarnings(
  rotors: RotorSet,
  estimate: { speedsRpm: readonly number[]; carriedOver: readonly number[] } | undefined,
): Warning[] {
  if (estimate === undefined) {
    const message = "No blade-passing family was found: tones are matched at the tachometer's speeds.";
    return [{ code: "speed-not-found", message }];
  }
  const warnings: Warning[] = estimate.carriedOver.map((rotor) => ({
    code: "speed-carried-over",
    message: `Rotor ${rotor} shows no blade-passing family: its speed is the tachometer's, scaled as the other rotor's.`,
  }));
  estimate.speedsRpm.forEach((speed, i) => {
    const rpm = rotors.rpm[i] ?? speed;
    if (Math.abs(speed / rpm - 1) <= TACHOMETER_SHARE || estimate.carriedOver.includes(i + 1)) return;
    const message = `Rotor ${i + 1} sounds like ${speed.toFixed(0)} rpm; the tachometer says ${rpm} rpm.`;
    warnings.push({ code: "tachometer-differs", message });
  });
  return warnings;
}
