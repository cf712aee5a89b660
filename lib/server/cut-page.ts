/**
 * A page of rows that were asked for with one more than it holds: the rows, and the key that the next page goes on
 * after; null on the last one.
 */
export function cutPage<Row>(
  rows: readonly Row[],
  limit: number,
  keyOf: (row: Row) => string | null,
): { page: Row[]; next: string | null } {
  const page = rows.slice(0, limit);
  const last = page.at(-1);
  return { page, next: rows.length > limit && last !== undefined ? keyOf(last) : null };
}
