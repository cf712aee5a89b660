import { commonLevels, type LaidEntry } from "./lay-over";

/** How far figures of several entries may stand side by side; see "Comparable or not". */
export type Comparability = "same-axis" | "ratios" | "not-comparable";

/** One axis within one bench version, protocol and baseline unit; ratios within one unit; else only through a bridge. */
export function comparabilityOf(
  entries: readonly { benchVersionId: string; protocolVersionId: string; baselineUnitId: string }[],
): Comparability {
  const count = (of: (entry: (typeof entries)[number]) => string) => new Set(entries.map(of)).size;
  if (count((entry) => entry.baselineUnitId) > 1) return "not-comparable";
  return count((entry) => entry.benchVersionId) > 1 || count((entry) => entry.protocolVersionId) > 1
    ? "ratios"
    : "same-axis";
}

/** The ends of a slider in whole tenths of a dB inside the common levels, or undefined without any. */
export function sliderEnds(laid: readonly LaidEntry[]): { low: number; high: number } | undefined {
  const common = commonLevels(laid);
  if (!common) return undefined;
  const low = Math.ceil(common.low * 10 - 1e-9) / 10;
  const high = Math.floor(common.high * 10 + 1e-9) / 10;
  return low < high ? { low, high } : undefined;
}

/**
 * The level that one comparison is read at, dB(A): the one asked for, else the headline level, moved to the nearest end
 * of the slider; the headline level itself where there is no slider.
 */
export function readingLevel(
  laid: readonly LaidEntry[],
  { asked, headlineDba }: { asked: number | undefined; headlineDba: number },
): number {
  const ends = sliderEnds(laid);
  if (!ends) return headlineDba;
  const wanted = Math.round((asked ?? headlineDba) * 10) / 10;
  return Math.min(ends.high, Math.max(ends.low, wanted));
}
