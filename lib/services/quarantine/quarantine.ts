import { createReadStream } from "node:fs";
import { mkdir, rm, stat } from "node:fs/promises";
import path from "node:path";
import type { Readable } from "node:stream";
import { FileStore } from "@tus/file-store";
import { S3Store } from "@tus/s3-store";
import { Server, type DataStore } from "@tus/server";
import { env } from "@/lib/env/env";

/** Largest piece that one request carries; the web server in front buffers no more than this. */
export const pieceBytes = 8_000_000;

export interface QuarantineRules {
  /** Whether an upload with this key and length may begin; a text refuses it. */
  mayBegin(key: string, bytes: number | undefined): Promise<string | undefined>;
  /** All bytes are there. */
  finished(key: string): Promise<void>;
}

/** The path under which the open protocol for resumable uploads (tus 1.0.0) is spoken. */
export const tusPath = "/api/v1/uploads/tus";

function folder(): string {
  return path.resolve(env().DATA_DIR ?? "data", "quarantine");
}

async function store(): Promise<DataStore> {
  const settings = env();
  if (settings.S3_BUCKET === undefined) {
    await mkdir(folder(), { recursive: true });
    return new FileStore({ directory: folder() });
  }
  return new S3Store({
    partSize: pieceBytes,
    s3ClientConfig: {
      bucket: settings.S3_BUCKET,
      region: settings.S3_REGION,
      forcePathStyle: true,
      ...(settings.S3_ENDPOINT && { endpoint: settings.S3_ENDPOINT }),
      ...(settings.S3_ACCESS_KEY_ID &&
        settings.S3_SECRET_ACCESS_KEY && {
          credentials: { accessKeyId: settings.S3_ACCESS_KEY_ID, secretAccessKey: settings.S3_SECRET_ACCESS_KEY },
        }),
    },
  });
}

/** A server of tus over web requests; keys come from us, and an upload begins only as the rules allow. */
export async function tusServer(rules: QuarantineRules, maxBytes: number): Promise<Server> {
  return new Server({
    path: tusPath,
    datastore: await store(),
    relativeLocation: true,
    respectForwardedHeaders: false,
    maxSize: maxBytes,
    namingFunction: (_request, metadata) => metadata?.key ?? "",
    async onUploadCreate(_request, upload) {
      const refusal = await rules.mayBegin(upload.id, upload.size);
      if (refusal !== undefined) throw { status_code: 403, body: refusal };
      return {};
    },
    async onUploadFinish(_request, upload) {
      await rules.finished(upload.id);
      return {};
    },
  });
}

/** The bytes of a finished upload, as often as they are asked for. */
export async function quarantined(key: string): Promise<{ open: () => Promise<Readable>; bytes: number }> {
  const from = await store();
  if (from instanceof S3Store) {
    const upload = await from.getUpload(key);
    return { open: async () => (await from.read(key)) as Readable, bytes: upload.size ?? 0 };
  }
  const file = path.join(folder(), key);
  return { open: async () => createReadStream(file), bytes: (await stat(file)).size };
}

/** Forgets an upload's bytes; what is not there is no error. */
export async function dropQuarantined(key: string): Promise<void> {
  const from = await store();
  if (from instanceof S3Store) await from.remove(key).catch(() => undefined);
  else {
    await rm(path.join(folder(), key), { force: true });
    await rm(path.join(folder(), `${key}.json`), { force: true });
  }
}
