import { Refusal } from "../refusal";
import { BLANKS, BlankSqueezer } from "./blank-squeezer";
import { chooseColumns, type Chosen, type LogChoice, type LogWarning } from "./choice";
import type { Column } from "./columns";
import { planOf } from "./encodings";
import type { Layout } from "./layout";
import type { RefusedRow } from "./refused-rows";
import { RowMachine } from "./row-machine";

/** A log as read: the columns found, and the chosen ones as numbers in base units, one value a kept row. */
export interface ReadLog {
  readonly columns: readonly Column[];
  readonly chosen: Chosen;
  readonly rows: number;
  readonly refused: readonly RefusedRow[];
  readonly refusedCount: number;
  /** Seconds from the first kept row; undefined without a time column. */
  readonly timeS: Float64Array | undefined;
  /** °C; NaN where a sparse column is empty. */
  readonly sensorC: Float64Array | undefined;
  readonly ambientC: Float64Array | undefined;
  /** dB of whatever weighting the column has. */
  readonly levelDb: Float64Array | undefined;
  readonly speedRpm: Float64Array | undefined;
  readonly warnings: readonly LogWarning[];
}

const SAMPLE_BYTES = 1 << 16;

/**
 * Reads a log from chunks of bytes in bounded memory: the first 64 kB decide layout and columns, the rest streams.
 * UTF-8 (with or without mark), UTF-16 with mark, and the older encodings of `planOf` are read.
 */
export class LogReader {
  private head: Uint8Array = new Uint8Array(0);
  private machine: RowMachine | undefined;
  private squeezer: BlankSqueezer | undefined;
  private decoder: TextDecoder | undefined;
  private columns: readonly Column[] = [];
  private chosen: Chosen | undefined;
  private preambleLines = 0;
  private started = false;

  constructor(private readonly choice: LogChoice = {}) {}

  /** @throws Refusal when the first 64 kB are no log, or a named column isn't there */
  push(chunk: Uint8Array): void {
    if (!this.started && this.head.length + chunk.length < 3) {
      this.head = joined(this.head, chunk);
      return;
    }
    const bytes = this.started ? chunk : this.open(joined(this.head, chunk));
    this.feed(this.decoder ? new TextEncoder().encode(this.decoder.decode(bytes, { stream: true })) : bytes);
  }

  /** @throws Refusal for an empty file or one without a row of numbers */
  finish(): ReadLog {
    if (!this.started) this.feed(this.open(this.head));
    if (!this.machine) this.plan(true);
    const { machine, chosen } = this;
    if (!machine || !chosen) throw new Refusal("no-rows", "no row of numbers was found");
    const table = machine.finish();
    if (machine.rows === 0) {
      const first = machine.refused.kept[0];
      throw new Refusal(
        "no-rows",
        first ? `every row was refused; the first: ${first.reason}` : "no row of numbers was found",
        first?.line,
      );
    }
    return collect(this.columns, chosen, table, machine, this.preambleLines);
  }

  private open(bytes: Uint8Array): Uint8Array {
    this.started = true;
    this.head = new Uint8Array(0);
    if (bytes[0] === 0xef && bytes[1] === 0xbb && bytes[2] === 0xbf) return bytes.subarray(3);
    if (bytes[0] === 0xff && bytes[1] === 0xfe) this.decoder = new TextDecoder("utf-16le");
    if (bytes[0] === 0xfe && bytes[1] === 0xff) this.decoder = new TextDecoder("utf-16be");
    return bytes;
  }

  private feed(bytes: Uint8Array): void {
    if (this.machine) {
      this.machine.push(this.squeezer?.push(bytes) ?? bytes);
      return;
    }
    this.head = joined(this.head, bytes);
    if (this.head.length >= SAMPLE_BYTES) this.plan(false);
  }

