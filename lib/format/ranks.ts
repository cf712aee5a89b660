/** 1 → "1st", 2 → "2nd", 3 → "3rd", 11 → "11th". Throws a RangeError unless whole and 1 or more. */
export function formatRank(rank: number): string {
  if (!Number.isInteger(rank) || rank < 1) throw new RangeError("A rank is whole and at least 1");
  const tens = rank % 100;
  const ending = tens >= 11 && tens <= 13 ? "th" : (["th", "st", "nd", "rd"][rank % 10] ?? "th");
  return `${rank}${ending}`;
}

/** A rank's range among so many: "2nd to 5th of 14"; "1st of 14" when both ends are the same. */
export function formatRankRange(from: number, to: number, of?: number): string {
  const span = from === to ? formatRank(from) : `${formatRank(from)} to ${formatRank(to)}`;
  return of === undefined ? span : `${span} of ${of}`;
}
