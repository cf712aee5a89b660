import { appDb } from "@/db/client/handles";
import type { Handle } from "@/db/client/connect";
import { benchVersionOf, sessionHead } from "@/db/queries/bench-sessions";
import { closedSessionsFrom, controlBreaks, insertBreak } from "@/db/queries/control";
import { holdsOfSession, liftHoldRow } from "@/db/queries/holds";
import type { DocumentedChange } from "@/lib/contracts/control";
import type { Person } from "@/lib/domain/accounts/actor";
import { ExpectedError } from "@/lib/domain/expected-error";
import { note, type Asked } from "../audit/audit";
import { demand } from "../permission";
import { chartSession } from "./control-session";
import { settleSession } from "./settle-session";

/**
 * Documents a change at a bench: from the session named on, its charts begin a new phase with trial limits. Sessions
 * from there on are charted anew, and holds of the charts that the change explains are lifted by it: by the host who
 * writes it down, who must not be the held session's operator.
 *
 * @returns the break's id and the numbers of the sessions that go on
 * @throws ExpectedError forbidden, not_found, malformed while the change lies before one that is documented already
 */
export async function documentChange(
  asked: Asked,
  {
    benchVersionId,
    fromSessionId,
    kind,
    reason,
    allUnits,
    at,
  }: { benchVersionId: string; at: Date } & DocumentedChange,
  db: Handle = appDb(),
): Promise<{ breakId: string; released: number[] }> {
  demand(asked.actor, "bench.manage");
  const { actor } = asked;
  return db.transaction(async (tx) => {
    const session = await sessionHead(tx, { sessionId: fromSessionId, lock: true });
    if (!session || session.benchVersionId !== benchVersionId) {
      throw new ExpectedError("malformed", "The change counts from a session of this bench version.", [
        { path: "fromSessionId", message: "is of another bench version" },
      ]);
    }
    const pair = { benchVersionId, baselineUnitId: session.baselineUnitId };
    const last = (await controlBreaks(tx, pair)).at(-1);
    if (last && last.fromAt >= session.beganAt) {
      throw new ExpectedError(
        "malformed",
        `A change from this session or a later one on is documented: ${last.reason}`,
        [{ path: "fromSessionId", message: "lies before a change that is documented" }],
      );
    }
    const baselineUnitId = allUnits ? null : session.baselineUnitId;
    const row = { benchVersionId, baselineUnitId, kind, reason, fromAt: session.beganAt, byPerson: actor.personId };
    const breakId = await insertBreak(tx, { ...row, at });
    const released: number[] = [];
    for (const each of await closedSessionsFrom(tx, { benchVersionId, baselineUnitId, from: session.beganAt })) {
      const findings = await chartSession(tx, { sessionId: each.id, at, hold: false });
      const codes = findings.map((finding) => finding.code as string);
      if (await release(tx, actor, { session: each, codes, breakId, reason, at })) released.push(each.number);
    }
    const bench = await benchVersionOf(tx, { benchVersionId });
    await note(tx, asked, {
      action: "bench.change",
      subjectKind: "bench_version",
      subjectId: benchVersionId,
      after: { breakId, kind, reason, fromSession: session.number, released, bench: bench.benchName },
    });
    return { breakId, released };
  });
}

/** Lifts the charts' holds of a session that its new phase no longer bears out. @returns whether there was one */
async function release(
  tx: Handle,
  actor: Person,
  {
    session,
    codes,
    breakId,
    reason,
    at,
  }: {
    session: { id: string; number: number; operatorId: string };
    codes: readonly string[];
    breakId: string;
    reason: string;
    at: Date;
  },
): Promise<boolean> {
  const holds = (await holdsOfSession(tx, { sessionId: session.id })).filter(
    (hold) => hold.control && hold.liftedAt === null && !codes.includes(hold.code),
  );
  if (holds.length === 0) return false;
  if (session.operatorId === actor.personId) {
    throw new ExpectedError(
      "forbidden",
      `You took session ${session.number}: another host documents the change, or another person lifts its hold.`,
    );
  }
  const liftNote = `Documented change: ${reason}`;
  for (const hold of holds) {
    await liftHoldRow(tx, { holdId: hold.id, liftedBy: actor.personId, liftNote, at, breakId });
  }
  await settleSession(tx, { sessionId: session.id, at });
  return true;
}
