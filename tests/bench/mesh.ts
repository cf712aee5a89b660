import { execFileSync, spawnSync } from "node:child_process";
import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { median } from "@/lib/science/statistics/descriptive";
import type { BenchResult } from "./log";
import { MESH_TRIANGLES, writeMesh } from "./mesh-file";

interface Reading {
  readonly triangles?: number;
  readonly openEdges?: number;
  readonly shellCount?: number;
  readonly volumeMm3?: number;
  readonly ms: number;
  readonly peakKb: number;
}

const PAIRS = 7;

/**
 * A million-triangle STL read, welded, checked for edges and shells and summed to a volume, against admesh (Debian)
 * reading and checking the same file, A B A B, median of seven; and its peak memory above an idle process against the
 * file. Without admesh nothing is measured, and that is printed.
 */
export function benchMesh(): BenchResult[] {
  if (spawnSync("admesh", ["--version"], { stdio: "ignore" }).error !== undefined) {
    process.stdout.write("not run: admesh is not installed\n");
    return [];
  }
  const folder = mkdtempSync(path.join(tmpdir(), "fanfold-bench-"));
  try {
    return [benchOrder(folder, true, 0.5), benchOrder(folder, false, 0.35)].flat();
  } finally {
    rmSync(folder, { recursive: true });
  }
}

function benchOrder(folder: string, shuffled: boolean, goal: number): BenchResult[] {
  const file = path.join(folder, "mesh.stl");
  const fileBytes = writeMesh(file, shuffled);
  const idleKb = measure("idle", file).peakKb;
  const pairs = Array.from({ length: PAIRS }, () => ({ own: measure("ours", file), referenceMs: admeshMs(file) }));
  for (const { own } of pairs) {
    if (own.triangles !== MESH_TRIANGLES || own.openEdges !== 0 || own.shellCount !== 1)
      throw new Error("the mesh was misread");
  }
  const middle = (pick: (pair: (typeof pairs)[number]) => number) => median(pairs.map(pick)) ?? Number.NaN;
  const memory = middle((p) => (p.own.peakKb - idleKb) * 1024);
  const order = shuffled ? "shuffled" : "in generated order";
  const detail = `${middle((p) => p.own.ms).toFixed(0)} ms; admesh ${middle((p) => p.referenceMs).toFixed(0)} ms`;
  return [
    {
      name: `mesh of a million triangles, ${order}, against admesh`,
      ratio: middle((p) => p.own.ms / p.referenceMs),
      goal,
      detail,
    },
    {
      name: `peak memory above idle for that mesh, ${order}, against the file`,
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

/** Wall time of the whole program, as a C program has next to no start. */
function admeshMs(file: string): number {
  const began = performance.now();
  execFileSync("admesh", [file], { stdio: "ignore" });
  return performance.now() - began;
}
