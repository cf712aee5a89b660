import { compareModel, type FetchedSolid, type Surroundings } from "@/lib/client/fit/compare-model";
import { MEASURED_AT, type ModelMeasured, type WorkerAnswer, type WorkerRequest } from "@/lib/client/fit/messages";
import type { FitMeshKeepOut } from "@/lib/contracts/fit-limits";
import { analyseMesh } from "@/lib/science/geometry/analyse";
import { fanDrawing } from "@/lib/science/geometry/drawing/fan-drawing";
import { turnable } from "@/lib/science/geometry/drawing/turnable";
import { drawingSvg } from "@/lib/science/geometry/drawing/svg-text";
import { meshBounds, scaledMesh, type Mesh } from "@/lib/science/geometry/mesh";
import { readModelFile } from "@/lib/science/geometry/model-file";
import { memorySource, type ByteSource } from "@/lib/science/geometry/reading";
import { guessUnit } from "@/lib/science/geometry/units";
import { Refusal } from "@/lib/science/refusal";

/** Reads, measures and draws a model beside the page; the file never leaves the browser. */
const PROGRESS_EVERY_MS = 80;
let kept: { job: number; mesh: Mesh; judged?: { mesh: Mesh; measured: ModelMeasured } } | undefined;

const answer = (message: WorkerAnswer): void => self.postMessage(message);

const blobSource = (file: Blob): ByteSource => ({
  size: file.size,
  read: async (offset, length) => new Uint8Array(await file.slice(offset, offset + length).arrayBuffer()),
});

async function read(job: number, file: File): Promise<void> {
  const began = performance.now();
  let told = began;
  const reading = await readModelFile(blobSource(file), {
    elapsedMs: () => performance.now() - began,
    onProgress: (trianglesRead, expected) => {
      if (performance.now() - told < PROGRESS_EVERY_MS) return;
      told = performance.now();
      answer({ kind: "progress", job, read: trianglesRead, expected });
    },
  });
  const bounds = meshBounds(reading.mesh);
  if (!bounds) throw new Refusal("empty", "The file holds no triangles.");
  const extent = Math.max(...bounds.max.map((value, axis) => value - (bounds.min[axis] ?? 0)));
  kept = { job, mesh: reading.mesh };
  answer({
    kind: "read",
    job,
    model: {
      name: file.name,
      bytes: file.size,
      format: reading.format,
      triangles: reading.mesh.triangles.length / 3,
      extent,
      mmPerUnit: reading.mmPerUnit,
      guess: guessUnit(extent * (reading.mmPerUnit ?? 1)),
      warnings: reading.warnings,
    },
  });
}

function measure(job: number, mmPerUnit: number): void {
  if (kept?.job !== job) throw new Refusal("not-read", "The file is no longer there; choose it again.");
  const inMm = mmPerUnit === 1 ? kept.mesh : scaledMesh(kept.mesh, mmPerUnit);
  const { mesh: judged, ...measured } = analyseMesh(inMm, MEASURED_AT);
  kept.judged = { mesh: judged, measured };
  answer({ kind: "measured", job, measured });
  const drawing = fanDrawing(judged, measured);
  answer({ kind: "drawn", job, drawing, svg: drawingSvg(drawing) });
}

/** Keep-out meshes by address: what stands around a bench's cooler doesn't change while the page is open. */
const solids = new Map<string, Mesh>();

async function solidAt({ name, address }: FitMeshKeepOut): Promise<FetchedSolid> {
  const known = solids.get(address);
  if (known) return { name, mesh: known };
  try {
    const came = await fetch(address);
    if (!came.ok) return { name, mesh: undefined };
    const { mesh } = await readModelFile(memorySource(new Uint8Array(await came.arrayBuffer())));
    solids.set(address, mesh);
    return { name, mesh };
  } catch {
    return { name, mesh: undefined };
  }
}

async function compare(job: number, ask: number, around: Surroundings): Promise<void> {
  const fetched = await Promise.all((around.season?.meshKeepOuts ?? []).map(solidAt));
  if (kept?.job !== job || !kept.judged) return;
  const { mesh, measured } = kept.judged;
  answer({ kind: "compared", job, ask, comparison: compareModel(mesh, measured, around, fetched) });
}

async function turn(job: number, file: File | undefined): Promise<void> {
  const mesh = file ? (await readModelFile(blobSource(file))).mesh : kept?.job === job ? kept.judged?.mesh : undefined;
  if (!mesh) throw new Refusal("not-read", "The file is no longer there; choose it again.");
  const model = turnable(mesh);
  self.postMessage({ kind: "turnable", job, model } satisfies WorkerAnswer, {
    transfer: [model.positions.buffer, model.triangles.buffer, model.edges.buffer],
  });
}

async function work(request: WorkerRequest): Promise<void> {
  if (request.kind === "read") await read(request.job, request.file);
  if (request.kind === "measure") measure(request.job, request.mmPerUnit);
  if (request.kind === "turn") await turn(request.job, request.file);
  if (request.kind === "compare") await compare(request.job, request.ask, request.around);
}

function refuse(job: number, error: unknown): void {
  if (error instanceof Refusal) {
    const place = error.at === undefined ? "" : ` (at ${error.at})`;
    answer({ kind: "refused", job, code: error.code, message: error.message + place });
    return;
  }
  const message = error instanceof Error ? error.message : String(error);
  answer({ kind: "refused", job, code: "failed", message: `The reader stopped: ${message}` });
}

self.addEventListener("message", ({ data }: MessageEvent<WorkerRequest>) => {
  work(data).catch((error: unknown) => refuse(data.job, error));
});

answer({ kind: "ready" });
