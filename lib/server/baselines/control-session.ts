import type { Handle } from "@/db/client/connect";
import { readingsOfSession } from "@/db/queries/bench-runs";
import { protocolOf, sessionHead, type SessionHead } from "@/db/queries/bench-sessions";
import {
  checksOf,
  checksOfSession,
  controlBreaks,
  frozenLimits,
  insertPhases,
  replaceChecks,
  type CheckRow,
  type ControlBreakRow,
  type PhaseInsert,
} from "@/db/queries/control";
import { holdsOfSession, insertHolds } from "@/db/queries/holds";
import { sessionRecords } from "@/db/queries/session-record";
import { controlCheck } from "@/lib/contracts/control";
import { limitsOf, sigmaFloor } from "@/lib/domain/baselines/control-point";
import {
  checkSession,
  controlFindings,
  sameSeries,
  sessionValues,
  type Series,
  type SeriesCheck,
  type SeriesHistory,
} from "@/lib/domain/baselines/session-control";
import type { GateFinding } from "@/lib/domain/bench/session-gates";
import { protocolPositionIds, sessionFigures } from "@/lib/domain/results/session-figures";
import type { SessionRecord } from "@/lib/domain/results/session-record";
import { roundResult } from "@/lib/domain/results/rounding";

export interface SessionControl {
  checks: SeriesCheck[];
  findings: GateFinding[];
}

/** A closed session's charts as they were judged when it was charted. */
export async function storedSessionControl(db: Handle, params: { sessionId: string }): Promise<SessionControl> {
  const rows = await checksOfSession(db, params);
  const checks = rows.map(({ quantity, setSpeed, value, chart }) => ({ quantity, setSpeed, ...chart, value }));
  return { checks: controlCheck.array().parse(checks), findings: [] };
}

type Loaded = SessionControl & {
  session: SessionHead;
  phase: ControlBreakRow | undefined;
  histories: SeriesHistory[];
  heatLoadW: number;
};

const phaseAt = (breaks: readonly ControlBreakRow[], at: Date): ControlBreakRow | undefined =>
  breaks.findLast((each) => each.fromAt <= at);

/** Where a session's baseline and calibrator stand on their charts, from its readings as they are now; stored nowhere. */
export async function readSessionControl(db: Handle, record: SessionRecord): Promise<SessionControl> {
  const { checks, findings } = await load(db, record);
  return { checks, findings };
}

async function load(db: Handle, record: SessionRecord): Promise<Loaded> {
  const session = await sessionHead(db, { sessionId: record.sessionId });
  if (!session) throw new Error(`no session ${record.sessionId}`);
  const pair = { benchVersionId: session.benchVersionId, baselineUnitId: session.baselineUnitId };
  const protocol = await protocolOf(db, { protocolVersionId: session.protocolVersionId });
  const breaks = await controlBreaks(db, pair);
  const phase = phaseAt(breaks, session.beganAt);
  const earlier = (await checksOf(db, pair)).filter((check) => isBefore(check, session));
  const frozen = await frozenLimits(db, pair);
  const inForce = frozen.filter((each) => each.fromAt < session.beganAt);
  const histories = historiesOf(earlier, breaks, inForce);
  const used = protocolPositionIds(record);
  const calibratorDb = (await readingsOfSession(db, { sessionId: session.id }))
    .filter((reading) => reading.quantity === "calibrator_db" && reading.supersededBy === null)
    .filter((reading) => reading.phase === "before" && used.includes(reading.positionId ?? ""))
    .map((reading) => reading.value);
  const checks = checkSession(sessionValues(sessionFigures(record), calibratorDb), histories, {
    phase: phase?.id ?? null,
    heatLoadW: protocol.heatLoadW,
    series: 2 * protocol.setSpeeds.length + 1,
  });
  const findings = controlFindings(checks, protocol.setting === "rpm" ? "rpm" : "% drive");
  return { session, phase, histories, heatLoadW: protocol.heatLoadW, checks: checks.map(rounded), findings };
}

