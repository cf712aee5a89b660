import { analyseLog, type LogReport } from "@/lib/science/logs/analyse-log";
import type { LogChoice } from "@/lib/science/logs/choice";
import { LogReader, type ReadLog } from "@/lib/science/logs/log-reader";
import { logReading, type LogKind, type LogReading } from "./log-verdict";

/** How a log of a run is to be read: its columns where a person named them, and the protocol's limits. */
export interface LogOrder {
  kind: LogKind;
  choice: LogChoice;
  /** Largest rest of the approach that may be left, K. */
  epsilonK: number;
  /** Largest change of the ambient within the window, K. */
  ambientDriftMaxK: number;
  /** Shortest record of a level, s. */
  levelAverageS: number;
}

/** What a log says: its report, the columns that were read by name, and its first rows in base units. */
export interface FoundLog extends Omit<LogReport, "kind"> {
  readonly chosen: { time: string | null; sensor: string | null; ambient: string | null; level: string | null };
  readonly preview: readonly {
    timeS: number | null;
    sensorC: number | null;
    ambientC: number | null;
    levelDba: number | null;
  }[];
  /** Why no reading comes of it, in words; null where one does. */
  readonly unusable: string | null;
  /** The reading that comes of it. */
  readonly reading: LogReading | null;
}

const pieceBytes = 1 << 18;
const previewRows = 8;

/**
 * Reads a log of the bench whole; browser preview and server call it alike.
 *
 * @param pieces the file's bytes in order @param onProgress called with the bytes read so far
 * @throws Refusal for what is no log, or a column that it doesn't have
 */
export async function readBenchLog(
  pieces: AsyncIterable<Uint8Array> | Iterable<Uint8Array>,
  order: LogOrder,
  onProgress: (bytes: number) => void = () => undefined,
): Promise<FoundLog> {
  const reader = new LogReader(order.choice);
  let bytes = 0;
  for await (const piece of pieces) {
    for (let from = 0; from < piece.length; from += pieceBytes) {
      reader.push(piece.subarray(from, from + pieceBytes));
    }
    onProgress((bytes += piece.length));
  }
  const log = reader.finish();
  const { kind: _kind, ...report } = analyseLog(log, order.epsilonK, order.ambientDriftMaxK);
  const found = logReading(report, order.kind, order);
  const { time, sensor, ambient, level } = log.chosen;
  return {
    ...report,
    chosen: {
      time: time?.name ?? null,
      sensor: sensor?.name ?? null,
      ambient: ambient?.name ?? null,
      level: level?.name ?? null,
    },
    preview: previewOf(log),
    unusable: "why" in found ? found.why : null,
    reading: "why" in found ? null : found,
  };
}

function previewOf(log: ReadLog): FoundLog["preview"] {
  const at = (values: Float64Array | undefined, i: number): number | null => {
    const value = values?.[i];
    return value === undefined || Number.isNaN(value) ? null : value;
  };
  return Array.from({ length: Math.min(previewRows, log.rows) }, (_, i) => ({
    timeS: at(log.timeS, i),
    sensorC: at(log.sensorC, i),
    ambientC: at(log.ambientC, i),
    levelDba: at(log.levelDb, i),
  }));
}
