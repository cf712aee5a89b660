import { setInterval } from "node:timers";
import { appDb } from "@/db/client/handles";
import { tellProgress, type UploadRow } from "@/db/queries/uploads";
import type { UploadProgress } from "@/lib/contracts/uploads";
import { Refusal } from "@/lib/science/refusal";
import { asLocalFile } from "@/lib/services/quarantine/quarantine";
import { readMeshFile, type MeshRead } from "../designs/read-mesh";
import { log } from "../log";
import type { Content } from "./content";

const tellEveryMs = 500;

/**
 * Reads a model's mesh in a thread, telling triangles as they are read; an upload that is cancelled meanwhile ends the
 * reading. Undefined for STEP, which is kept and not measured.
 * @throws Refusal with the reader's reason
 */
export async function measureModel(
  { id: uploadId, mmPerUnit }: Pick<UploadRow, "id" | "mmPerUnit">,
  content: Content,
): Promise<MeshRead | undefined> {
  if (content.kind !== "stl" && content.kind !== "3mf") return undefined;
  const stop = new AbortController();
  let progress: UploadProgress = { stage: "reading", trianglesRead: 0 };
  const tell = async (): Promise<void> => {
    if (!(await tellProgress(appDb(), { uploadId, progress }))) stop.abort();
  };
  await tell();
  const timer = setInterval(() => {
    tell().catch((error: unknown) => log().warn({ err: error, uploadId }, "progress of a reading"));
  }, tellEveryMs);
  try {
    return await asLocalFile(await content.open(), (file) =>
      readMeshFile(file, {
        signal: stop.signal,
        mmPerUnit: mmPerUnit ?? undefined,
        onProgress: (stage, trianglesRead, expected) => {
          progress = { stage, trianglesRead, ...(expected !== undefined && { trianglesExpected: expected }) };
        },
      }),
    );
  } catch (error) {
    if (error instanceof Refusal) throw error;
    // A file that breaks the reader would break it again: its sender is told, and the fault is ours to find in the log.
    log().error({ err: error, uploadId }, "the reader broke on a file");
    throw new Refusal("failed", "The reader stopped on this file; what it is about it we don't know yet.");
  } finally {
    clearInterval(timer);
  }
}
