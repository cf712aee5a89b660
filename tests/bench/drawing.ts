import { execFileSync } from "node:child_process";
import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { generateRotor } from "@/lib/science/geometry/rotor-generator";
import { writeBinaryStl } from "@/lib/science/geometry/stl-write";
import { median } from "@/lib/science/statistics/descriptive";
import type { BenchResult } from "./log";

const RUNS = 7;
const VIEWS = 2;

/** Seconds a view that reading and drawing a rotor of about 30,000 triangles takes, each in a process of its own. */
export function benchDrawing(): BenchResult[] {
  const folder = mkdtempSync(path.join(tmpdir(), "fanfold-bench-"));
  try {
    const file = path.join(folder, "rotor.stl");
    const mesh = generateRotor({
      ...{ blades: 9, hand: "left", helixPitchMm: 90, chordMm: 30, thicknessMm: 2, camber: 0.08 },
      ...{ hubRadiusMm: 20, tipRadiusMm: 55, hubDepthMm: 22, bladeSteps: { span: 28, chord: 28 } },
    });
    writeFileSync(file, writeBinaryStl(mesh, "bench"));
    const script = path.join(import.meta.dirname, "drawing-process.ts");
    const runs = Array.from(
      { length: RUNS },
      () =>
        JSON.parse(execFileSync(process.execPath, ["--import", "tsx", script, file], { encoding: "utf8" })) as {
          triangles: number;
          drawn: number;
          ms: number;
        },
    );
    const [first] = runs;
    if (!first || first.drawn === 0) throw new Error("nothing was drawn");
    return [
      {
        name: `drawing at ${first.triangles} triangles, reading included, seconds a view`,
        ratio: (median(runs.map(({ ms }) => ms)) ?? Number.NaN) / 1000 / VIEWS,
        goal: 0.6,
        detail: `front and side, median of ${RUNS}`,
      },
    ];
  } finally {
    rmSync(folder, { recursive: true });
  }
}