  private plan(whole: boolean): void {
    if (this.head.length === 0) throw new Refusal("empty-file", "the file is empty");
    const plan = planOf(sampleOf(this.head.subarray(0, SAMPLE_BYTES), whole && this.head.length <= SAMPLE_BYTES));
    if (!plan) throw new Refusal("no-rows", "no row of numbers was found in the first 64 kB");
    const { layout } = plan;
    this.columns = plan.columns;
    this.chosen = chooseColumns(this.columns, this.choice);
    this.preambleLines = layout.preambleLines;
    this.machine = machineFor(layout, this.chosen);
    if (layout.delimiter === BLANKS) this.squeezer = new BlankSqueezer();
    const head = this.head;
    this.head = new Uint8Array(0);
    this.feed(head);
  }
}

const readColumns = ({ time, sensor, ambient, level, speed }: Chosen) => [time, sensor, ambient, level, speed];

function machineFor(layout: Layout, chosen: Chosen): RowMachine {
  const read = readColumns(chosen).filter((column) => column !== undefined);
  return new RowMachine(layout, read, chosen.time !== undefined);
}

function collect(
  columns: readonly Column[],
  chosen: Chosen,
  table: Float64Array[],
  machine: RowMachine,
  preambleLines: number,
): ReadLog {
  let slot = 0;
  const [time, sensorC, ambientC, levelDb, speedRpm] = readColumns(chosen).map((column) =>
    column ? table[slot++] : undefined,
  );
  const warnings = [...chosen.warnings];
  const scale = time && chosen.time ? assumedTimeScale(chosen.time, time) : undefined;
  if (scale !== undefined && chosen.time) {
    warnings.push({ code: "time-unit-assumed", message: `"${chosen.time.name}" has no unit: read as ${scale.name}` });
  }
  const first = time?.[0] ?? 0;
  if (time) for (let i = 0; i < time.length; i++) time[i] = ((time[i] ?? Number.NaN) - first) * (scale?.factor ?? 1);
  if (preambleLines > 0)
    warnings.push({ code: "preamble", message: `${preambleLines} lines above the names were passed over` });
  if (machine.remarks > 0)
    warnings.push({ code: "remarks", message: `${machine.remarks} rows of remarks were passed over` });
  if (machine.missing > 0)
    warnings.push({ code: "empty-cells", message: `${machine.missing} empty cells were left out` });
  const { count } = machine.refused;
  const kept = [...machine.refused.kept].sort((a, b) => a.line - b.line);
  return {
    columns,
    chosen,
    rows: machine.rows,
    refused: kept,
    refusedCount: count,
    timeS: time,
    sensorC,
    ambientC,
    levelDb,
    speedRpm,
    warnings,
  };
}

/** Numbers without a unit: milliseconds of an epoch, days of a spreadsheet, else seconds. */
function assumedTimeScale(column: Column, time: Float64Array): { factor: number; name: string } | undefined {
  if (column.kind !== "number" || column.unit) return undefined;
  const first = time[0] ?? 0;
  const step = ((time[time.length - 1] ?? 0) - first) / Math.max(1, time.length - 1);
  if (first > 1e11) return { factor: 1e-3, name: "milliseconds" };
  if (first > 20_000 && first < 80_000 && step > 0 && step < 0.05)
    return { factor: 86_400, name: "days of a spreadsheet" };
  return { factor: 1, name: "seconds" };
}

/** The sample up to its last line end, so that no line and no character is cut. */
function sampleOf(bytes: Uint8Array, whole: boolean): Uint8Array {
  if (bytes.includes(0)) throw new Refusal("not-text", "the file holds zero bytes: it is no text");
  const cut = whole ? bytes.length : Math.max(bytes.lastIndexOf(10), bytes.lastIndexOf(13)) + 1;
  return bytes.subarray(0, cut === 0 ? bytes.length : cut);
}

function joined(a: Uint8Array, b: Uint8Array): Uint8Array {
  const whole = new Uint8Array(a.length + b.length);
  whole.set(a);
  whole.set(b, a.length);
  return whole;
}
