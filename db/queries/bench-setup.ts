import type { BenchSetup } from "@/lib/contracts/bench-admin";
import type { Protocol } from "@/lib/domain/bench/protocol";
import type { Handle } from "../client/connect";

/** ISO 8601 in UTC, as answers give times. */
const iso = (column: string) => `to_char(${column} at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.MS"Z"')`;

/** Benches with versions, positions and budgets; protocols; baselines with units; rules; frames. */
export async function benchSetupRows(db: Handle): Promise<BenchSetup> {
  const { rows }: { rows: BenchSetup[] } = await db.raw(`
    select
      coalesce((select jsonb_agg(jsonb_build_object('id', b.id, 'slug', b.slug, 'name', b.name, 'description', b.description,
        'versions', coalesce((select jsonb_agg(jsonb_build_object('id', v.id, 'number', v.number, 'cooler', v.cooler,
          'heatSource', v.heat_source, 'temperatureSensors', v.temperature_sensors, 'microphone', v.microphone,
          'calibrator', v.calibrator, 'microphoneDistanceMm', v.microphone_distance_mm, 'validFrom', ${iso("v.valid_from")},
          'changeReason', v.change_reason,
          'positions', coalesce((select jsonb_agg(jsonb_build_object('id', m.id, 'name', m.name, 'distanceMm', m.distance_mm,
            'angleDeg', m.angle_deg) order by m.ordinal) from microphone_position m where m.bench_version_id = v.id), '[]'),
          'budgets', coalesce((select jsonb_agg(jsonb_build_object('id', u.id, 'number', u.number, 'note', u.note,
            'frozenAt', ${iso("u.frozen_at")}, 'parts', coalesce((select jsonb_agg(jsonb_build_object('id', t.id,
              'quantity', t.quantity, 'name', t.name, 'u', t.u, 'unit', t.unit, 'evaluation', t.evaluation,
              'distribution', t.distribution, 'dof', t.dof, 'source', t.source, 'kind', t.kind) order by t.quantity, t.name)
              from budget_part t where t.budget_version_id = u.id), '[]')) order by u.number)
            from budget_version u where u.bench_version_id = v.id), '[]')) order by v.number)
          from bench_version v where v.bench_id = b.id), '[]')) order by b.name) from bench b), '[]') as benches,
      coalesce((select jsonb_agg(jsonb_build_object('id', p.id, 'slug', p.slug, 'name', p.name,
        'versions', coalesce((select jsonb_agg(jsonb_build_object('id', v.id, 'number', v.number, 'heatLoadW', v.heat_load_w,
          'setting', v.setting, 'setSpeeds', v.set_speeds, 'positions', v.positions, 'mounts', v.mounts,
          'runsPerMount', v.runs_per_mount, 'backgroundGrade', v.background_grade, 'minutesPerRun', v.minutes_per_run,
          'minutesPerMount', v.minutes_per_mount, 'frozenAt', ${iso("v.frozen_at")}) order by v.number)
          from protocol_version v where v.protocol_id = p.id), '[]')) order by p.name) from protocol p), '[]') as protocols,
      coalesce((select jsonb_agg(jsonb_build_object('id', b.id, 'slug', b.slug, 'name', b.name,
        'units', coalesce((select jsonb_agg(jsonb_build_object('id', u.id, 'serial', u.serial,
          'inServiceFrom', ${iso("u.in_service_from")}, 'retiredAt', ${iso("u.retired_at")}) order by u.serial)
          from baseline_unit u where u.baseline_id = b.id), '[]')) order by b.name) from baseline b), '[]') as baselines,
      coalesce((select jsonb_agg(jsonb_build_object('id', v.id, 'name', r.name, 'number', v.number, 'kind', v.kind)
        order by v.kind <> 'equal-noise', r.name, v.number) from scoring_rule_version v join scoring_rule r on r.id = v.rule_id), '[]') as rules,
      coalesce((select jsonb_agg(jsonb_build_object('id', f.id, 'key', f.key) order by f.outer_mm, f.depth_mm) from frame f), '[]') as frames`);
  const [setup] = rows;
  return setup ?? { benches: [], protocols: [], baselines: [], rules: [], frames: [] };
}

/** A protocol version as far as planning goes; undefined when there is none. */
export async function planningProtocol(
  db: Handle,
  { protocolVersionId }: { protocolVersionId: string },
): Promise<Protocol | undefined> {
  return db("protocol_version").where({ id: protocolVersionId }).first<Protocol | undefined>({
    setSpeeds: "set_speeds",
    mounts: "mounts",
    runsPerMount: "runs_per_mount",
    minutesPerRun: "minutes_per_run",
    minutesPerMount: "minutes_per_mount",
    ambientMinC: "ambient_min_c",
    ambientMaxC: "ambient_max_c",
    ambientDriftMaxK: "ambient_drift_max_k",
    calibratorDriftMaxDb: "calibrator_drift_max_db",
  });
}
