import { formatNumber } from "./numbers";

/**
 * A-weighted level in dB with the distance in mm it was read at, never a bare "dB(A)": "49.6 dB(A) @ 100 mm";
 * "≤ 38.2 dB(A) @ 100 mm" for an upper bound. Throws a RangeError when a number is not finite.
 */
export function formatLevel(levelDba: number, distanceMm: number, { upperBound = false, decimals = 1 } = {}): string {
  const bound = upperBound ? "≤ " : "";
  return `${bound}${formatNumber(levelDba, { decimals })} ${levelUnit(distanceMm)}`;
}

/** The unit of a level with its distance, for a table's head or an axis: "dB(A) @ 100 mm". */
export function levelUnit(distanceMm: number): string {
  return `dB(A) @ ${formatNumber(distanceMm)} mm`;
}

/** The unit of an unweighted band or tone level with its distance: "dB @ 100 mm". */
export function bandUnit(distanceMm: number): string {
  return `dB @ ${formatNumber(distanceMm)} mm`;
}

/** A span of levels in dB(A) at a distance in mm, lower first: "38–55 dB(A) @ 100 mm". */
export function formatLevelRange(fromDba: number, toDba: number, distanceMm: number): string {
  return `${formatRange(Math.min(fromDba, toDba), Math.max(fromDba, toDba))} ${levelUnit(distanceMm)}`;
}

/** "38–55"; with a "to" where a minus would meet the dash: "−2 to 3". Any unit, ends in the order given. */
export function formatRange(from: number, to: number, { decimals = 0 } = {}): string {
  const join = from < 0 || to < 0 ? " to " : "–";
  return `${formatNumber(from, { decimals })}${join}${formatNumber(to, { decimals })}`;
}

/** A difference with its sign always shown: "−2.4 K", "+0.3 dB", "0.0". */
export function formatDelta(
  difference: number,
  { decimals = 1, unit }: { decimals?: number; unit?: string } = {},
): string {
  return `${formatNumber(difference, { decimals, signed: true })}${unit ? ` ${unit}` : ""}`;
}

/** A quantity and its unit: "57.6 K", "1 450 rpm". */
export function formatQuantity(value: number, unit: string, { decimals = 1 } = {}): string {
  return `${formatNumber(value, { decimals })} ${unit}`;
}

/** A ratio (1 is equal) in percent, "96.3 %", with the space that ISO 80000-1:2022, 7.1.4 asks for. */
export function formatPercent(ratio: number, { decimals = 1 } = {}): string {
  return `${formatNumber(ratio * 100, { decimals })} %`;
}
