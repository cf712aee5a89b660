import type { ControlPoint, ControlQuantity } from "@/lib/domain/baselines/control-point";
import type { Handle } from "../client/connect";
import type { BreakKind } from "./control";

export interface ChartCheckRow {
  unitId: string;
  bench: string;
  microphoneDistanceMm: number;
  session: number;
  purpose: "round" | "qualification" | "bridge";
  quantity: ControlQuantity;
  setSpeed: number | null;
  at: Date;
  value: number;
  chart: Partial<ControlPoint>;
  /** The charts held the session: why, and why it went on; null where they didn't, or nobody lifted it yet. */
  holdReason: string | null;
  liftNote: string | null;
  published: boolean;
}

export interface ChartPhaseRow {
  unitId: string;
  bench: string;
  quantity: ControlQuantity;
  setSpeed: number | null;
  from: Date;
  reason: string;
  kind: BreakKind | null;
  trial: boolean;
  centre: number | null;
  sigma: number | null;
}

/** Where the rows are read: the public sees those of published sessions through its views, the host all. */
const relations = (all: boolean) =>
  all
    ? {
        check: "baseline_check",
        session: "session",
        hold: "session_hold",
        phase: "(select k.*, b.kind from control_phase k left join control_break b on b.id = k.break_id)",
        bench:
          "(select v.id, v.number, v.microphone_distance_mm, b.name as bench_name from bench_version v join bench b on b.id = v.bench_id)",
        published: "exists (select 1 from shown.baseline_session p where p.id = c.session_id)",
      }
    : {
        check: "shown.baseline_check",
        session: "shown.baseline_session",
        hold: "shown.baseline_hold",
        phase: "shown.control_phase",
        bench: "shown.bench_version",
        published: "true",
      };

type Asked = { unitIds: readonly string[]; all: boolean };

/** Check values of units in order of time, as they were judged. `all` needs a handle that may read every session. */
export async function chartChecks(db: Handle, { unitIds, all }: Asked): Promise<ChartCheckRow[]> {
  const from = relations(all);
  const { rows }: { rows: ChartCheckRow[] } = await db.raw(
    `select c.baseline_unit_id as "unitId", b.bench_name || ', version ' || b.number as bench,
       b.microphone_distance_mm as "microphoneDistanceMm", s.number as session, s.purpose, c.quantity, c.set_speed as "setSpeed",
       c.at, c.value, c.chart, h.reason as "holdReason", h.lift_note as "liftNote", ${from.published} as published
     from ${from.check} c join ${from.bench} b on b.id = c.bench_version_id join ${from.session} s on s.id = c.session_id
       left join lateral (
         select h.reason, h.lift_note from ${from.hold} h
         where h.session_id = c.session_id ${all ? "and h.control" : ""}
           and (h.code = 'calibrator') = (c.quantity = 'calibrator_db')
         order by h.raised_at desc limit 1) h on c.rule_broken is not null or h.reason is not null
     where c.baseline_unit_id = any (:unitIds::uuid[]) order by c.at, c.id`,
    { unitIds: [...unitIds] },
  );
  return rows;
}

/** Phases of the charts, and when their limits froze, in order of time. */
export async function chartPhases(db: Handle, { unitIds, all }: Asked): Promise<ChartPhaseRow[]> {
  const from = relations(all);
  const { rows }: { rows: ChartPhaseRow[] } = await db.raw(
    `select k.baseline_unit_id as "unitId", b.bench_name || ', version ' || b.number as bench, k.quantity, k.set_speed as "setSpeed",
       k.from_at as "from", k.reason, k.kind, k.trial, k.centre, k.sigma
     from ${from.phase} k join ${from.bench} b on b.id = k.bench_version_id
     where k.baseline_unit_id = any (:unitIds::uuid[]) order by k.from_at, k.trial desc`,
    { unitIds: [...unitIds] },
  );
  return rows;
}
