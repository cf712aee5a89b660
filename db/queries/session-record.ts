import type { BudgetPartRecord, ReadingRecord, RunRecord, SessionRecord } from "@/lib/domain/results/session-record";
import { groupBy } from "@/lib/domain/group-by";
import type { Handle } from "../client/connect";

interface SessionRow {
  id: string;
  round_id: string | null;
  season_id: string | null;
  bench_version_id: string;
  protocol_version_id: string;
  budget_version_id: string;
  baseline_unit_id: string;
  background_grade: "engineering" | "survey";
  positions: string[];
}

interface ReadingRow {
  id: string;
  session_id: string;
  run_id: string | null;
  quantity: string;
  position_id: string | null;
  rotor_position: number | null;
  value: number;
  detail: Record<string, unknown>;
}

interface RunRow {
  id: string;
  session_id: string;
  entry_id: string | null;
  specimen_id: string | null;
  baseline_unit_id: string | null;
  set_speed: number;
  mount_number: number;
  repeat_number: number;
  state: RunRecord["state"];
}

/**
 * Which readings stand: those that no other supersedes. A reading that a correction brought stands, and takes the
 * older one's place, once that correction is published, or in the dry run that names it.
 */
const standing = `
  (r.correction_id is null or r.correction_id = any (:dry) or exists (
    select 1 from correction c where c.id = r.correction_id and c.published_at is not null))
  and not exists (
    select 1 from reading n where n.supersedes = r.id
      and (n.correction_id is null or n.correction_id = any (:dry) or exists (
        select 1 from correction c where c.id = n.correction_id and c.published_at is not null)))`;

/**
 * Everything that the figures of some sessions come from, as it stands now.
 *
 * @param sessionIds any number; the answer keeps their order and leaves out those that do not exist
 * @param dryCorrections corrections to be taken as published, for a dry run
 */
export async function sessionRecords(
  db: Handle,
  { sessionIds, dryCorrections = [] }: { sessionIds: readonly string[]; dryCorrections?: readonly string[] },
): Promise<SessionRecord[]> {
  if (sessionIds.length === 0) return [];
  const ids = [...sessionIds];
  const sessions = await db("session as s")
    .leftJoin("round as n", "n.id", "s.round_id")
    .join("protocol_version as p", "p.id", "s.protocol_version_id")
    .whereIn("s.id", ids)
    .select<SessionRow[]>(
      "s.id",
      "s.round_id",
      "n.season_id",
      "s.bench_version_id",
      "s.protocol_version_id",
      "s.budget_version_id",
      "s.baseline_unit_id",
      "p.background_grade",
      "p.positions",
    );
  const runs = await db("run").whereIn("session_id", ids).orderBy(["session_id", "ordinal"]).select<RunRow[]>("*");
  const { rows: readings }: { rows: ReadingRow[] } = await db.raw(
    `select r.id, r.session_id, r.run_id, r.quantity, r.position_id, r.rotor_position, r.value, r.detail
     from reading r where r.session_id = any (:ids) and ${standing} order by r.id`,
    { ids, dry: [...dryCorrections] },
  );
  const positions = await db("microphone_position")
    .whereIn("bench_version_id", [...new Set(sessions.map((row) => row.bench_version_id))])
    .orderBy("ordinal")
    .select<{ id: string; name: string; bench_version_id: string }[]>("id", "name", "bench_version_id");
  const budget = await db("budget_part")
    .whereIn("budget_version_id", [...new Set(sessions.map((row) => row.budget_version_id))])
    .orderBy("id")
    .select<(BudgetPartRecord & { budget_version_id: string })[]>(
      "budget_version_id",
      "name",
      "quantity",
      "u",
      "kind",
      "evaluation",
      "dof",
      "source",
    );
  const byRun = groupBy(readings, (row) => row.run_id);
  const runsBySession = groupBy(runs, (row) => row.session_id);
  const bySession = new Map(sessions.map((row) => [row.id, row]));
  return ids.flatMap((id): SessionRecord[] => {
    const row = bySession.get(id);
    if (!row) return [];
    return [
      {
        sessionId: id,
        roundId: row.round_id,
        seasonId: row.season_id,
        benchVersionId: row.bench_version_id,
        protocolVersionId: row.protocol_version_id,
        budgetVersionId: row.budget_version_id,
        baselineUnitId: row.baseline_unit_id,
        grade: row.background_grade,
        protocolPositions: row.positions,
        positions: positions.filter((each) => each.bench_version_id === row.bench_version_id),
        budget: budget.filter((each) => each.budget_version_id === row.budget_version_id),
        backgrounds: (byRun.get(null) ?? [])
          .filter((each) => each.session_id === id && each.quantity === "background_dba")
          .map((each) => ({ positionId: each.position_id ?? "", valueDba: each.value, readingId: each.id })),
        runs: (runsBySession.get(id) ?? []).map((run) => toRun(run, byRun.get(run.id) ?? [])),
      },
    ];
  });
}

function toRun(run: RunRow, readings: readonly ReadingRow[]): RunRecord {
  return {
    runId: run.id,
    entryId: run.entry_id,
    specimenId: run.specimen_id,
    baselineUnitId: run.baseline_unit_id,
    setSpeed: run.set_speed,
    mountNumber: run.mount_number,
    repeatNumber: run.repeat_number,
    state: run.state,
    readings: readings.map((row): ReadingRecord => ({
      id: row.id,
      quantity: row.quantity,
      positionId: row.position_id,
      rotorPosition: row.rotor_position,
      value: row.value,
      detail: row.detail,
    })),
  };
}
