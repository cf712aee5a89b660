import type { Sheet, SheetTraits } from "@/lib/contracts/sheet";
import { formatNumber } from "@/lib/format/numbers";
import { countWords, numberWord } from "@/lib/format/words";

const whyWords = {
  "entry-not-reached": "this design was not measured on both sides of that level",
  "baseline-not-reached": "the baseline was not measured on both sides of that level",
  "baseline-rests-on-bound": "the baseline's level there is only an upper bound, so the comparison would flatter",
} as const;

/** Why a figure at a level is missing, for people. */
export function whyNotReached(why: keyof typeof whyWords | null): string {
  return why ? whyWords[why] : "not reached at that level";
}

/** "one printed copy, three mounts": what an interval covers, for captions. */
export function copiesAndMounts(sheet: Pick<Sheet, "specimens" | "points">): string {
  const copies = Math.max(1, sheet.specimens.length);
  const mounts = [...new Set(sheet.points.map((point) => point.mounts))].sort((a, b) => a - b);
  const [least = 1, most = least] = [mounts[0], mounts.at(-1)];
  const said = least === most ? numberWord(least) : `${numberWord(least)} to ${numberWord(most)}`;
  return `${numberWord(copies)} printed ${copies === 1 ? "copy" : "copies"}, ${said} ${most === 1 ? "mount" : "mounts"}`;
}

/** "2, counter-rotating". */
export function stageWords({ stages, counterRotating }: SheetTraits): string {
  if (stages === 1) return "1";
  return `${stages}, ${counterRotating ? "counter-rotating" : "same way round"}`;
}

/** "3 h 45 min" for a number of minutes. */
export function printTimeWords(minutes: number): string {
  const [hours, rest] = [Math.floor(minutes / 60), Math.round(minutes % 60)];
  if (hours === 0) return `${rest} min`;
  return rest === 0 ? `${hours} h` : `${hours} h ${rest} min`;
}

/** "1 correction", or nothing. */
export function correctedWords(count: number): string | undefined {
  return count === 0 ? undefined : countWords(count, "correction");
}

/** "Sheet 0142". */
export function sheetNumber(number: number): string {
  return `Sheet ${String(number).padStart(4, "0")}`;
}

/** A licence's identifier as people write it: "CC BY-SA 4.0" for "CC-BY-SA-4.0". */
export function licenceWords(key: string): string {
  const parts = /^CC-(.+)-(\d\.\d)$/.exec(key);
  return parts ? `CC ${parts[1]} ${parts[2]}` : key.replace(/^CC0-/, "CC0 ");
}

/** An inlet stack of this share of the microphone's distance or more may read high on axis (house rule, no source). */
export const stackShareSaid = 1 / 5;

/** Whether the sheet must say that the on-axis reading may be high, and show the off-axis one beside it. */
export function stackReadsHigh({ traits, bench }: Pick<Sheet, "traits" | "bench">): boolean {
  return traits.inletStackMm >= stackShareSaid * bench.microphoneDistanceMm;
}

/** "20 mm". */
export const millimetres = (value: number, decimals = 0): string => `${formatNumber(value, { decimals })} mm`;
