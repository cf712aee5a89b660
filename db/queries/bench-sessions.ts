import type { Handle } from "../client/connect";
import { protocolColumns, type ProtocolColumns } from "./protocol-columns";

export interface SessionHead {
  id: string;
  number: number;
  benchId: string;
  benchVersionId: string;
  protocolVersionId: string;
  budgetVersionId: string;
  baselineUnitId: string;
  roundId: string | null;
  purpose: "round" | "qualification" | "bridge";
  /** The other unit of a bridging session. */
  bridgeUnitId: string | null;
  operatorId: string;
  checklist: Record<string, boolean>;
  note: string;
  version: number;
  beganAt: Date;
  endedAt: Date | null;
}

const head = {
  id: "id",
  number: "number",
  benchId: "bench_id",
  benchVersionId: "bench_version_id",
  protocolVersionId: "protocol_version_id",
  budgetVersionId: "budget_version_id",
  baselineUnitId: "baseline_unit_id",
  roundId: "round_id",
  purpose: "purpose",
  bridgeUnitId: "bridge_unit_id",
  operatorId: "operator_id",
  checklist: "checklist",
  note: "note",
  version: "version",
  beganAt: "began_at",
  endedAt: "ended_at",
} as const;

export async function sessionHead(
  db: Handle,
  { sessionId, lock = false }: { sessionId: string; lock?: boolean },
): Promise<SessionHead | undefined> {
  return db("session")
    .where({ id: sessionId })
    .modify((query) => void (lock && query.forUpdate()))
    .first<SessionHead | undefined>(head);
}

/** Sessions, the newest first; `open` alone those at the bench now. */
export async function listSessions(
  db: Handle,
  { roundId, open, limit = 50 }: { roundId?: string; open?: boolean; limit?: number },
): Promise<SessionHead[]> {
  return db("session")
    .modify((query) => {
      if (roundId) void query.where({ round_id: roundId });
      if (open) void query.whereNull("ended_at");
    })
    .orderBy([{ column: "began_at", order: "desc" }, { column: "id" }])
    .limit(limit)
    .select<SessionHead[]>(head);
}

export async function insertSession(
  db: Handle,
  session: Pick<
    SessionHead,
    | "benchId"
    | "benchVersionId"
    | "protocolVersionId"
    | "budgetVersionId"
    | "baselineUnitId"
    | "roundId"
    | "operatorId"
    | "checklist"
  > &
    Partial<Pick<SessionHead, "purpose" | "bridgeUnitId">> & { at: Date },
): Promise<string> {
  const [made]: { id: string }[] = await db("session")
    .insert({
      bench_id: session.benchId,
      bench_version_id: session.benchVersionId,
      protocol_version_id: session.protocolVersionId,
      budget_version_id: session.budgetVersionId,
      baseline_unit_id: session.baselineUnitId,
      round_id: session.roundId,
      purpose: session.purpose ?? "round",
      bridge_unit_id: session.bridgeUnitId ?? null,
      operator_id: session.operatorId,
      checklist: JSON.stringify(session.checklist),
      began_at: session.at,
    })
    .returning("id");
  if (!made) throw new Error("no session came back");
  return made.id;
}

/** Changes a session if it still has this version. @returns whether it had */
export async function changeSession(
  db: Handle,
  {
    sessionId,
    version,
    change,
  }: { sessionId: string; version: number; change: { checklist?: Record<string, boolean>; note?: string } },
): Promise<boolean> {
  const changed = await db("session")
    .where({ id: sessionId, version })
    .whereNull("ended_at")
    .update({
      ...(change.checklist && { checklist: JSON.stringify(change.checklist) }),
      ...(change.note !== undefined && { note: change.note }),
      version: version + 1,
    });
  return changed === 1;
}

export async function endSessionRow(db: Handle, { sessionId, at }: { sessionId: string; at: Date }): Promise<void> {
  await db("session").where({ id: sessionId }).update({ ended_at: at });
}

export interface Setup {
  benchId: string;
  protocolVersionId: string;
  budgetVersionId: string;
}

/** What a session of a round runs under on a bench version; undefined when the season does not use it. */
export async function setupOf(
  db: Handle,
  { roundId, benchVersionId, baselineUnitId }: { roundId: string; benchVersionId: string; baselineUnitId: string },
): Promise<Setup | undefined> {
  const { rows }: { rows: Setup[] } = await db.raw(
    `select v.bench_id as "benchId", s.protocol_version_id as "protocolVersionId", sb.budget_version_id as "budgetVersionId"
     from round n join season s on s.id = n.season_id
       join season_bench sb on sb.season_id = s.id and sb.bench_version_id = :benchVersionId
       join bench_version v on v.id = sb.bench_version_id
       join season_baseline u on u.season_id = s.id and u.baseline_unit_id = :baselineUnitId
     where n.id = :roundId`,
    { roundId, benchVersionId, baselineUnitId },
  );
  return rows[0];
}

export interface ProtocolRow extends ProtocolColumns {
  id: string;
}

export async function protocolOf(
  db: Handle,
  { protocolVersionId }: { protocolVersionId: string },
): Promise<ProtocolRow> {
  const row = await db("protocol_version")
    .where({ id: protocolVersionId })
    .first<ProtocolRow | undefined>({
      id: "id",
      ...protocolColumns,
    });
  if (!row) throw new Error(`no protocol version ${protocolVersionId}`);
  return row;
}

export interface BenchVersionRow {
  id: string;
  benchId: string;
  benchName: string;
  number: number;
  cooler: string;
  microphone: string;
  calibrator: string;
  calibratorLevelDb: number;
  microphoneDistanceMm: number;
  temperatureMinC: number;
  temperatureMaxC: number;
}

export async function benchVersionOf(
  db: Handle,
  { benchVersionId }: { benchVersionId: string },
): Promise<BenchVersionRow> {
  const row = await db("bench_version as v")
    .join("bench as b", "b.id", "v.bench_id")
    .where("v.id", benchVersionId)
    .first<BenchVersionRow | undefined>({
      id: "v.id",
      benchId: "v.bench_id",
      benchName: "b.name",
      number: "v.number",
      cooler: "v.cooler",
      microphone: "v.microphone",
      calibrator: "v.calibrator",
      calibratorLevelDb: "v.calibrator_level_db",
      microphoneDistanceMm: "v.microphone_distance_mm",
      temperatureMinC: "v.temperature_min_c",
      temperatureMaxC: "v.temperature_max_c",
    });
  if (!row) throw new Error(`no bench version ${benchVersionId}`);
  return row;
}

export async function positionsOf(
  db: Handle,
  { benchVersionId }: { benchVersionId: string },
): Promise<{ id: string; name: string; distanceMm: number; angleDeg: number }[]> {
  return db("microphone_position")
    .where({ bench_version_id: benchVersionId })
    .orderBy("ordinal")
    .select({ id: "id", name: "name", distanceMm: "distance_mm", angleDeg: "angle_deg" });
}
