import { open } from "node:fs/promises";
import { parentPort, workerData } from "node:worker_threads";
import { analyseMesh } from "@/lib/science/geometry/analyse";
import { fanDrawing } from "@/lib/science/geometry/drawing/fan-drawing";
import { smallFront } from "@/lib/science/geometry/drawing/thumbnail";
import { meshBounds, scaledMesh } from "@/lib/science/geometry/mesh";
import { readModelFile } from "@/lib/science/geometry/model-file";
import type { ByteSource, MeshWarning } from "@/lib/science/geometry/reading";
import { guessUnit, mmPerUnit } from "@/lib/science/geometry/units";
import { Refusal } from "@/lib/science/refusal";
import type { ThreadAnswer, ThreadOrder } from "./read-mesh";

const progressEveryMs = 250;
const tell = (answer: ThreadAnswer): void => parentPort?.postMessage(answer);

/** Reads and measures one file in a thread of its own; the thread that started it may end it at any moment. */
async function work({ file, limits, mmPerUnit: said, meshAlone }: ThreadOrder): Promise<void> {
  const began = performance.now();
  let told = began;
  const handle = await open(file, "r");
  try {
    const { size } = await handle.stat();
    const source: ByteSource = {
      size,
      read: async (offset, length) => {
        const buffer = new Uint8Array(Math.max(0, Math.min(length, size - offset)));
        let filled = 0;
        while (filled < buffer.length) {
          const { bytesRead } = await handle.read(buffer, filled, buffer.length - filled, offset + filled);
          if (bytesRead === 0) break;
          filled += bytesRead;
        }
        return buffer.subarray(0, filled);
      },
    };
    const reading = await readModelFile(source, {
      limits,
      elapsedMs: () => performance.now() - began,
      onProgress: (read, expected) => {
        if (performance.now() - told < progressEveryMs) return;
        told = performance.now();
        tell({ kind: "progress", read, expected });
      },
    });
    const triangles = reading.mesh.triangles.length / 3;
    tell({ kind: "measuring", triangles });
    const unit = said === undefined ? unitOf(reading.mmPerUnit, extentOf(reading.mesh)) : saidUnit(said);
    const inMm = unit.mmPerUnit === 1 ? reading.mesh : scaledMesh(reading.mesh, unit.mmPerUnit);
    if (meshAlone) return tell({ kind: "mesh", mesh: inMm });
    // At 1 g/cm³, so that a mass at any material's density is one multiplication away.
    const { mesh: judged, fit: _fit, ...measured } = analyseMesh(inMm, { densityGCm3: 1 });
    const warnings = [...reading.warnings, ...unit.warnings, ...measured.warnings];
    const { mmPerUnit: scale, from } = unit;
    const result = { ...measured, format: reading.format, unit: { mmPerUnit: scale, from }, warnings };
    tell({ kind: "measured", result });
    const drawing = { drawing: fanDrawing(judged, measured), thumbnail: smallFront(judged, measured) };
    tell({ kind: "drawn", drawing });
  } finally {
    await handle.close();
  }
}

function extentOf(mesh: Parameters<typeof meshBounds>[0]): number {
  const bounds = meshBounds(mesh);
  return bounds ? Math.max(...bounds.max.map((value, axis) => value - (bounds.min[axis] ?? 0))) : 0;
}

const saidUnit = (scale: number) => ({ mmPerUnit: scale, from: "said" as const, warnings: [] as MeshWarning[] });

function unitOf(own: number | undefined, extent: number) {
  if (own !== undefined) return { mmPerUnit: own, from: "file" as const, warnings: [] };
  const guess = guessUnit(extent);
  if (guess === "mm") return { mmPerUnit: 1, from: "guessed" as const, warnings: [] };
  const taken = guess === "cm?" ? "cm" : guess === "unknown" ? "mm" : guess;
  const message = `The file names no unit and its largest extent is ${Number(extent.toPrecision(4))}, which is no usual fan in mm: it was read in ${taken}. If that is wrong, save it in mm and send it again.`;
  const warnings: MeshWarning[] = [{ code: "unit-guessed", message }];
  return { mmPerUnit: mmPerUnit[taken], from: "guessed" as const, warnings };
}

work(workerData as ThreadOrder).catch((error: unknown) => {
  if (!(error instanceof Refusal)) throw error;
  const place = error.at === undefined ? "" : ` (at ${error.at})`;
  tell({ kind: "refused", code: error.code, message: error.message + place });
});
