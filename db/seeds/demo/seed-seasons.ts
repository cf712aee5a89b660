import type { Knex } from "knex";
import type { DemoBench } from "./seed-bench";

export interface DemoSeason {
  id: string;
  number: number;
  benchIndex: number;
  baselineUnitId: string;
  protocolVersionId: string;
  opensAt: Date;
}

const months = 6;
/** Declared levels of every season, dB(A) at the bench's microphone. */
export const demoLevelsDba: readonly number[] = [40, 46, 52];

/** Seasons follow each other every six months; the second bench version and later the second baseline unit come in between. */
export async function seedSeasons(db: Knex, bench: DemoBench, count: number): Promise<DemoSeason[]> {
  const seasons: DemoSeason[] = [];
  for (let number = 1; number <= count; number += 1) {
    const opensAt = new Date(Date.UTC(2025, (number - 1) * months, 5, 9));
    const later = number > Math.ceil(count / 2);
    const benchIndex = later ? 1 : 0;
    const version = bench.versions[benchIndex];
    const baselineUnitId = bench.baselineUnitIds[number === count && count > 1 ? 1 : 0];
    const protocolVersionId = bench.protocolVersionIds[benchIndex];
    if (!version || !baselineUnitId || !protocolVersionId) throw new Error("the bench of the demo is incomplete");
    const closesAt = new Date(Date.UTC(2025, number * months, 1, 9));
    const [row]: { id: string }[] = await db("season")
      .insert({
        number,
        slug: `season-${number}`,
        title: `Season ${number}`,
        summary: "An invented season of the Alder Bench.",
        rules:
          "One revision a design and season. It must fit the frame, clear the keep-out solids and pass the spin-up. The score is the mean ratio of ΔT/P to the session's baseline at the declared levels.",
        protocol_version_id: protocolVersionId,
        scoring_rule_version_id: bench.equalNoiseRuleId,
        levels_dba: [...demoLevelsDba],
        headline_dba: 46,
        total_depth_max_mm: 90,
        inlet_stack_max_mm: 30,
        opens_at: opensAt,
        closes_at: closesAt,
        opened_at: opensAt,
        closed_at: number < count ? closesAt : null,
      })
      .returning("id");
    if (!row) throw new Error("no season came back");
    await db("season_bench").insert({
      season_id: row.id,
      bench_version_id: version.id,
      budget_version_id: version.budgetId,
      from_at: opensAt,
    });
    await db("season_baseline").insert({ season_id: row.id, baseline_unit_id: baselineUnitId, from_at: opensAt });
    await db("season_frame").insert(
      ["120x25", "120x38"].map((key) => ({ season_id: row.id, frame_id: bench.frames.get(key) })),
    );
    seasons.push({ id: row.id, number, benchIndex, baselineUnitId, protocolVersionId, opensAt });
  }
  return seasons;
}
