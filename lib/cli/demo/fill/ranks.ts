type Row = Record<string, unknown>;

/**
 * Ranks rows of the read model by their ratio, smallest first, within a round or a season, and writes rank and spread
 * into them. The spread is made up from the uncertainty: no rounds are simulated for filled-in entries.
 */
export function rankRows(rows: readonly Row[], scope: "round" | "season"): void {
  const ratioOf = (row: Row): number | null =>
    typeof row.equal_noise_ratio === "number" ? row.equal_noise_ratio : null;
  const ranked = rows
    .filter((row) => ratioOf(row) !== null)
    .sort((a, b) => Number(ratioOf(a)) - Number(ratioOf(b)) || (String(a.entry_id) < String(b.entry_id) ? -1 : 1));
  const spread = Math.max(1, Math.round(ranked.length / 20));
  for (const row of rows) {
    const rank = ranked.indexOf(row) + 1;
    const isRanked = rank > 0;
    row[`${scope}_rank`] = isRanked ? rank : null;
    row[`${scope}_rank_low`] = isRanked ? Math.max(1, rank - spread) : null;
    row[`${scope}_rank_high`] = isRanked ? Math.min(ranked.length, rank + spread) : null;
    row[`${scope}_of`] = ranked.length;
    row.score = ratioOf(row);
    row.u_score = row.u_equal_noise_ratio ?? null;
    row.why_not_ranked = isRanked ? null : (row.equal_noise_why ?? "no figures");
  }
}
