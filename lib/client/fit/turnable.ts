import type { Turnable } from "@/lib/science/geometry/drawing/turnable";
import { ApiError } from "../fetcher";
import type { WorkerAnswer, WorkerRequest } from "./messages";

export type { Turnable };

export const makeMeshWorker = (): Worker => new Worker(new URL("../workers/mesh-reader.worker.ts", import.meta.url));

export interface LoadingModel {
  /** Bytes that came so far. */
  readonly onBytes: (bytes: number) => void;
  readonly signal: AbortSignal;
}

/** Takes a public model file and makes it ready to be turned, in a worker. @throws ApiError with what went wrong */
export async function loadTurnable(
  address: string,
  name: string,
  { onBytes, signal }: LoadingModel,
): Promise<Turnable> {
  const answer = await fetch(address, { signal });
  if (!answer.ok || !answer.body) {
    throw new ApiError("unexpected", `The file could not be fetched (${answer.status}). Try again in a moment.`);
  }
  const parts: Uint8Array<ArrayBuffer>[] = [];
  let bytes = 0;
  const reader = answer.body.getReader();
  for (let piece = await reader.read(); !piece.done; piece = await reader.read()) {
    parts.push(piece.value);
    bytes += piece.value.length;
    onBytes(bytes);
  }
  const worker = makeMeshWorker();
  try {
    return await new Promise<Turnable>((resolve, reject) => {
      signal.addEventListener("abort", () => reject(new ApiError("offline", "Put away.")));
      worker.addEventListener("message", ({ data }: MessageEvent<WorkerAnswer>) => {
        if (data.kind === "turnable") resolve(data.model);
        if (data.kind === "refused") reject(new ApiError("unexpected", data.message));
      });
      worker.addEventListener("error", () => reject(new ApiError("unexpected", "The reader didn’t start.")));
      const request: WorkerRequest = { kind: "turn", job: 1, file: new File(parts, name) };
      worker.postMessage(request);
    });
  } finally {
    worker.terminate();
  }
}
