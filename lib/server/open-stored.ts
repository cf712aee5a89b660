import type { Readable } from "node:stream";
import { storage } from "@/lib/services/storage/from-env";
import type { ByteRange } from "@/lib/services/storage/storage";

/** The bytes of a stored file, or a part of them. The caller has seen to who may have them. */
export async function openStored(
  { storageKey }: { storageKey: string },
  range: ByteRange | undefined,
): Promise<Readable> {
  return (await storage().get(storageKey, range)).body;
}
