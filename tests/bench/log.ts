import { execFileSync } from "node:child_process";
import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { median } from "@/lib/science/statistics/descriptive";
import { writeLog } from "./log-file";

/** A figure as a ratio within one run, with what it should not exceed. */
export interface BenchResult {
  readonly name: string;
  readonly ratio: number;
  readonly goal: number;
  readonly detail: string;
}

interface Reading {
  rows: number;
  ms: number;
  peakKb: number;
}

const ROWS = 1_000_000;
const PAIRS = 7;

/** A million-row log read and analysed in a worker against csv-parse splitting the same file, A B A B, median of seven. */
export function benchLog(): BenchResult[] {
  const folder = mkdtempSync(path.join(tmpdir(), "fanfold-bench-"));
  try {
    const file = path.join(folder, "log.csv");
    const bytes = writeLog(file, ROWS);
    const idleKb = measure("idle", file).peakKb;
    const pairs = Array.from({ length: PAIRS }, () => ({
      own: measure("ours", file),
      reference: measure("csv-parse", file),
    }));
    const middle = (pick: (pair: (typeof pairs)[number]) => number) => median(pairs.map(pick)) ?? Number.NaN;
    const memory = (reading: Reading) => (reading.peakKb - idleKb) / 1024;
    const own = `${middle((p) => p.own.ms).toFixed(0)} ms, ${middle((p) => memory(p.own)).toFixed(0)} MB over idle`;
    const reference = `${middle((p) => p.reference.ms).toFixed(0)} ms, ${middle((p) => memory(p.reference)).toFixed(0)} MB`;
    return [
      {
        name: "log of a million rows, read and analysed, against csv-parse alone",
        ratio: middle((p) => p.own.ms / p.reference.ms),
        goal: 1.2,
        detail: `${own}; csv-parse ${reference}; ${(bytes / 1e6).toFixed(0)} MB file`,
      },
    ];
  } finally {
    rmSync(folder, { recursive: true });
  }
}

function measure(kind: string, file: string): Reading {
  const script = path.join(import.meta.dirname, "log-process.ts");
  const result = JSON.parse(
    execFileSync(process.execPath, ["--import", "tsx", script, kind, file], { encoding: "utf8" }),
  ) as Reading;
  if (kind !== "idle" && result.rows !== ROWS) throw new Error(`${kind} read ${result.rows} rows`);
  return result;
}
