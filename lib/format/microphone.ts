import { distanceErrorDb } from "@/lib/science/acoustics/microphone-distance";
import { formatNumber } from "./numbers";

/** What a microphone off its distance reads wrong in a free field, in words: "0.42 dB low". Distances in mm, above 0. */
export function distanceErrorWords(nominalMm: number, actualMm: number): string {
  const errorDb = distanceErrorDb(nominalMm, actualMm);
  return `${formatNumber(Math.abs(errorDb), { decimals: 2 })} dB ${errorDb < 0 ? "low" : "high"}`;
}
