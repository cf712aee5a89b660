import { writeCsv } from "@/lib/format/csv";
import { readRawRunsPage } from "./sheet-page";

const head = [
  "subject",
  "set_speed",
  "mount",
  "repeat",
  "run_state",
  "run_reason",
  "quantity",
  "position",
  "phase",
  "rotor",
  "value",
  "unit",
  "source",
  "taken_at",
  "reading_id",
  "supersedes",
  "superseded_by",
  "reason",
];

/** Every raw reading of an entry, of its baseline and of the session as CSV, with a file name for it. */
export async function readingsCsv(asked: { slug: string; entryId?: string }): Promise<{ name: string; text: string }> {
  const { runs, readings } = await readRawRunsPage(asked);
  const byId = new Map(runs.map((run) => [run.runId, run]));
  const rows = readings.map((reading) => {
    const run = reading.runId === null ? undefined : byId.get(reading.runId);
    return [
      run?.subject ?? "session",
      run?.setSpeed ?? null,
      run?.mountNumber ?? null,
      run?.repeatNumber ?? null,
      run?.state ?? null,
      run?.reason ?? null,
      reading.quantity,
      reading.position,
      reading.phase,
      reading.rotorPosition,
      reading.value,
      reading.unit,
      reading.source,
      reading.takenAt,
      reading.id,
      reading.supersedes,
      reading.supersededBy,
      reading.reason,
    ];
  });
  return { name: `${asked.slug}-readings.csv`, text: writeCsv(head, rows) };
}
