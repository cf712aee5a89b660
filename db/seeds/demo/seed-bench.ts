import type { Knex } from "knex";

export interface DemoBench {
  benchId: string;
  versions: { id: string; budgetId: string; positions: { id: string; name: string }[] }[];
  frames: Map<string, string>;
  protocolVersionIds: string[];
  equalNoiseRuleId: string;
  baselineUnitIds: string[];
}

async function one(db: Knex, table: string, row: Record<string, unknown>): Promise<string> {
  const [made]: { id: string }[] = await db(table).insert(row).returning("id");
  if (!made) throw new Error(`no row of ${table} came back`);
  return made.id;
}

/** The parts of the Alder Bench's uncertainty budget; invented, of a size that such a bench could have. */
const budgetParts = [
  ["level_dba", "Meter's display step", 0.029, "dB", "B", "rectangular", null, "step 0.1 dB, a/√12", "own_run"],
  [
    "level_dba",
    "Averaging over 10 s",
    0.12,
    "dB",
    "A",
    "normal",
    24,
    "25 repeats without touching anything",
    "own_run",
  ],
  ["level_dba", "Remounting the fan", 0.28, "dB", "A", "normal", 9, "ten remounts of the baseline", "own_mount"],
  [
    "level_dba",
    "Calibrator and meter",
    0.45,
    "dB",
    "B",
    "normal",
    50,
    "calibrator's and meter's certificates",
    "shared_offset",
  ],
  ["delta_t_k", "Sensor noise and step", 0.06, "K", "B", "rectangular", null, "step 0.1 K and its noise", "own_run"],
  ["delta_t_k", "Remounting and paste", 0.22, "K", "A", "normal", 9, "ten remounts of the baseline", "own_mount"],
  [
    "delta_t_k",
    "Sensor pair offset",
    0.15,
    "K",
    "B",
    "rectangular",
    null,
    "ice-point check of both sensors",
    "shared_offset",
  ],
  [
    "delta_t_k",
    "Heat load and sensor gain",
    0.004,
    "relative",
    "B",
    "normal",
    50,
    "power meter's certificate",
    "shared_gain",
  ],
] as const;

export async function seedBench(db: Knex): Promise<DemoBench> {
  const benchId = await one(db, "bench", {
    slug: "alder",
    name: "Alder Bench",
    description: "An invented community workshop's bench. Every figure here comes from a toy model with noise.",
  });
  const versions: DemoBench["versions"] = [];
  for (const number of [1, 2]) {
    const id = await one(db, "bench_version", {
      bench_id: benchId,
      number,
      cooler: number === 1 ? "single tower, 5 heat pipes, 46 fins" : "single tower, 6 heat pipes, 52 fins",
      heat_source: "resistive heater block, 150 W, independent thermal cut-out at 110 °C",
      temperature_sensors: "two matched thermistors: heater block and inlet plane",
      microphone: number === 1 ? "class 2 meter, on axis" : "class 1 measuring microphone, on axis and at 45°",
      calibrator: "94 dB at 1 kHz, class 1",
      valid_from: number === 1 ? "2024-12-10T09:00:00Z" : "2025-12-10T09:00:00Z",
      change_reason: number === 1 ? "First bench." : "New cooler and a class 1 microphone with a second position.",
    });
    const names = number === 1 ? ["on axis"] : ["on axis", "at 45°"];
    const positions: { id: string; name: string }[] = await db("microphone_position")
      .insert(
        names.map((name, i) => ({
          bench_version_id: id,
          name,
          distance_mm: 100,
          angle_deg: name === "on axis" ? 0 : 45,
          ordinal: i + 1,
        })),
      )
      .returning(["id", "name"]);
    const budgetId = await one(db, "budget_version", { bench_version_id: id, number: 1, note: "Bench qualification." });
    await db("budget_part").insert(
      budgetParts.map(([quantity, name, u, unit, evaluation, distribution, dof, source, kind]) => ({
        budget_version_id: budgetId,
        quantity,
        name,
        u: number === 2 && kind === "shared_offset" && unit === "dB" ? 0.3 : u,
        unit,
        evaluation,
        distribution,
        dof,
        source,
        kind,
      })),
    );
    await db("keep_out").insert([
      {
        bench_version_id: id,
        name: "Memory, slot 1",
        shape: "box",
        min_mm: [62, -70, -45],
        max_mm: [70, 70, 8],
        note: "",
      },
      {
        bench_version_id: id,
        name: "I/O cover",
        shape: "box",
        min_mm: [-95, -80, -60],
        max_mm: [-68, 80, -8],
        note: "",
      },
    ]);
    versions.push({ id, budgetId, positions });
  }
  const frameRows = await db("frame").select<{ id: string; key: string }[]>("id", "key");
  const protocolId = await one(db, "protocol", { slug: "alder-150-w", name: "Alder 150 W, four speeds" });
  const protocolVersionIds: string[] = [];
  for (const number of [1, 2])
    protocolVersionIds.push(
      await one(db, "protocol_version", {
        protocol_id: protocolId,
        number,
        heat_load_w: 150,
        set_speeds: [750, 1100, 1450, 1800],
        positions: ["on axis"],
        mounts: 3,
        runs_per_mount: 1,
        background_grade: number === 1 ? "survey" : "engineering",
      }),
    );
  const ruleRows = await db("scoring_rule_version").select<{ id: string; kind: string }[]>("id", "kind");
  const equalNoiseRuleId = ruleRows.find((row) => row.kind === "equal-noise")?.id;
  if (!equalNoiseRuleId) throw new Error("the default scoring rule is missing");
  const baselineId = await one(db, "baseline", {
    slug: "alder-reference-seven",
    name: "Alder reference seven",
    description: "Seven plain blades, 25 mm deep, printed in PETG; invented.",
    blades: 7,
  });
  const baselineUnitIds = [
    await one(db, "baseline_unit", {
      baseline_id: baselineId,
      serial: "ARS-01",
      in_service_from: "2024-12-12T09:00:00Z",
      retired_at: "2026-07-01T09:00:00Z",
      retired_reason: "Bearing noise after 1 900 hours.",
    }),
    await one(db, "baseline_unit", {
      baseline_id: baselineId,
      serial: "ARS-02",
      in_service_from: "2026-05-11T09:00:00Z",
    }),
  ];
  return {
    benchId,
    versions,
    frames: new Map(frameRows.map((row) => [row.key, row.id])),
    protocolVersionIds,
    equalNoiseRuleId,
    baselineUnitIds,
  };
}
