import { appDb } from "@/db/client/handles";
import { changeSession, endSessionRow, insertSession, setupOf } from "@/db/queries/bench-sessions";
import { insertHolds } from "@/db/queries/holds";
import { moveRound } from "@/db/queries/moves";
import { roundContext } from "@/db/queries/round-context";
import type { z } from "zod";
import type { sessionChange, startSession as startSchema } from "@/lib/contracts/bench";
import { ExpectedError } from "@/lib/domain/expected-error";
import { sessionGates } from "@/lib/domain/bench/session-gates";
import { note, type Asked } from "../audit/audit";
import { demand } from "../permission";
import { chartSession } from "../baselines/control-session";
import { settleSession } from "../baselines/settle-session";
import { computeSession } from "../results/compute-session";
import { demandBench, demandRoundWork } from "./bench-access";
import { gateInput } from "./gate-input";
import { demandNoOpenSession, demandTicked } from "./session-start";

/**
 * Starts a session of a round on a bench; the round is being measured from then on. One session is open on a bench.
 * @throws ExpectedError malformed while a caution is not ticked or the season doesn't use that bench or baseline
 */
export async function startSession(
  asked: Asked,
  input: z.output<typeof startSchema>,
  at: Date,
): Promise<{ sessionId: string }> {
  const { actor } = asked;
  demand(actor, "bench.read");
  demandTicked(input.checklist);
  return appDb().transaction(async (tx) => {
    await demandRoundWork(tx, asked, input.roundId);
    const round = await roundContext(tx, { roundId: input.roundId, lock: true });
    if (round.state !== "planned" && round.state !== "measuring") {
      throw new ExpectedError(
        "moved_on",
        `The round is ${round.state.replace("_", " ")}: nothing is measured for it now.`,
      );
    }
    const setup = await setupOf(tx, input);
    if (!setup) {
      throw new ExpectedError(
        "malformed",
        "The round's season doesn't use this bench version with this baseline unit.",
        [{ path: "benchVersionId", message: "is not of the season, or the baseline unit is not" }],
      );
    }
    await demandNoOpenSession(tx, setup.benchId);
    const sessionId = await insertSession(tx, {
      ...setup,
      benchVersionId: input.benchVersionId,
      baselineUnitId: input.baselineUnitId,
      roundId: input.roundId,
      operatorId: actor.personId,
      checklist: input.checklist,
      at,
    });
    if (round.state === "planned") {
      await moveRound(tx, { roundId: round.roundId, from: "planned", to: "measuring", byPerson: actor.personId, at });
    }
    await note(tx, asked, { action: "session.start", subjectKind: "session", subjectId: sessionId });
    return { sessionId };
  });
}

/** Changes the note or the checklist of an open session, if nobody else did in between. */
export async function editSession(
  asked: Asked,
  { sessionId, ...input }: { sessionId: string } & z.output<typeof sessionChange>,
): Promise<{ version: number }> {
  const db = appDb();
  await demandBench(db, asked, { sessionId, open: true });
  const { version, checklist, note: text } = input;
  if (!(await changeSession(db, { sessionId, version, change: { checklist, note: text } }))) {
    throw new ExpectedError(
      "moved_on",
      "Somebody else changed this session in between. Look at it again; your typing is kept.",
    );
  }
  return { version: version + 1 };
}

/**
 * Closes a session: its gates are tried and its baseline and calibrator put on their charts, each finding holds it, and
 * its figures are computed. What a qualification or a bridge gives is written down unless something holds it. A closed
 * session takes only readings that supersede others for a review or a correction.
 * @returns what was found; empty when nothing holds it
 */
export async function endSession(asked: Asked, { sessionId, at }: { sessionId: string; at: Date }) {
  return appDb().transaction(async (tx) => {
    await demandBench(tx, asked, { sessionId, lock: true, open: true });
    const findings = sessionGates(await gateInput(tx, { sessionId }));
    await endSessionRow(tx, { sessionId, at });
    await insertHolds(tx, { sessionId, findings, raisedBy: null, at });
    await computeSession(tx, sessionId);
    findings.push(...(await chartSession(tx, { sessionId, at })));
    await settleSession(tx, { sessionId, at });
    await note(tx, asked, { action: "session.end", subjectKind: "session", subjectId: sessionId, after: { findings } });
    return { findings };
  });
}
