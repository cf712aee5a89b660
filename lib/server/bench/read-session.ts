import { appDb } from "@/db/client/handles";
import type { Handle } from "@/db/client/connect";
import { backgroundsOfSession } from "@/db/queries/bench-checks";
import { logsOfSession } from "@/db/queries/bench-logs";
import { baselineUnitOf, roundSetupHead } from "@/db/queries/bench-queue";
import { readingsOfSession, runsOfSession } from "@/db/queries/bench-runs";
import {
  benchVersionOf,
  listSessions,
  positionsOf,
  protocolOf,
  sessionHead,
  type SessionHead,
} from "@/db/queries/bench-sessions";
import { holdsOfSession } from "@/db/queries/holds";
import { handlesOf } from "@/db/queries/people";
import { latestSendBack } from "@/db/queries/review-causes";
import { sessionRecords } from "@/db/queries/session-record";
import type { BenchSession } from "@/lib/contracts/bench-session";
import type { SessionRecord } from "@/lib/domain/results/session-record";
import { sessionGates } from "@/lib/domain/bench/session-gates";
import { ExpectedError } from "@/lib/domain/expected-error";
import type { Actor } from "@/lib/domain/accounts/actor";
import { demand } from "../permission";
import { demandRoundWork } from "./bench-access";
import { gateInput } from "./gate-input";
import { livePoints } from "./live-points";
import { purposeParts } from "./purpose-parts";
import { readingView, runView, type Handles } from "./session-rows";
import { sessionSubjects } from "./session-subjects";
import { readSessionControl, storedSessionControl } from "../baselines/control-session";

/** All that the screen of one session shows, as it stands now. @throws ExpectedError not_found, forbidden */
export async function readSession(actor: Actor, { sessionId }: { sessionId: string }): Promise<BenchSession> {
  demand(actor, "bench.read");
  const db = appDb();
  const session = await sessionHead(db, { sessionId });
  const [record] = await sessionRecords(db, { sessionIds: [sessionId] });
  if (!session || !record) throw new ExpectedError("not_found", "There is no such session.");
  await demandRoundWork(db, { actor, requestId: null }, session.roundId);
  const [protocol, bench, positions, baseline, runs, readings, backgrounds, logs, holds, round] = await Promise.all([
    protocolOf(db, { protocolVersionId: session.protocolVersionId }),
    benchVersionOf(db, { benchVersionId: session.benchVersionId }),
    positionsOf(db, { benchVersionId: session.benchVersionId }),
    baselineUnitOf(db, { baselineUnitId: session.baselineUnitId }),
    runsOfSession(db, { sessionId }),
    readingsOfSession(db, { sessionId }),
    backgroundsOfSession(db, { sessionId }),
    logsOfSession(db, { sessionId }),
    holdsOfSession(db, { sessionId }),
    session.roundId ? roundSetupHead(db, { roundId: session.roundId }) : Promise.resolve(null),
  ]);
  const other = session.bridgeUnitId ? await baselineUnitOf(db, { baselineUnitId: session.bridgeUnitId }) : null;
  const control = await controlOf(db, session, record);
  const people = await peopleOf(db, session, runs, readings, holds);
  const used = positions.filter(({ name }) => protocol.positions.includes(name));
  const { id: _protocol, positions: _names, ...protocolShown } = protocol;
  return {
    id: session.id,
    number: session.number,
    version: session.version,
    purpose: session.purpose,
    round,
    operator: person(people, session.operatorId),
    beganAt: session.beganAt.toISOString(),
    endedAt: session.endedAt?.toISOString() ?? null,
    note: session.note,
    checklist: session.checklist,
    bench: {
      name: bench.benchName,
      number: bench.number,
      cooler: bench.cooler,
      microphone: bench.microphone,
      calibrator: bench.calibrator,
      calibratorLevelDb: bench.calibratorLevelDb,
      temperatureMinC: bench.temperatureMinC,
      temperatureMaxC: bench.temperatureMaxC,
    },
    baseline,
    protocol: protocolShown,
    positions: positions.map((each) => ({ ...each, used: protocol.positions.includes(each.name) })),
    subjects: await sessionSubjects(db, { actor, session, protocol, baseline, other, runs }),
    runs: runs.map((run) => runView(run, readings, used, people)),
    readings: readings.map((each) => readingView(each, people)),
    backgrounds,
    logs: logs.map((log) => ({ ...log, at: log.at.toISOString() })),
    holds: holds.map(({ sessionId: _session, breakId: _break, raisedBy, liftedBy, ...hold }) => ({
      ...hold,
      raisedBy: raisedBy ? person(people, raisedBy) : null,
      raisedAt: hold.raisedAt.toISOString(),
      liftedBy: liftedBy ? person(people, liftedBy) : null,
      liftedAt: hold.liftedAt?.toISOString() ?? null,
    })),
    figures: livePoints(record),
    gates: session.endedAt ? [] : [...sessionGates(await gateInput(db, { sessionId })), ...control.findings],
    control: control.checks.map((check) => ({ ...check, out: [...check.out] })),
    ...(await purposeParts(db, session, record, protocol.setSpeeds)),
    sentBack: session.endedAt !== null && (await latestSendBack(db, { sessionId, runId: null })) !== undefined,
  };
}

/** Sessions, the newest first. */
export async function readSessions(actor: Actor, { roundId, open }: { roundId?: string; open?: boolean }) {
  demand(actor, "bench.read");
  const db = appDb();
  const sessions = await listSessions(db, { ...(roundId && { roundId }), ...(open && { open }) });
  const people = await handlesOf(db, { personIds: sessions.map((session) => session.operatorId) });
  return {
    items: sessions.map((session) => ({
      id: session.id,
      number: session.number,
      roundId: session.roundId,
      purpose: session.purpose,
      operator: person(people, session.operatorId),
      beganAt: session.beganAt.toISOString(),
      endedAt: session.endedAt?.toISOString() ?? null,
    })),
  };
}

/** As far as it goes while the session is open; as it was judged once it is closed. */
const controlOf = (db: Handle, session: SessionHead, record: SessionRecord) =>
  session.endedAt ? storedSessionControl(db, { sessionId: session.id }) : readSessionControl(db, record);

const person = (people: Handles, personId: string) => ({ personId, handle: people.get(personId) ?? null });

async function peopleOf(
  db: Handle,
  session: SessionHead,
  runs: readonly { byPerson: string }[],
  readings: readonly { takenBy: string }[],
  holds: readonly { raisedBy: string | null; liftedBy: string | null }[],
): Promise<Handles> {
  const ids = new Set([
    session.operatorId,
    ...runs.map((run) => run.byPerson),
    ...readings.map((each) => each.takenBy),
  ]);
  for (const { raisedBy, liftedBy } of holds) for (const id of [raisedBy, liftedBy]) if (id) ids.add(id);
  return handlesOf(db, { personIds: [...ids] });
}
