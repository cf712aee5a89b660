import { appDb } from "@/db/client/handles";
import { queueRows, roundSetups, type QueueRow } from "@/db/queries/bench-queue";
import { benchVersionOf, listSessions } from "@/db/queries/bench-sessions";
import { jobRows, specimensOfRevisions, topSpeeds, type SpecimenRow } from "@/db/queries/bench-specimens";
import { handlesOf } from "@/db/queries/people";
import type { BenchQueue, PrintJob, QueueEntry, SpecimenView } from "@/lib/contracts/bench-prints";
import type { Actor } from "@/lib/domain/accounts/actor";
import { checklistItems } from "@/lib/domain/bench/cautions";
import { readyForReview } from "@/lib/domain/seasons/round-moves";
import { demand } from "../permission";

const onTheirWay = ["accepted", "printing", "on_the_bench", "in_review"] as const;

/** What to print, mount and measure next: entries by state, rounds that can be measured, sessions that are open. */
export async function readQueue(actor: Actor): Promise<BenchQueue> {
  demand(actor, "bench.read");
  const db = appDb();
  const [rows, setups, open] = await Promise.all([
    queueRows(db, { states: onTheirWay }),
    roundSetups(db),
    listSessions(db, { open: true }),
  ]);
  const handles = await handlesOf(db, { personIds: open.map((session) => session.operatorId) });
  const benches = await Promise.all(
    open.map(({ benchVersionId }) => benchVersionOf(db, { benchVersionId }).then(({ benchName }) => benchName)),
  );
  return {
    entries: rows.map(entryView),
    rounds: setups.map(({ entries, ...setup }) => ({
      ...setup,
      ready: setup.roundState === "measuring" && readyForReview(entries),
    })),
    open: open.map((session, i) => ({
      sessionId: session.id,
      number: session.number,
      benchName: benches[i] ?? "",
      roundId: session.roundId,
      operatorHandle: handles.get(session.operatorId) ?? null,
      beganAt: session.beganAt.toISOString(),
    })),
    checklist: Object.entries(checklistItems).map(([key, words]) => ({ key, words })),
  };
}

/** Job tickets: entries that are accepted or being printed, and what became of their copies. */
export async function readPrintJobs(actor: Actor): Promise<{ items: PrintJob[] }> {
  demand(actor, "print.work");
  const db = appDb();
  const rows = await queueRows(db, { states: ["accepted", "printing", "on_the_bench"] });
  const revisionIds = rows.map((row) => row.revisionId);
  const [jobs, specimens, speeds] = await Promise.all([
    jobRows(db, { revisionIds }),
    specimensOfRevisions(db, { revisionIds }),
    topSpeeds(db, { seasonIds: rows.map((row) => row.seasonId) }),
  ]);
  return {
    items: rows.map((row) => {
      const job = jobs.find((each) => each.revisionId === row.revisionId);
      return {
        ...entryView(row),
        printNotes: job?.printNotes ?? "",
        material: job?.material ?? null,
        printTimeMin: job?.printTimeMin ?? null,
        rotorMasses: job?.rotorMasses ?? [],
        topSpeedRpm: speeds.get(row.seasonId) ?? null,
        specimens: specimens.filter((each) => each.revisionId === row.revisionId).map(specimenView),
      };
    }),
  };
}

function entryView(row: QueueRow): QueueEntry {
  return {
    entryId: row.entryId,
    state: row.state,
    since: row.stateAt.toISOString(),
    name: row.designName,
    letter: row.letter,
    rotors: row.rotors,
    seasonTitle: row.seasonTitle,
    round:
      row.roundId !== null && row.roundNumber !== null && row.roundState !== null
        ? { id: row.roundId, number: row.roundNumber, state: row.roundState }
        : null,
    sentBack: row.sentBack,
    sessionId: row.sessionId,
  };
}

function specimenView({ id, number, material, colour, note, parts, printedAt, ...row }: SpecimenRow): SpecimenView {
  const { layerHeightMm, nozzleMm, infillPercent, walls, layersAcrossAxis, printTimeMin } = row;
  return {
    ...{ id, number, material, colour, layerHeightMm, nozzleMm, infillPercent, walls, layersAcrossAxis, printTimeMin },
    note,
    parts,
    printedAt: printedAt?.toISOString() ?? null,
  };
}
