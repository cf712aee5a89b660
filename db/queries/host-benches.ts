import type { z } from "zod";
import type {
  newBaseline,
  newBench,
  newBenchVersion,
  newBudgetPart,
  newPosition,
  newProtocolVersion,
} from "@/lib/contracts/bench-admin";
import type { Handle } from "../client/connect";
import { carryKeepOuts } from "./keep-outs";

async function insertOne(db: Handle, table: string, row: Record<string, unknown>): Promise<string> {
  const [made]: { id: string }[] = await db(table).insert(row).returning("id");
  if (!made) throw new Error(`no row of ${table} came back`);
  return made.id;
}

/** The next number within a parent; the parent's row is held, so that two at once don't get the same. */
async function nextNumber(
  db: Handle,
  { parent, id, table, column }: { parent: string; id: string; table: string; column: string },
): Promise<number | undefined> {
  const held = await db(parent).where({ id }).forUpdate().first<{ id: string } | undefined>("id");
  if (!held) return undefined;
  const last = await db(table)
    .where({ [column]: id })
    .max<{ max: number | null }>("number as max")
    .first();
  return (last?.max ?? 0) + 1;
}

export const insertBench = (db: Handle, bench: z.output<typeof newBench>): Promise<string> =>
  insertOne(db, "bench", bench);

/**
 * A bench's next version, with the keep-out solids of the one before it.
 * @returns undefined when there is no such bench; so do the other additions to something
 */
export async function insertBenchVersion(
  db: Handle,
  { benchId, version, at }: { benchId: string; version: z.output<typeof newBenchVersion>; at: Date },
): Promise<string | undefined> {
  const number = await nextNumber(db, { parent: "bench", id: benchId, table: "bench_version", column: "bench_id" });
  if (number === undefined) return undefined;
  const id = await insertOne(db, "bench_version", {
    bench_id: benchId,
    number,
    cooler: version.cooler,
    heat_source: version.heatSource,
    temperature_sensors: version.temperatureSensors,
    temperature_min_c: version.temperatureMinC,
    temperature_max_c: version.temperatureMaxC,
    microphone: version.microphone,
    calibrator: version.calibrator,
    calibrator_level_db: version.calibratorLevelDb,
    microphone_distance_mm: version.microphoneDistanceMm,
    valid_from: at,
    change_reason: version.changeReason,
  });
  await carryKeepOuts(db, { benchId, toVersionId: id });
  return id;
}

export async function insertPosition(
  db: Handle,
  { benchVersionId, position }: { benchVersionId: string; position: z.output<typeof newPosition> },
): Promise<string | undefined> {
  const held = await db("bench_version").where({ id: benchVersionId }).forUpdate().first<{ id: string }>("id");
  if (!held) return undefined;
  const last = await db("microphone_position")
    .where({ bench_version_id: benchVersionId })
    .max<{ max: number | null }>("ordinal as max")
    .first();
  return insertOne(db, "microphone_position", {
    bench_version_id: benchVersionId,
    name: position.name,
    distance_mm: position.distanceMm,
    angle_deg: position.angleDeg,
    ordinal: (last?.max ?? 0) + 1,
  });
}

export async function insertBudget(
  db: Handle,
  { benchVersionId, note, byPerson }: { benchVersionId: string; note: string; byPerson: string },
): Promise<string | undefined> {
  const of = { parent: "bench_version", id: benchVersionId, table: "budget_version", column: "bench_version_id" };
  const number = await nextNumber(db, of);
  if (number === undefined) return undefined;
  return insertOne(db, "budget_version", { bench_version_id: benchVersionId, number, note, created_by: byPerson });
}

export async function insertBudgetPart(
  db: Handle,
  { budgetId, part }: { budgetId: string; part: z.output<typeof newBudgetPart> },
): Promise<string | undefined> {
  const budget = await db("budget_version").where({ id: budgetId }).first<{ id: string } | undefined>("id");
  if (!budget) return undefined;
  return insertOne(db, "budget_part", { ...part, dof: part.dof ?? null, budget_version_id: budgetId });
}

export const insertProtocol = (db: Handle, protocol: { slug: string; name: string }): Promise<string> =>
  insertOne(db, "protocol", protocol);

export async function insertProtocolVersion(
  db: Handle,
  { protocolId, version }: { protocolId: string; version: z.output<typeof newProtocolVersion> },
): Promise<string | undefined> {
  const of = { parent: "protocol", id: protocolId, table: "protocol_version", column: "protocol_id" };
  const number = await nextNumber(db, of);
  if (number === undefined) return undefined;
  return insertOne(db, "protocol_version", {
    protocol_id: protocolId,
    number,
    heat_load_w: version.heatLoadW,
    setting: version.setting,
    set_speeds: version.setSpeeds,
    positions: version.positions,
    mounts: version.mounts,
    runs_per_mount: version.runsPerMount,
    background_grade: version.backgroundGrade,
    epsilon_k: version.epsilonK,
    ambient_min_c: version.ambientMinC,
    ambient_max_c: version.ambientMaxC,
    minutes_per_run: version.minutesPerRun,
    minutes_per_mount: version.minutesPerMount,
  });
}

export const insertBaseline = (db: Handle, baseline: z.output<typeof newBaseline>): Promise<string> =>
  insertOne(db, "baseline", { ...baseline, blades: baseline.blades ?? null });

export async function insertBaselineUnit(
  db: Handle,
  { baselineId, serial, inServiceFrom }: { baselineId: string; serial: string; inServiceFrom: string },
): Promise<string | undefined> {
  const baseline = await db("baseline").where({ id: baselineId }).first<{ id: string } | undefined>("id");
  if (!baseline) return undefined;
  return insertOne(db, "baseline_unit", { baseline_id: baselineId, serial, in_service_from: inServiceFrom });
}

/** What a season's parts lack to be measured by, in words by field; empty when they fit. */
export async function seasonMisfits(
  db: Handle,
  params: { benchVersionId: string; budgetVersionId: string; protocolVersionId: string; baselineUnitId: string },
): Promise<{ path: string; message: string }[]> {
  const { rows }: { rows: { budget: boolean; parts: number; positions: boolean; unit: boolean }[] } = await db.raw(
    `select exists (select 1 from budget_version where id = :budgetVersionId and bench_version_id = :benchVersionId) as budget,
       (select count(distinct quantity)::int from budget_part where budget_version_id = :budgetVersionId) as parts,
       exists (select 1 from protocol_version v where v.id = :protocolVersionId and not exists (
         select 1 from unnest(v.positions) p(name) where not exists (
           select 1 from microphone_position m where m.bench_version_id = :benchVersionId and m.name = p.name))) as positions,
       exists (select 1 from baseline_unit where id = :baselineUnitId and retired_at is null) as unit`,
    params,
  );
  const [found] = rows;
  return [
    ...(found?.budget ? [] : [{ path: "budgetVersionId", message: "is of another bench version" }]),
    ...(found?.parts === 2 ? [] : [{ path: "budgetVersionId", message: "has no parts for level or for ΔT" }]),
    ...(found?.positions
      ? []
      : [{ path: "protocolVersionId", message: "uses a microphone position that the bench version lacks" }]),
    ...(found?.unit ? [] : [{ path: "baselineUnitId", message: "is no unit in service" }]),
  ];
}