const isBefore = (check: CheckRow, session: SessionHead): boolean =>
  check.sessionId !== session.id &&
  (check.at < session.beganAt || (check.at.getTime() === session.beganAt.getTime() && check.sessionId < session.id));

function historiesOf(
  checks: readonly CheckRow[],
  breaks: readonly ControlBreakRow[],
  frozen: Awaited<ReturnType<typeof frozenLimits>>,
): SeriesHistory[] {
  const series: Series[] = [];
  for (const check of checks) if (!series.some((each) => sameSeries(each, check))) series.push(check);
  return series.map(({ quantity, setSpeed }) => ({
    quantity,
    setSpeed,
    points: checks
      .filter((check) => sameSeries(check, { quantity, setSpeed }))
      .map(({ value, ruleBroken, at }) => ({
        value,
        out: ruleBroken !== null,
        phase: phaseAt(breaks, at)?.id ?? null,
      })),
    frozen: frozen
      .filter((each) => sameSeries(each, { quantity, setSpeed }))
      .map(({ breakId, centre, sigma }) => ({ phase: breakId, centre, sigma })),
  }));
}

function rounded(check: SeriesCheck): SeriesCheck {
  const figures = Object.entries(check).map(([key, value]) => [
    key,
    typeof value === "number" ? roundResult(value) : value,
  ]);
  return Object.fromEntries(figures) as unknown as SeriesCheck;
}

/**
 * Puts a closed session on its charts: its values with what they break, its phase, limits that freeze with it; and holds
 * it for what is out, unless such a hold stands already.
 * @returns what was found; empty when it is in control
 */
export async function chartSession(
  tx: Handle,
  { sessionId, at, hold = true }: { sessionId: string; at: Date; hold?: boolean },
): Promise<GateFinding[]> {
  const [record] = await sessionRecords(tx, { sessionIds: [sessionId] });
  if (!record) throw new Error(`no session ${sessionId}`);
  const { session, phase, histories, heatLoadW, checks, findings } = await load(tx, record);
  const pair = { benchVersionId: session.benchVersionId, baselineUnitId: session.baselineUnitId };
  await replaceChecks(tx, { ...pair, sessionId, at: session.beganAt, checks });
  await insertPhases(
    tx,
    checks.flatMap((check) => phasesOf(check, { ...pair, session, phase, histories, heatLoadW })),
  );
  if (!hold) return findings;
  const standing = (await holdsOfSession(tx, { sessionId })).filter((each) => each.control && each.liftedAt === null);
  const fresh = findings.filter((finding) => !standing.some((each) => each.code === finding.code));
  await insertHolds(tx, { sessionId, findings: fresh, raisedBy: null, at, control: true });
  return findings;
}

/** The row of a series' phase, and that of its limits where this session is the twentieth. */
function phasesOf(
  check: SeriesCheck,
  {
    session,
    phase,
    histories,
    heatLoadW,
    ...pair
  }: Pick<Loaded, "session" | "phase" | "histories" | "heatLoadW"> & { benchVersionId: string; baselineUnitId: string },
): PhaseInsert[] {
  const { quantity, setSpeed } = check;
  const breakId = phase?.id ?? null;
  const base = { ...pair, quantity, setSpeed, breakId, byPerson: phase?.byPerson ?? null };
  const begins: PhaseInsert = {
    ...base,
    centre: null,
    sigma: null,
    trial: true,
    fromAt: phase?.fromAt ?? session.beganAt,
    reason: phase?.reason ?? "First session of this unit on this bench version.",
  };
  const own = histories.find((each) => sameSeries(each, check));
  if (own?.frozen.some((each) => each.phase === breakId)) return [begins];
  const points = [
    ...(own?.points ?? []).filter((point) => point.phase === breakId),
    { value: check.value, out: check.out.length > 0 },
  ];
  const limits = limitsOf(points, sigmaFloor(quantity, heatLoadW));
  if (!limits) return [begins];
  const frozen: PhaseInsert = {
    ...base,
    centre: roundResult(limits.centre),
    sigma: roundResult(limits.sigma),
    trial: false,
    fromAt: session.beganAt,
    reason: "Limits of the first twenty sessions of this phase.",
  };
  return [begins, frozen];
}
