import { randomBytes } from "node:crypto";
import { appDb } from "@/db/client/handles";
import type { Handle } from "@/db/client/connect";
import { sqlExecutor } from "@/db/client/executor";
import { sessionHead } from "@/db/queries/bench-sessions";
import { changeUpload, insertUpload, revisionForUpload, uploadBy, type UploadRow } from "@/db/queries/uploads";
import { uploadAnswer, uploadPurposes, type NewUpload, type UploadAnswer } from "@/lib/contracts/uploads";
import type { Person } from "@/lib/domain/accounts/actor";
import { ExpectedError } from "@/lib/domain/expected-error";
import { jobs } from "@/lib/services/jobs/from-env";
import { tusPath, tusServer } from "@/lib/services/quarantine/quarantine";
import { log } from "../log";
import { demand } from "../permission";

/**
 * Announces an upload and gives the one-use key under which its bytes may come, as long as was said and no longer. The
 * subject is a draft revision of one's own, or a session at the bench for logs and recordings.
 * @throws ExpectedError too_large, forbidden, not_found, moved_on for a revision that was sent in
 */
export async function beginUpload(
  actor: Person,
  input: NewUpload,
): Promise<{ uploadId: string; key: string; address: string }> {
  demand(actor, "upload.create");
  const { maxBytes } = uploadPurposes[input.purpose];
  if (input.bytes > maxBytes) {
    throw new ExpectedError("too_large", `At most ${maxBytes / 1_000_000} MB are taken for this.`, [
      { path: "bytes", message: "is too large" },
    ]);
  }
  await demandSubject(appDb(), actor, input);
  const key = randomBytes(24).toString("hex");
  const uploadId = await insertUpload(appDb(), { ...input, personId: actor.personId, quarantineKey: key });
  return { uploadId, key, address: tusPath };
}

async function demandSubject(db: Handle, actor: Person, { purpose, subjectId }: NewUpload): Promise<void> {
  if (purpose === "log" || purpose === "recording") {
    demand(actor, "bench.read");
    if (!(await sessionHead(db, { sessionId: subjectId })))
      throw new ExpectedError("not_found", "There is no such session.");
    return;
  }
  const revision = await revisionForUpload(db, { revisionId: subjectId, personId: actor.personId });
  // Somebody else's revision is answered like one that isn't there.
  if (!revision?.owned) throw new ExpectedError("not_found", "There is no such revision of yours.");
  if (revision.sentIn)
    throw new ExpectedError("moved_on", "The revision was sent in: changed files are a new revision.");
}

/** What became of one's own upload. */
export async function readUpload(actor: Person, { uploadId }: { uploadId: string }): Promise<UploadAnswer> {
  const row = await uploadBy(appDb(), { uploadId });
  if (!row || row.personId !== actor.personId)
    throw new ExpectedError("not_found", "There is no such upload of yours.");
  return uploadAnswer.parse({
    uploadId: row.id,
    purpose: row.purpose,
    name: row.name,
    bytes: row.bytes,
    state: row.state,
    progress: row.progress,
    reason: row.reason,
    fileId: row.state === "read" ? row.fileId : null,
    createdAt: row.createdAt.toISOString(),
  });
}

const refuses = (row: UploadRow | undefined, actor: Person, bytes?: number): string | undefined => {
  if (!row || row.personId !== actor.personId || row.state !== "sending") return "This upload was not announced.";
  return bytes === undefined || bytes === row.bytes ? undefined : "The length is not the one that was announced.";
};

/** Speaks tus for one request of somebody signed in; the key must be one's own and still open. */
export async function receivePiece(actor: Person, request: Request): Promise<Response> {
  const key = new URL(request.url).pathname.slice(tusPath.length + 1);
  if (key !== "") {
    const refusal = refuses(await uploadBy(appDb(), { quarantineKey: key }), actor);
    if (refusal) throw new ExpectedError("not_found", refusal);
  }
  const largest = Math.max(...Object.values(uploadPurposes).map((purpose) => purpose.maxBytes));
  const server = await tusServer(
    {
      mayBegin: async (begun, bytes) => refuses(await uploadBy(appDb(), { quarantineKey: begun }), actor, bytes ?? -1),
      finished: (done) => received(done),
    },
    largest,
  );
  return server.handleWeb(request);
}

/** All bytes are there: the job that reads them is sent in the same transaction that says so. */
async function received(key: string): Promise<void> {
  const queue = await jobs((error) => log().error({ err: error }, "job queue"));
  await appDb().transaction(async (tx) => {
    const row = await uploadBy(tx, { quarantineKey: key, lock: true });
    if (!row || row.state !== "sending") return;
    await changeUpload(tx, { uploadId: row.id, state: "received" });
    await queue.send("file-read", { uploadId: row.id }, { within: sqlExecutor(tx), onceBy: row.id });
  });
}
