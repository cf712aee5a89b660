import { execFileSync, spawnSync } from "node:child_process";
import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { median } from "@/lib/science/statistics/descriptive";
import type { BenchResult } from "./log";
import { MESH_TRIANGLES, writeMesh, type MeshOrder } from "./mesh-file";

interface Reading {
  readonly triangles?: number;
  readonly openEdges?: number;
  readonly shellCount?: number;
  readonly ms: number;
  /** User and system time of the process, start included. */
  readonly cpuMs: number;
  readonly peakKb: number;
}

const PAIRS = 5;
const ORDERS: readonly { order: MeshOrder; words: string; goal: number }[] = [
  { order: "shuffled", words: "shuffled", goal: 0.5 },
  { order: "halves", words: "in generated order, first halves before second ones", goal: 0.35 },
  { order: "strips", words: "in generated order, strip by strip", goal: 0.35 },
];

/**
 * A million-triangle STL against admesh (Debian) reading and checking the same file, A B A B, median of five: read,
 * welded, checked for edges and shells and summed to a volume (what admesh does too), then the whole reader with its
 * search for rotors; and the whole reader's peak memory above an idle process against the file. Strip by strip admesh
 * has next to no edge waiting for its partner, so that order is its best. Without admesh nothing is measured, and that
 * is printed.
 */
export function benchMesh(): BenchResult[] {
  if (spawnSync("admesh", ["--version"], { stdio: "ignore" }).error !== undefined) {
    process.stdout.write("not run: admesh is not installed\n");
    return [];
  }
  const folder = mkdtempSync(path.join(tmpdir(), "fanfold-bench-"));
  try {
    return ORDERS.flatMap((one) => benchOrder(folder, one));
  } finally {
    rmSync(folder, { recursive: true });
  }
}

function benchOrder(folder: string, { order, words, goal }: (typeof ORDERS)[number]): BenchResult[] {
  const file = path.join(folder, "mesh.stl");
  const fileBytes = writeMesh(file, order);
  const idle = measure("idle", file);
  const pairs = Array.from({ length: PAIRS }, () => ({
    ...{ checked: measure("checked", file), reference: admesh(file), whole: measure("whole", file) },
  }));
  for (const { triangles, openEdges, shellCount } of pairs.flatMap(({ checked, whole }) => [checked, whole])) {
    if (triangles !== MESH_TRIANGLES || openEdges !== 0 || shellCount !== 1) throw new Error("the mesh was misread");
  }
  const middle = (pick: (pair: (typeof pairs)[number]) => number) => median(pairs.map(pick)) ?? Number.NaN;
  const timed = (kind: "checked" | "whole", name: string): BenchResult => {
    const cpu = middle((p) => (p[kind].cpuMs - idle.cpuMs) / p.reference.cpuMs);
    const [own, other] = [middle((p) => p[kind].ms), middle((p) => p.reference.ms)];
    const detail = `${own.toFixed(0)} ms; admesh ${other.toFixed(0)} ms; by processor time ${cpu.toFixed(2)}`;
    return { name, ratio: middle((p) => p[kind].ms / p.reference.ms), goal, detail };
  };
  const memory = middle((p) => (p.whole.peakKb - idle.peakKb) * 1024);
  return [
    timed("checked", `mesh of a million triangles read and checked, ${words}, against admesh`),
    timed("whole", `the same through the whole reader, ${words}, against admesh`),
    {
      name: `peak memory of the whole reader above idle, ${words}, against the file`,
      ratio: memory / fileBytes,
      goal: 2.5,
      detail: `${(memory / 1e6).toFixed(0)} MB; file ${(fileBytes / 1e6).toFixed(0)} MB`,
    },
  ];
}

function measure(kind: string, file: string): Reading {
  const script = path.join(import.meta.dirname, "mesh-process.ts");
  return JSON.parse(
    execFileSync(process.execPath, ["--import", "tsx", script, kind, file], { encoding: "utf8" }),
  ) as Reading;
}

/** Wall and processor time of the whole program, as a C program has next to no start. */
function admesh(file: string): { ms: number; cpuMs: number } {
  const began = performance.now();
  const told = execFileSync("sh", ["-c", 'admesh "$0" > /dev/null; times', file], { encoding: "utf8" });
  const ms = performance.now() - began;
  // The second line of `times` is of the shell's children: user and system, as 0m3.950s 0m0.120s.
  const parts = [...(told.split("\n")[1] ?? "").matchAll(/(\d+)m([\d.]+)s/g)];
  return { ms, cpuMs: parts.reduce((sum, [, min, sec]) => sum + 60_000 * Number(min) + 1000 * Number(sec), 0) };
}
