import type { PredictedTone } from "./fan-tones";

/** A tone belongs to a prediction within this share of its frequency, or within one line where that is more. */
export const MATCH_SHARE = 0.005;

export interface ToneMatch {
  kind: "blade-passing" | "interaction";
  rotor: 1 | 2 | null;
  m1: number;
  m2: number;
  strutModes: number[] | null;
  /** Found less predicted frequency, Hz. */
  residualHz: number;
}

const order = (tone: { m1: number; m2: number }) => Math.abs(tone.m1) + Math.abs(tone.m2);

/** Largest distance in Hz at which a tone belongs to a prediction. */
export function matchToleranceHz(predictedHz: number, spacingHz: number): number {
  return Math.max(spacingHz, MATCH_SHARE * predictedHz);
}

/**
 * Predictions that a found tone can be, best first: blade passing before interaction, then the smallest order, then the
 * nearest. Empty for none. Frequencies and line spacing in Hz.
 * Source: rule of the house; predictions after Tyler & Sofrin (1962) and Hanson (1985).
 */
export function matchTone(frequencyHz: number, predicted: readonly PredictedTone[], spacingHz: number): ToneMatch[] {
  return predicted
    .filter((tone) => Math.abs(frequencyHz - tone.frequencyHz) <= matchToleranceHz(tone.frequencyHz, spacingHz))
    .map((tone) => ({
      kind: tone.kind,
      rotor: tone.rotor,
      m1: tone.m1,
      m2: tone.m2,
      strutModes: tone.strutModes,
      residualHz: frequencyHz - tone.frequencyHz,
    }))
    .sort(
      (a, b) =>
        Number(a.kind === "interaction") - Number(b.kind === "interaction") ||
        order(a) - order(b) ||
        Math.abs(a.residualHz) - Math.abs(b.residualHz) ||
        (a.rotor ?? 0) - (b.rotor ?? 0),
    );
}
