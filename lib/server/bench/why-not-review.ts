import type { Handle } from "@/db/client/connect";
import type { QueueRow } from "@/db/queries/bench-queue";
import { benchEntries } from "@/db/queries/bench-entries";
import { runsOfSession } from "@/db/queries/bench-runs";
import { protocolOf, sessionHead } from "@/db/queries/bench-sessions";
import { holdsOfSession } from "@/db/queries/holds";
import { sessionRecords } from "@/db/queries/session-record";
import { missingRuns } from "@/lib/domain/bench/missing-runs";
import { sessionPoints } from "@/lib/domain/results/methods/v1/session-points";
import { protocolPositionIds } from "@/lib/domain/results/session-figures";

/**
 * Why an entry can't go to review, a sentence each; empty when all gates are passed: the newest session that it ran in
 * is closed, has each of its runs with what they need, a background, the baseline, and no hold that stands.
 */
export async function whyNotReview(db: Handle, row: QueueRow): Promise<string[]> {
  if (!row.roundId || !row.sessionId) return ["It has no run in a session of its round."];
  const session = await sessionHead(db, { sessionId: row.sessionId });
  const [record] = await sessionRecords(db, { sessionIds: [row.sessionId] });
  if (!session || !record) return ["Its session is not there."];
  const protocol = await protocolOf(db, { protocolVersionId: session.protocolVersionId });
  const runs = await runsOfSession(db, { sessionId: session.id });
  const holds = await holdsOfSession(db, { sessionId: session.id });
  const entries = await benchEntries(db, { roundId: row.roundId });
  const specimenId = entries.find((each) => each.entryId === row.entryId)?.specimenId;
  const why: string[] = [];
  if (!session.endedAt) why.push(`Session ${session.number} is still open: end it first.`);
  for (const hold of holds.filter((each) => !each.liftedAt)) {
    why.push(`Session ${session.number} is held: ${hold.reason} Another person lifts the hold.`);
  }
  const own = runs.filter((run) => run.entryId === row.entryId && run.specimenId === specimenId);
  const waiting = runs.filter((run) => run.entryId === row.entryId && (run.state === "open" || run.state === "held"));
  if (waiting.length > 0) why.push(`${waiting.length} of its runs are open or held.`);
  const done = own.filter((run) => run.state === "done");
  const missing = missingRuns(
    protocol,
    done.map((run) => ({ setSpeed: run.setSpeed, mount: run.mountNumber })),
  );
  const count = missing.reduce((sum, each) => sum + each.runs, 0);
  if (count > 0) {
    const unit = protocol.setting === "rpm" ? "rpm" : "%";
    const first = missing.slice(0, 3).map((each) => `mount ${each.mount} at ${each.setSpeed} ${unit}`);
    why.push(`${count} runs are missing: ${first.join(", ")}${missing.length > 3 ? " and more" : ""}.`);
  }
  const positions = protocolPositionIds(record);
  if (!positions.every((id) => record.backgrounds.some((each) => each.positionId === id))) {
    why.push("There is no background level at every position.");
  }
  const { subjects, leftOut } = sessionPoints(record, positions);
  const lost = leftOut.filter((each) => own.some((run) => run.id === each.runId));
  if (lost.length > 0) why.push(`${lost.length} of its runs give no figure: ${lost[0]?.why}.`);
  if (!subjects.some((subject) => subject.baselineUnitId === session.baselineUnitId)) {
    why.push("The session has no run of its baseline.");
  }
  return why;
}
