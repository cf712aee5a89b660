import type { Handle } from "../../client/connect";

export interface ShownBaselineRow {
  id: string;
  slug: string;
  name: string;
  description: string;
  blades: number | null;
}

export interface ShownUnitRow {
  id: string;
  baselineId: string;
  serial: string;
  inServiceFrom: Date;
  retiredAt: Date | null;
  retiredReason: string | null;
}

/** Baselines that open seasons count, by name, or the one with this address. */
export async function shownBaselines(db: Handle, { slug }: { slug?: string } = {}): Promise<ShownBaselineRow[]> {
  return db("shown.baseline")
    .modify((query) => void (slug !== undefined && query.where({ slug })))
    .orderBy("name")
    .select("id", "slug", "name", "description", "blades");
}

/** Units of baselines, the one that went into service first before the others. */
export async function shownUnits(
  db: Handle,
  { baselineIds }: { baselineIds: readonly string[] },
): Promise<ShownUnitRow[]> {
  return db("shown.baseline_unit")
    .whereIn("baseline_id", [...baselineIds])
    .orderBy(["in_service_from", "serial"])
    .select({
      id: "id",
      baselineId: "baseline_id",
      serial: "serial",
      inServiceFrom: "in_service_from",
      retiredAt: "retired_at",
      retiredReason: "retired_reason",
    });
}

export interface BaselineSessionRow {
  unitId: string;
  session: number;
  beganAt: Date;
  season: string;
  seasonTitle: string;
  round: number;
  bench: string;
  microphoneDistanceMm: number;
  points: unknown;
}

/** Most sessions that a page lists. */
const sessionsMost = 200;

/**
 * What published sessions read of these units, the newest first: the baseline's points as the snapshot of any entry of
 * the session froze them.
 */
export async function shownBaselineSessions(
  db: Handle,
  { unitIds }: { unitIds: readonly string[] },
): Promise<BaselineSessionRow[]> {
  const { rows }: { rows: BaselineSessionRow[] } = await db.raw(
    `with s as materialized (
       select * from shown.session where baseline_unit_id = any (:unitIds::uuid[]) and round_id is not null
       order by began_at desc, id limit :sessionsMost)
     select s.baseline_unit_id as "unitId", s.number as session, s.began_at as "beganAt", t.slug as season,
       t.title as "seasonTitle", n.number as round, b.bench_name || ', version ' || b.number as bench,
       b.microphone_distance_mm as "microphoneDistanceMm", f.points
     from s join shown.bench_version b on b.id = s.bench_version_id
       join shown.round n on n.id = s.round_id join shown.season t on t.id = n.season_id
     cross join lateral (
       select p.snapshot -> 'baselinePoints' as points
       from shown.publication_session o join shown.publication p on p.id = o.publication_id
       where o.session_id = s.id and p.snapshot ->> 'sessionId' = s.id::text limit 1) f
     order by s.began_at desc, s.id`,
    { unitIds: [...unitIds], sessionsMost },
  );
  return rows;
}

export interface AgreedRow {
  unitId: string;
  bench: string;
  microphoneDistanceMm: number;
  quantity: "level_dba" | "thermal_resistance_kpw";
  setSpeed: number;
  value: number;
  u: number;
  from: Date;
  reason: string;
  /** Numbers of the sessions that it comes from, as far as they are public. */
  sessions: number[];
}

const benchWords = "b.bench_name || ', version ' || b.number";

/** The agreed values of units on each bench version that hold now: the newest of each quantity and set speed. */
export async function shownAgreedValues(db: Handle, { unitIds }: { unitIds: readonly string[] }): Promise<AgreedRow[]> {
  const { rows }: { rows: AgreedRow[] } = await db.raw(
    `select distinct on (v.baseline_unit_id, b.bench_id, b.number, v.quantity, v.set_speed) v.baseline_unit_id as "unitId",
       ${benchWords} as bench, b.microphone_distance_mm as "microphoneDistanceMm", v.quantity,
       v.set_speed as "setSpeed", v.value, v.u, v.from_at as "from", v.reason,
       coalesce((select jsonb_agg(s.number order by s.number) from shown.baseline_session s
         where s.id = any (v.session_ids)), '[]') as sessions
     from shown.baseline_value v join shown.bench_version b on b.id = v.bench_version_id
     where v.baseline_unit_id = any (:unitIds::uuid[])
     order by v.baseline_unit_id, b.bench_id, b.number, v.quantity, v.set_speed, v.from_at desc`,
    { unitIds: [...unitIds] },
  );
  return rows;
}

export interface ShownBridgeRow {
  fromUnit: string;
  toUnit: string;
  bench: string;
  microphoneDistanceMm: number;
  quantity: "level_dba" | "thermal_resistance_kpw";
  setSpeed: number | null;
  levelDba: number | null;
  ratio: number | null;
  difference: number | null;
  u: number;
  dof: number | null;
  sessions: number;
}

/** Bridges between units of which one is given, the newest first. */
export async function shownBridges(db: Handle, { unitIds }: { unitIds: readonly string[] }): Promise<ShownBridgeRow[]> {
  return db("shown.bridge as g")
    .join("shown.bench_version as b", "b.id", "g.bench_version_id")
    .where((either) => void either.whereIn("g.unit_from", [...unitIds]).orWhereIn("g.unit_to", [...unitIds]))
    .orderBy([{ column: "g.created_at", order: "desc" }, "g.quantity", "g.level_dba", "g.set_speed"])
    .select({
      fromUnit: "g.unit_from",
      toUnit: "g.unit_to",
      bench: db.raw(benchWords),
      microphoneDistanceMm: "b.microphone_distance_mm",
      quantity: "g.quantity",
      setSpeed: "g.set_speed",
      levelDba: "g.level_dba",
      ratio: "g.ratio",
      difference: "g.difference",
      u: "g.u",
      dof: "g.dof",
      sessions: db.raw("cardinality(g.session_ids)"),
    });
}
