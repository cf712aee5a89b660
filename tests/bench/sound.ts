import { execFileSync } from "node:child_process";
import { existsSync, mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { median } from "@/lib/science/statistics/descriptive";
import type { BenchResult } from "./log";

interface Reading {
  firstMs: number;
  warmMs: number;
  peakKb: number;
  levelADba: number;
  levelZDb: number;
  band1kDb: number;
}

const RATE = 48000;
const SECONDS = 60;
const PAIRS = 7;
const DEBIAN_PYTHON = "/usr/bin/python3";

/**
 * A 60 s, 48 kHz recording to bands and levels against scipy.signal.welch plus the same sums, on the same samples:
 * A B A B, timed inside each process after imports, median of seven pairs.
 * @throws Error where python3-scipy is missing, or where the two don't agree to 1e-4 dB
 */
export async function run(): Promise<BenchResult[]> {
  const folder = mkdtempSync(path.join(tmpdir(), "fanfold-bench-"));
  try {
    const file = path.join(folder, "samples.f64");
    writeFileSync(file, new Uint8Array(recording().buffer));
    const idle = { own: measureOwn("idle", file).peakKb, reference: measureScipy("idle", file).peakKb };
    const pairs = Array.from({ length: PAIRS }, () => ({
      own: measureOwn("run", file),
      reference: measureScipy("run", file),
    }));
    pairs.forEach(checkAgreement);
    const middle = (pick: (pair: (typeof pairs)[number]) => number) => median(pairs.map(pick)) ?? Number.NaN;
    const megabytes = (kb: number) => `${(kb / 1024).toFixed(0)} MB over idle`;
    const memory =
      `${megabytes(middle((p) => p.own.peakKb) - idle.own)}, ` +
      `scipy ${megabytes(middle((p) => p.reference.peakKb) - idle.reference)}`;
    const row = (name: string, goal: number, pick: (reading: Reading) => number): BenchResult => ({
      name: `60 s of sound to bands and levels against scipy, ${name}`,
      ratio: middle((p) => pick(p.own) / pick(p.reference)),
      goal,
      detail:
        `${middle((p) => pick(p.own)).toFixed(0)} ms against ` +
        `${middle((p) => pick(p.reference)).toFixed(0)} ms; ${memory}`,
    });
    return [row("warm", 0.75, ({ warmMs }) => warmMs), row("first call", 1.1, ({ firstMs }) => firstMs)];
  } finally {
    rmSync(folder, { recursive: true });
  }
}

/** White noise and a tone; a plain congruential generator is random enough to be timed. */
function recording(): Float64Array {
  let state = 1;
  return Float64Array.from({ length: RATE * SECONDS }, (_, i) => {
    state = (Math.imul(state, 1664525) + 1013904223) | 0;
    return state / 2 ** 33 + 0.1 * Math.sin((2 * Math.PI * 331 * i) / RATE);
  });
}

function measureOwn(kind: string, file: string): Reading {
  const script = path.join(import.meta.dirname, "sound-process.ts");
  return parse(execFileSync(process.execPath, ["--import", "tsx", script, kind, file, String(RATE)]));
}

function measureScipy(kind: string, file: string): Reading {
  const script = path.join(import.meta.dirname, "sound-process.py");
  const python = existsSync(DEBIAN_PYTHON) ? DEBIAN_PYTHON : "python3";
  return parse(execFileSync(python, [script, kind, file, String(RATE)]));
}

const parse = (output: Buffer) => JSON.parse(output.toString()) as Reading;

function checkAgreement({ own, reference }: { own: Reading; reference: Reading }): void {
  for (const key of ["levelADba", "levelZDb", "band1kDb"] as const) {
    if (!(Math.abs(own[key] - reference[key]) < 1e-4)) throw new Error(`${key}: ${own[key]} against ${reference[key]}`);
  }
}
