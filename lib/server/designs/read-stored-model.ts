import { appDb } from "@/db/client/handles";
import { storedModel } from "@/db/queries/mesh-readings";
import { Refusal } from "@/lib/science/refusal";
import { asLocalFile } from "@/lib/services/quarantine/quarantine";
import { storage } from "@/lib/services/storage/from-env";
import { log } from "../log";
import { keepReading } from "./keep-reading";
import { readMeshFile } from "./read-mesh";

/**
 * Reads a model that is kept already, and keeps what it tells with its drawing. Nothing for a file that isn't there or
 * was taken down; one that can't be read is noted in the log. Working it twice does nothing the second time.
 */
export async function readStoredModel(fileId: string): Promise<void> {
  const file = await storedModel(appDb(), { fileId });
  if (!file) return;
  try {
    const { body } = await storage().get(file.storageKey);
    const read = await asLocalFile(body, (path) => readMeshFile(path));
    await appDb().transaction((tx) => keepReading(tx, fileId, read));
  } catch (error) {
    if (!(error instanceof Refusal)) throw error;
    log().warn({ fileId, code: error.code }, "a stored model can't be read");
  }
}
