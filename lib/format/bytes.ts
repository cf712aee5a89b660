import { formatNumber } from "./numbers";

const units = ["B", "kB", "MB", "GB", "TB"];

/**
 * A size in bytes with decimal prefixes (1 kB = 1000 B, IEC 80000-13:2008, clause 4): "612 B", "1.3 MB".
 * One decimal below 100 of a unit. Throws a RangeError below 0 or when not finite.
 */
export function formatBytes(bytes: number): string {
  if (!Number.isFinite(bytes) || bytes < 0) throw new RangeError("A size is finite and not below 0");
  let size = bytes;
  let step = 0;
  while (size >= 999.5 && step < units.length - 1) {
    size /= 1000;
    step += 1;
  }
  return `${formatNumber(size, { decimals: step > 0 && size < 99.95 ? 1 : 0 })} ${units[step] ?? "B"}`;
}
