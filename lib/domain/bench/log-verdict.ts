import type { LogReport } from "@/lib/science/logs/analyse-log";

/** What a log that is put to a run holds. */
export type LogKind = "temperature" | "level";

export interface LogReading {
  quantity: "delta_t_k" | "level_dba";
  value: number;
  unit: "K" | "dB(A)";
  detail: Record<string, unknown>;
}

/**
 * The reading that a log gives under a protocol, or why it gives none, in words with the clause that failed.
 * @param levelAverageS shortest record of a level, s
 */
export function logReading(
  report: Omit<LogReport, "kind">,
  kind: LogKind,
  { levelAverageS }: { levelAverageS: number },
): LogReading | { why: string } {
  return kind === "temperature" ? riseOf(report) : levelOf(report, levelAverageS);
}

function riseOf({ temperature, warnings }: Omit<LogReport, "kind">): LogReading | { why: string } {
  if (!temperature) {
    const said = warnings.find((each) => each.code === "no-ambient" || each.code === "nothing-recognised");
    return { why: said ? `${said.message}.` : "No sensor column was recognised: name it." };
  }
  const { steady, deltaTK, uDeltaTK, ambientC, ambientDriftK, fit } = temperature;
  if (!steady.found) return { why: `No steady state: ${steady.how}. Record for longer, or type readings.` };
  if (deltaTK === null || !(deltaTK > 0)) {
    return { why: "The sensor isn't warmer than the ambient: with the heat on ΔT is above 0 K." };
  }
  if (uDeltaTK === null) return { why: "The rise never moves in the window: its scatter can't be known." };
  // What the gate leaves is within uDeltaTK already, so that no residual stands beside it to be counted twice.
  const detail = {
    uDeltaTK,
    ambientC,
    ambientDriftK,
    windowFromS: steady.fromS,
    windowToS: steady.toS,
    how: steady.how,
    fit,
  };
  return { quantity: "delta_t_k", value: deltaTK, unit: "K", detail };
}

function levelOf(
  { level, intervalS, warnings }: Omit<LogReport, "kind">,
  levelAverageS: number,
): LogReading | { why: string } {
  if (!level) return { why: "No level column was recognised: name it." };
  if (level.laeqDba === null) {
    return { why: `${warnings.find((each) => each.code === "not-a-weighted")?.message ?? "The level can't be read"}.` };
  }
  const lengthS = intervalS === null ? undefined : intervalS * level.n;
  if (lengthS !== undefined && lengthS < levelAverageS - 1e-9) {
    const short = Math.round(lengthS * 10) / 10;
    return { why: `The record is ${short} s long; the protocol averages over ${levelAverageS} s.` };
  }
  const detail = { sDb: level.sDb, n: level.n, intervalS };
  return { quantity: "level_dba", value: level.laeqDba, unit: "dB(A)", detail };
}
