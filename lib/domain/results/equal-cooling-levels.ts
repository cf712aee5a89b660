import type { LaidEntry } from "./lay-over";
import { sliderEnds } from "./compare-levels";

/** The level at which the baseline of an entry's session rises by ΔT, dB(A); NaN where its curve has no one answer. */
export function baselineLevelAt({ baseline }: LaidEntry, deltaTK: number): number {
  return baseline.curve?.deltaT.inverse(deltaTK) ?? Number.NaN;
}

/** The baseline's ΔT at a level in the first entry's session, K; undefined outside its range. */
export function baselineDeltaTAt(laid: readonly LaidEntry[], levelDba: number): number | undefined {
  return laid[0]?.baseline.curve?.deltaT.value(levelDba);
}

/**
 * The ends of a slider over ΔT in whole tenths of a kelvin: what the baselines show between the lowest and the highest
 * level that one entry and its baseline share. Undefined without such levels.
 */
export function coolingEnds(laid: readonly LaidEntry[]): { low: number; high: number } | undefined {
  const levels = sliderEnds(laid);
  if (!levels) return undefined;
  const shown = laid.flatMap(({ baseline: { curve } }) => {
    if (!curve) return [];
    const inside = (level: number) => Math.min(curve.deltaT.xMax, Math.max(curve.deltaT.xMin, level));
    return [levels.low, levels.high].flatMap((level) => curve.deltaT.value(inside(level)) ?? []);
  });
  if (shown.length === 0) return undefined;
  const low = Math.ceil(Math.min(...shown) * 10 - 1e-9) / 10;
  const high = Math.floor(Math.max(...shown) * 10 + 1e-9) / 10;
  return low < high ? { low, high } : undefined;
}

/** The ΔT that the other reading stands at, K: the one asked for, else the baseline's at `levelDba`; inside the ends. */
export function readingDeltaT(
  laid: readonly LaidEntry[],
  { asked, levelDba }: { asked: number | undefined; levelDba: number },
): number | undefined {
  const ends = coolingEnds(laid);
  const wanted = asked ?? baselineDeltaTAt(laid, levelDba);
  if (!ends || wanted === undefined) return undefined;
  return Math.min(ends.high, Math.max(ends.low, Math.round(wanted * 10) / 10));
}
