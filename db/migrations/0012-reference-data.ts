import type { Knex } from "knex";
import { framePresets } from "@/lib/science/geometry/frames";

/** SHA-256 of the golden result of method 1; a test holds it to the recorded file. */
const goldenOfMethod1 = "d1df1ba5552300da17d6b7b05df59c05933a53319b70ef4d6a8318159076e739";

/**
 * What every installation starts with: method 1, the scoring rules at their first version, and the frame presets.
 * The presets are the domain's own; a host edits them.
 */
export async function up(knex: Knex): Promise<void> {
  await knex("method_version").insert({ number: 1, note: "The first method.", golden_sha256: goldenOfMethod1 });
  const rules = [
    [
      "equal-noise",
      "Equal noise",
      "mean over the declared levels L of (ΔT/P)(L) ÷ (ΔT/P of the session's baseline)(L)",
      {},
    ],
    ["plain-sum", "Plain sum", "mean over the set speeds of ΔT + L", {}],
    ["plain-product", "Plain product", "mean over the set speeds of ΔT · L", {}],
    ["conductance-less-level", "Conductance less level", "mean over the set speeds of 10 lg(P/ΔT) − L", {}],
    ["speed-neutral", "Speed neutral", "mean over the set speeds of 10 lg(P/ΔT) − (m/5) · L", { m: 0.6 }],
  ] as const;
  for (const [key, name, formula, parameters] of rules) {
    const [rule]: { id: string }[] = await knex("scoring_rule").insert({ key, name }).returning("id");
    await knex("scoring_rule_version").insert({
      rule_id: rule?.id,
      number: 1,
      kind: key,
      formula,
      parameters: JSON.stringify(parameters),
    });
  }
  await knex("frame").insert(
    framePresets.map((frame) => ({
      key: frame.key,
      class_mm: frame.sizeMm,
      outer_mm: frame.sizeMm,
      hole_spacing_mm: frame.holeSpacingMm,
      bore_mm: frame.boreMm,
      depth_mm: frame.depthMm,
      hole_diameter_mm: frame.holeMm,
      tolerance_mm: frame.toleranceMm,
    })),
  );
}

export async function down(knex: Knex): Promise<void> {
  // The rows of these tables are insert only, so their triggers are lifted for as long as it takes.
  for (const table of ["scoring_rule_version", "method_version"]) {
    await knex.raw("alter table ?? disable trigger user", [table]);
    await knex(table).delete();
    await knex.raw("alter table ?? enable trigger user", [table]);
  }
  await knex("scoring_rule").delete();
  await knex("frame").delete();
}
