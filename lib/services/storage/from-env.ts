import path from "node:path";
import { env } from "@/lib/env/env";
import { localFolderStorage } from "./local-folder";
import { s3Storage } from "./s3";
import type { Storage } from "./storage";

let kept: Storage | undefined;

/** The storage that the settings name: S3 when a bucket is set, else a folder of this machine. One a process. */
export function storage(): Storage {
  kept ??= build();
  return kept;
}

function build(): Storage {
  const { S3_BUCKET, S3_ENDPOINT, S3_REGION, S3_ACCESS_KEY_ID, S3_SECRET_ACCESS_KEY, DATA_DIR } = env();
  if (S3_BUCKET === undefined) return localFolderStorage(path.resolve(DATA_DIR ?? "data", "files"));
  return s3Storage({
    bucket: S3_BUCKET,
    region: S3_REGION,
    endpoint: S3_ENDPOINT,
    ...(S3_ACCESS_KEY_ID !== undefined &&
      S3_SECRET_ACCESS_KEY !== undefined && {
        credentials: { accessKeyId: S3_ACCESS_KEY_ID, secretAccessKey: S3_SECRET_ACCESS_KEY },
      }),
  });
}
