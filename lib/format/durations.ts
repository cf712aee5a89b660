/**
 * A duration in seconds in its two largest fitting units: 45 → "45 s", 754 → "12 min 34 s", 7500 → "2 h 5 min",
 * 200000 → "2 d 8 h". Fractions are rounded to whole seconds. Throws a RangeError below 0 or when not finite.
 */
export function formatDuration(durationS: number): string {
  if (!Number.isFinite(durationS) || durationS < 0) throw new RangeError("A duration is finite and not below 0");
  const units = [
    ["d", 86400],
    ["h", 3600],
    ["min", 60],
    ["s", 1],
  ] as const;
  const total = Math.round(durationS);
  const first = units.findIndex(([, size]) => total >= size);
  if (first < 0) return "0 s";
  // The last unit shown is rounded, not cut: 3599.6 s is 1 h, and 89 999 s is 1 d 1 h.
  const last = units[Math.min(first + 1, units.length - 1)] ?? units[3];
  const rounded = Math.round(total / last[1]) * last[1];
  const parts: string[] = [];
  let left = rounded;
  for (const [name, size] of units) {
    const count = Math.floor(left / size);
    left -= count * size;
    if (count > 0) parts.push(`${count} ${name}`);
  }
  return parts.slice(0, 2).join(" ");
}
