import { BarsTable } from "@/components/ui/bars/bars-table";
import type { BarsCell, BarsColumn, BarsRow } from "@/components/ui/bars/bars-model";
import type { RawReading, RawRun, RawRuns } from "@/lib/contracts/raw-runs";
import { formatDateTime } from "@/lib/format/dates";
import { formatNumber } from "@/lib/format/numbers";
import { RawFilesTable } from "./raw-files-table";

const quantityWords: Readonly<Record<string, string>> = {
  level_dba: "Level",
  background_dba: "Background",
  calibrator_db: "Calibrator",
  sensor_c: "Sensor",
  ambient_c: "Ambient",
  delta_t_k: "ΔT",
  power_w: "Power",
  speed_rpm: "Speed",
  pressure_pa: "Station pressure",
  humidity_percent: "Humidity",
  flow_m3s: "Flow",
};

const columns: readonly BarsColumn[] = [
  { key: "what", head: "Reading" },
  { key: "value", head: "Value" },
  { key: "source", head: "Source" },
  { key: "at", head: "Taken" },
  { key: "note", head: "Superseded" },
];

/** As many decimals as were written, up to four: a raw number isn't rounded for looks. */
function decimalsOf(value: number): number {
  const [, part = ""] = String(value).split(".");
  return Math.min(4, part.length);
}

function what(reading: RawReading, run: RawRun | undefined): string {
  const name = quantityWords[reading.quantity] ?? reading.quantity;
  const more = [
    run ? `mount ${run.mountNumber}${run.repeatNumber > 1 ? `, repeat ${run.repeatNumber}` : ""}` : null,
    reading.rotorPosition === null ? null : `rotor ${reading.rotorPosition}`,
    reading.position,
    reading.phase,
  ].filter(Boolean);
  return more.length > 0 ? `${name}, ${more.join(", ")}` : name;
}

function readingRow(reading: RawReading, readings: readonly RawReading[], run?: RawRun): BarsRow {
  const struck = reading.supersededBy !== null;
  const next = struck ? readings.find((each) => each.id === reading.supersededBy) : undefined;
  const words = (text: string): BarsCell => ({ words: struck ? <s>{text}</s> : text });
  const note = struck
    ? `by a later reading${next?.reason ? `: ${next.reason}` : ""}`
    : reading.supersedes
      ? `stands for an earlier one: ${reading.reason ?? ""}`
      : "no";
  const decimals = decimalsOf(reading.value);
  return {
    key: reading.id,
    tone: struck ? "wrong" : undefined,
    cells: {
      what: words(what(reading, run)),
      value: words(`${formatNumber(reading.value, { decimals })} ${reading.unit}`),
      source: words(reading.source),
      at: words(formatDateTime(reading.takenAt)),
      note: { words: run && run.state !== "done" ? `${note}; run ${run.state}: ${run.reason ?? ""}` : note },
    },
  };
}

function Table({ caption, rows }: { caption: string; rows: readonly BarsRow[] }) {
  if (rows.length === 0) return <p className="small-print">No readings here.</p>;
  return <BarsTable caption={caption} showCaption columns={columns} rows={rows} />;
}

/** All readings of a set speed, the design's runs first, then the baseline's. */
export function RawRunsTable({ raw, setSpeed, unit }: { raw: RawRuns; setSpeed: number; unit: string }) {
  const at = `${formatNumber(setSpeed)} ${unit}`;
  const rowsOf = (subject: RawRun["subject"]) =>
    raw.runs
      .filter((run) => run.subject === subject && run.setSpeed === setSpeed)
      .flatMap((run) =>
        raw.readings
          .filter((reading) => reading.runId === run.runId)
          .map((reading) => readingRow(reading, raw.readings, run)),
      );
  return (
    <div className="grid gap-6">
      <Table caption={`This design, reading by reading, at ${at}`} rows={rowsOf("entry")} />
      <Table caption={`The baseline in the same session, at ${at}`} rows={rowsOf("baseline")} />
      <RawFilesTable
        caption={`Logs and recordings behind these readings, at ${at}`}
        raw={raw}
        runs={raw.runs.filter((run) => run.setSpeed === setSpeed)}
      />
    </div>
  );
}

/** Readings that belong to the session: calibrator before and after, background, air. */
export function SessionReadingsTable({ raw }: { raw: RawRuns }) {
  const own = raw.readings.filter((reading) => reading.runId === null);
  return (
    <div className="grid gap-6">
      <Table caption="The session’s own readings" rows={own.map((reading) => readingRow(reading, raw.readings))} />
      <RawFilesTable caption="Logs and recordings of the session itself" raw={raw} runs={[]} />
    </div>
  );
}
