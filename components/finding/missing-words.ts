import type { IndexItem } from "@/lib/contracts/index-query";

/** Why an entry has no figure at its headline level, for people. */
export function whyNoEqualNoise({ equalNoiseWhy, headlineDba }: IndexItem): string {
  if (equalNoiseWhy === "entry-not-reached") return `this entry was not measured at ${headlineDba} dB(A)`;
  if (equalNoiseWhy === "baseline-not-reached") return `the baseline does not reach ${headlineDba} dB(A)`;
  if (equalNoiseWhy === "baseline-rests-on-bound")
    return `the baseline at ${headlineDba} dB(A) is only known as “at most”`;
  return "not read at the headline level";
}

/** Why an entry has no rank, for people. */
export function whyNoRank({ whyNotRanked }: IndexItem): string {
  return whyNotRanked ? `not ranked: ${whyNotRanked}` : "not ranked";
}
