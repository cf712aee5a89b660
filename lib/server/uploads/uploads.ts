import { randomBytes } from "node:crypto";
import { appDb } from "@/db/client/handles";
import type { Handle } from "@/db/client/connect";
import { sqlExecutor } from "@/db/client/executor";
import { sessionHead } from "@/db/queries/bench-sessions";
import {
  changeUpload,
  endUpload,
  insertUpload,
  revisionForUpload,
  uploadBy,
  uploadsOf,
  type UploadRow,
} from "@/db/queries/uploads";
import { uploadAnswer, uploadPurposes, type NewUpload, type UploadAnswer } from "@/lib/contracts/uploads";
import type { Person } from "@/lib/domain/accounts/actor";
import { ExpectedError } from "@/lib/domain/expected-error";
import { jobs } from "@/lib/services/jobs/from-env";
import {
  dropQuarantined,
  openQuarantine,
  pieceBytes,
  quarantinedBytes,
  tusPath,
  tusServer,
} from "@/lib/services/quarantine/quarantine";
import { log } from "../log";
import { demand } from "../permission";

/**
 * Announces an upload and gives the one-use key under which its bytes may come, as long as was said and no longer. The
 * subject is a draft revision of one's own, or a session at the bench for logs and recordings.
 * @returns the upload's id and the address that its bytes are sent to by tus
 * @throws ExpectedError too_large, forbidden, not_found, moved_on for a revision that was sent in
 */
export async function beginUpload(
  actor: Person,
  input: NewUpload,
): Promise<{ uploadId: string; address: string; pieceBytes: number }> {
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
  await openQuarantine(key, input.bytes);
  return { uploadId, address: `${tusPath}/${key}`, pieceBytes };
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

async function ownUpload(actor: Person, uploadId: string): Promise<UploadRow> {
  const row = await uploadBy(appDb(), { uploadId });
  if (!row || row.personId !== actor.personId)
    throw new ExpectedError("not_found", "There is no such upload of yours.");
  return row;
}

/** What became of one's own upload. */
export async function readUpload(actor: Person, { uploadId }: { uploadId: string }): Promise<UploadAnswer> {
  return toAnswer(await ownUpload(actor, uploadId));
}

/** One's own uploads for a subject that aren't finished, newest first: what can be come back to. */
export async function openUploads(actor: Person, { subjectId }: { subjectId: string }): Promise<UploadAnswer[]> {
  const rows = await uploadsOf(appDb(), { personId: actor.personId, subjectId });
  return Promise.all(rows.map(toAnswer));
}

/** The file's own id is told to nobody: it is as old as the first upload of the same content. */
async function toAnswer(row: UploadRow): Promise<UploadAnswer> {
  const { attachmentId, ...progress } = row.progress;
  const sent = row.state === "sending" ? ((await quarantinedBytes(row.quarantineKey)) ?? 0) : row.bytes;
  return uploadAnswer.parse({
    uploadId: row.id,
    purpose: row.purpose,
    name: row.name,
    bytes: row.bytes,
    sentBytes: sent,
    address: row.state === "sending" ? `${tusPath}/${row.quarantineKey}` : null,
    state: row.state,
    progress,
    reason: row.reason,
    attachmentId: attachmentId ?? null,
    createdAt: row.createdAt.toISOString(),
  });
}

/** Breaks one's own upload off, also while its file is being read. @throws ExpectedError moved_on when it is finished */
export async function cancelUpload(actor: Person, { uploadId, now }: { uploadId: string; now: Date }): Promise<void> {
  const row = await ownUpload(actor, uploadId);
  const broken = await endUpload(appDb(), { uploadId, reason: "It was cancelled.", finishedAt: now });
  if (!broken) throw new ExpectedError("moved_on", "The upload is finished; there is nothing left to cancel.");
  await dropQuarantined(row.quarantineKey);
}

let speaking: ReturnType<typeof tusServer> | undefined;

/** Speaks tus for one request of somebody signed in; the key must be one's own and still open. */
export async function receivePiece(actor: Person, request: Request): Promise<Response> {
  const key = new URL(request.url).pathname.slice(tusPath.length + 1);
  if (key === "")
    throw new ExpectedError("not_found", "An upload is announced first; its address comes with the answer.");
  const row = await uploadBy(appDb(), { quarantineKey: key });
  if (!row || row.personId !== actor.personId) throw new ExpectedError("not_found", "This upload was not announced.");
  const whole = row.state === "received" || row.state === "read";
  if (whole && request.method === "HEAD") return allThere(row.bytes);
  if (row.state !== "sending") throw new ExpectedError("not_found", "This upload is over; its address is spent.");
  if (Number(request.headers.get("content-length") ?? 0) > pieceBytes) {
    throw new ExpectedError("too_large", `Send pieces of at most ${pieceBytes / 1_000_000} MB.`);
  }
  speaking ??= tusServer(received, (error) => log().error({ err: error }, "tus"));
  const answer = await (await speaking).handleWeb(request);
  // The last piece was kept and its end not noted, by a crash in between: asking where it stands makes up for it.
  if (request.method === "HEAD" && answer.headers.get("upload-offset") === String(row.bytes)) await received(key);
  return answer;
}

/** For a sender who didn't hear that its last piece came. */
function allThere(bytes: number): Response {
  return new Response(null, {
    headers: {
      "tus-resumable": "1.0.0",
      "cache-control": "no-store",
      "upload-offset": String(bytes),
      "upload-length": String(bytes),
    },
  });
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
