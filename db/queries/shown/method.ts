import type { Handle } from "../../client/connect";

export interface MethodVersionRow {
  number: number;
  note: string;
  from: Date;
}

/** Every method version, the newest first. */
export async function shownMethodVersions(db: Handle): Promise<MethodVersionRow[]> {
  return db("shown.method_version")
    .orderBy("number", "desc")
    .select({ number: "number", note: "note", from: "from_at" });
}

export interface ShownBudgetPartRow {
  bench: string;
  budgetVersion: number;
  microphone: string;
  microphoneDistanceMm: number;
  quantity: "level_dba" | "delta_t_k";
  name: string;
  u: number;
  unit: string;
  evaluation: "A" | "B";
  distribution: string;
  dof: number | null;
  source: string;
  kind: "own_run" | "own_mount" | "shared_offset" | "shared_gain";
}

/** Parts of every budget version that a season counts, by bench version, levels first. */
export async function shownBudgetParts(db: Handle): Promise<ShownBudgetPartRow[]> {
  return db("shown.budget_part as t")
    .join("shown.bench_version as v", "v.id", "t.bench_version_id")
    .orderBy([
      "v.bench_name",
      { column: "v.number", order: "desc" },
      { column: "t.budget_number", order: "desc" },
      { column: "t.quantity", order: "desc" },
      "t.kind",
      "t.name",
    ])
    .select({
      bench: db.raw("v.bench_name || ', version ' || v.number"),
      budgetVersion: "t.budget_number",
      microphone: "v.microphone",
      microphoneDistanceMm: "v.microphone_distance_mm",
      quantity: "t.quantity",
      name: "t.name",
      u: "t.u",
      unit: "t.unit",
      evaluation: "t.evaluation",
      distribution: "t.distribution",
      dof: "t.dof",
      source: "t.source",
      kind: "t.kind",
    });
}
