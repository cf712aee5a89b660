import type { EntryState } from "@/lib/domain/designs/entry-moves";
import type { RoundState } from "@/lib/domain/seasons/round-moves";
import type { Handle } from "../client/connect";

export interface QueueRow {
  entryId: string;
  revisionId: string;
  state: EntryState;
  stateAt: Date;
  everPublished: boolean;
  designName: string;
  letter: string;
  rotors: number;
  seasonId: string;
  seasonTitle: string;
  roundId: string | null;
  roundNumber: number | null;
  roundState: RoundState | null;
  sentBack: string | null;
  sessionId: string | null;
}

const select = `
  select e.id as "entryId", e.revision_id as "revisionId", e.state, e.state_at as "stateAt",
    e.ever_published as "everPublished", d.name as "designName", r.letter,
    greatest((select count(*)::int from rotor o where o.revision_id = r.id), coalesce(t.stages, 1)) as rotors,
    s.id as "seasonId", s.title as "seasonTitle", n.id as "roundId", n.number as "roundNumber", n.state as "roundState",
    case when e.state = 'on_the_bench' and m.from_state = 'in_review' then m.reason end as "sentBack",
    (select u.session_id from run u join session w on w.id = u.session_id
      where u.entry_id = e.id and w.round_id = n.id and u.state <> 'discarded'
      order by w.began_at desc, w.id desc limit 1) as "sessionId"
  from entry e join revision r on r.id = e.revision_id join design d on d.id = r.design_id join season s on s.id = e.season_id
    left join revision_trait t on t.revision_id = r.id
    left join lateral (
      select n.id, n.number, n.state from round_entry x join round n on n.id = x.round_id
      where x.entry_id = e.id and x.taken_out_at is null and n.state <> 'published'
      order by x.added_at desc limit 1) n on true
    left join lateral (
      select m.from_state, m.reason from entry_move m where m.entry_id = e.id order by m.at desc, m.id desc limit 1) m on true`;

/** Entries on their way over the bench, by round, name and letter. */
export async function queueRows(db: Handle, { states }: { states: readonly EntryState[] }): Promise<QueueRow[]> {
  const { rows }: { rows: QueueRow[] } = await db.raw(
    `${select} where e.state = any (:states) order by s.number, n.number nulls last, d.name, r.letter limit 1000`,
    { states: [...states] },
  );
  return rows;
}

/** One entry; with `lock` its row is held until the transaction ends. */
export async function queueRow(
  db: Handle,
  { entryId, lock = false }: { entryId: string; lock?: boolean },
): Promise<QueueRow | undefined> {
  if (lock) await db("entry").where({ id: entryId }).forUpdate().select("id");
  const { rows }: { rows: QueueRow[] } = await db.raw(`${select} where e.id = :entryId`, { entryId });
  return rows[0];
}

export interface SetupRow {
  roundId: string;
  roundNumber: number;
  roundState: RoundState;
  seasonTitle: string;
  benches: { benchVersionId: string; name: string; number: number }[];
  baselines: { baselineUnitId: string; name: string; serial: string }[];
  entries: { state: string; takenOut: boolean }[];
}

/** Rounds that are planned or being measured, with the benches and baselines of their seasons, the newest bench first. */
export async function roundSetups(db: Handle): Promise<SetupRow[]> {
  const { rows }: { rows: SetupRow[] } = await db.raw(
    `select n.id as "roundId", n.number as "roundNumber", n.state as "roundState", s.title as "seasonTitle",
       coalesce((select json_agg(json_build_object('benchVersionId', v.id, 'name', b.name, 'number', v.number) order by v.valid_from desc)
         from season_bench sb join bench_version v on v.id = sb.bench_version_id join bench b on b.id = v.bench_id
         where sb.season_id = s.id), '[]') as benches,
       coalesce((select json_agg(json_build_object('baselineUnitId', u.id, 'name', l.name, 'serial', u.serial) order by sl.from_at desc, u.serial)
         from season_baseline sl join baseline_unit u on u.id = sl.baseline_unit_id join baseline l on l.id = u.baseline_id
         where sl.season_id = s.id and u.retired_at is null), '[]') as baselines,
       coalesce((select json_agg(json_build_object('state', e.state, 'takenOut', x.taken_out_at is not null))
         from round_entry x join entry e on e.id = x.entry_id where x.round_id = n.id), '[]') as entries
     from round n join season s on s.id = n.season_id
     where n.state in ('planned', 'measuring') order by s.number, n.number`,
  );
  return rows;
}

export async function baselineUnitOf(
  db: Handle,
  { baselineUnitId }: { baselineUnitId: string },
): Promise<{ name: string; serial: string }> {
  const row = await db("baseline_unit as u")
    .join("baseline as b", "b.id", "u.baseline_id")
    .where("u.id", baselineUnitId)
    .first<{ name: string; serial: string } | undefined>({ name: "b.name", serial: "u.serial" });
  if (!row) throw new Error(`no baseline unit ${baselineUnitId}`);
  return row;
}

/** Which round a session is of, in words. */
export async function roundSetupHead(
  db: Handle,
  { roundId }: { roundId: string },
): Promise<{ id: string; number: number; seasonTitle: string; state: string } | null> {
  const row = await db("round as n")
    .join("season as s", "s.id", "n.season_id")
    .where("n.id", roundId)
    .first<{ id: string; number: number; seasonTitle: string; state: string } | undefined>({
      id: "n.id",
      number: "n.number",
      seasonTitle: "s.title",
      state: "n.state",
    });
  return row ?? null;
}
