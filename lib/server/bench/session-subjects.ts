import type { Handle } from "@/db/client/connect";
import { queueRows } from "@/db/queries/bench-queue";
import { benchEntries, ownedEntries, type BenchEntry } from "@/db/queries/bench-entries";
import type { RunRow } from "@/db/queries/bench-runs";
import type { ProtocolRow, SessionHead } from "@/db/queries/bench-sessions";
import type { BenchSubject } from "@/lib/contracts/bench-session";
import type { Person } from "@/lib/domain/accounts/actor";
import { QUALIFYING_MOUNTS } from "@/lib/domain/baselines/qualify";
import { missingRuns } from "@/lib/domain/bench/missing-runs";

/**
 * What is run in a session: the baseline, then its round's entries that are on the bench or have a run here, each with
 * the runs that the protocol still asks for. The baseline's two turns are one run at each set speed, first and last.
 */
export async function sessionSubjects(
  db: Handle,
  {
    actor,
    session,
    protocol,
    baseline,
    other,
    runs,
  }: {
    actor: Person;
    session: SessionHead;
    protocol: ProtocolRow;
    baseline: { name: string; serial: string };
    /** The other unit of a bridging session. */
    other: { name: string; serial: string } | null;
    runs: readonly RunRow[];
  },
): Promise<BenchSubject[]> {
  const doneOf = (match: (run: RunRow) => boolean) =>
    runs
      .filter((run) => run.state === "done" && match(run))
      .map((run) => ({ setSpeed: run.setSpeed, mount: run.mountNumber }));
  const turns = { round: 2, qualification: QUALIFYING_MOUNTS, bridge: Math.max(2, protocol.mounts) }[session.purpose];
  const unit = { entryId: null, state: null, rotors: 1, specimenNumber: null, closed: null, sentBack: null };
  const first: BenchSubject = {
    ...unit,
    baselineUnitId: session.baselineUnitId,
    name: `Baseline ${baseline.name} ${baseline.serial}`,
    missing: baselineMissing(protocol, session.baselineUnitId, runs, turns),
  };
  if (session.bridgeUnitId && other) {
    const { bridgeUnitId } = session;
    const missing = missingRuns(
      protocol,
      doneOf((run) => run.baselineUnitId === bridgeUnitId),
    );
    return [first, { ...unit, baselineUnitId: bridgeUnitId, name: `Baseline ${other.name} ${other.serial}`, missing }];
  }
  if (!session.roundId) return [first];
  const [entries, rows, owned] = await Promise.all([
    benchEntries(db, { roundId: session.roundId }),
    queueRows(db, { states: ["on_the_bench", "in_review"] }),
    ownedEntries(db, { roundId: session.roundId, personId: actor.personId }),
  ]);
  const here = entries.filter(
    (entry) => entry.state === "on_the_bench" || runs.some((run) => run.entryId === entry.entryId),
  );
  return [
    first,
    ...here.map((entry): BenchSubject => ({
      entryId: entry.entryId,
      baselineUnitId: null,
      name: `${entry.designName} ${entry.letter}`,
      state: entry.state,
      rotors: entry.stages,
      specimenNumber: entry.specimenNumber,
      closed: whyClosed(session, entry, owned.includes(entry.entryId)),
      sentBack: rows.find((row) => row.entryId === entry.entryId)?.sentBack ?? null,
      missing: missingRuns(
        protocol,
        doneOf((run) => run.entryId === entry.entryId && run.specimenId === entry.specimenId),
      ),
    })),
  ];
}

/** Its turns; one more mount where something else ran after what was to be the last. */
function baselineMissing(protocol: ProtocolRow, baselineUnitId: string, runs: readonly RunRow[], least: number) {
  const done = runs.filter((run) => run.state === "done");
  const own = done.filter((run) => run.baselineUnitId === baselineUnitId);
  const mounts = new Set(own.map((run) => run.mountNumber)).size;
  const turns = Math.max(least, mounts);
  const taken = own.map((run) => ({ setSpeed: run.setSpeed, mount: run.mountNumber }));
  const missing = missingRuns({ ...protocol, mounts: turns, runsPerMount: 1 }, taken);
  const isLast = done.at(-1)?.baselineUnitId === baselineUnitId;
  if (missing.length > 0 || isLast || done.length === 0) return missing;
  return missingRuns({ ...protocol, mounts: turns + 1, runsPerMount: 1 }, taken);
}

function whyClosed(session: SessionHead, entry: BenchEntry, owned: boolean): string | null {
  if (session.endedAt) return "The session is closed.";
  if (owned) return "You own this entry: another person works its runs.";
  if (entry.state !== "on_the_bench") return `The entry is ${entry.state.replaceAll("_", " ")}, not on the bench.`;
  if (!entry.specimenId) return "No printed copy of it has passed its spin-up.";
  return null;
}
