import type { Worker } from "node:worker_threads";
import { meshDrawing, type MeshDrawing } from "@/lib/contracts/drawing";
import { meshReadingResult, type MeshReadingResult } from "@/lib/contracts/mesh-reading";
import type { Mesh } from "@/lib/science/geometry/mesh";
import type { ReadingLimits } from "@/lib/science/geometry/reading";
import { Refusal } from "@/lib/science/refusal";
import { hearThread } from "../threads/hear-thread";
import { startThread } from "../threads/run-thread";

export interface ThreadOrder {
  file: string;
  limits: Partial<ReadingLimits>;
  /** Said by a person; guessed from the size where left out and the file names none. */
  mmPerUnit?: number;
  /** Only read, in mm, and handed back. */
  meshAlone?: boolean;
}

export type ThreadAnswer =
  | { kind: "progress"; read: number; expected: number | undefined }
  | { kind: "measuring"; triangles: number }
  | { kind: "measured"; result: unknown }
  /** Follows `measured`. */
  | { kind: "drawn"; drawing: unknown }
  | { kind: "mesh"; mesh: Mesh }
  | { kind: "refused"; code: string; message: string };

/** What a file's mesh tells, and its drawing: null where that took too long or failed. */
export interface MeshRead {
  result: MeshReadingResult;
  drawing: MeshDrawing | null;
}

export interface MeshReadingControl {
  /** Told now and then; `measuring` once all triangles are read. */
  onProgress?: (stage: "reading" | "measuring", triangles: number, expected: number | undefined) => void;
  /** Ends the reading at once when it is aborted. */
  signal?: AbortSignal;
  /** For reading and measuring together. */
  withinMs?: number;
  limits?: Partial<ReadingLimits>;
  /** The unit that a person named, mm. */
  mmPerUnit?: number | undefined;
}

/** Time that reading and measuring one file may take, in ms: within the job's own limit of 300 s. */
export const meshTimeMaxMs = 180_000;
const modelBytesMax = 300_000_000;
/** Heap of the thread in MB; typed arrays lie outside it and are bounded by the limits on bytes and triangles. */
const heapMaxMb = 1_024;

/** Starts the thread that reads one file; whoever starts it ends it. */
export function startMeshThread(order: ThreadOrder): Worker {
  return startThread("lib/server/designs/read-mesh-thread.ts", order, heapMaxMb);
}

/**
 * Reads, measures and draws a model file in a thread of its own, in bounded time and memory; the process goes on whatever the
 * file does to the thread.
 *
 * @param file path of a file of this machine
 * @throws Refusal with the reader's reason; codes "cancelled", "time-limit" and "memory-limit" where it was ended
 */
export function readMeshFile(file: string, control: MeshReadingControl = {}): Promise<MeshRead> {
  const { onProgress, signal, withinMs = meshTimeMaxMs, limits = {}, mmPerUnit } = control;
  const bounds = { bytesMax: modelBytesMax, elapsedMsMax: withinMs, ...limits };
  const order: ThreadOrder = { file, limits: bounds, ...(mmPerUnit !== undefined && { mmPerUnit }) };
  let measured: MeshReadingResult | undefined;
  return hearThread<ThreadAnswer, MeshRead>(
    startMeshThread(order),
    { signal, withinMs, what: "model" },
    {
      onSaid(answer, { resolve, reject }) {
        if (answer.kind === "progress") onProgress?.("reading", answer.read, answer.expected);
        else if (answer.kind === "measuring") onProgress?.("measuring", answer.triangles, answer.triangles);
        else if (answer.kind === "refused") reject(new Refusal(answer.code, answer.message));
        else if (answer.kind === "mesh") reject(new Error("The thread handed back a mesh that nobody asked for."));
        else if (answer.kind === "drawn") {
          const parsed = meshDrawing.safeParse(answer.drawing);
          if (measured) resolve({ result: measured, drawing: parsed.success ? parsed.data : null });
        } else {
          const parsed = meshReadingResult.safeParse(answer.result);
          if (parsed.success) measured = parsed.data;
          else reject(parsed.error);
        }
      },
      // Once it is measured, what goes wrong goes wrong with the drawing alone.
      rescued: () => measured && { result: measured, drawing: null },
    },
  );
}
