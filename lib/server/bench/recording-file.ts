import { appDb } from "@/db/client/handles";
import { insertListened, type RecordingRow } from "@/db/queries/recordings";
import { ExpectedError } from "@/lib/domain/expected-error";
import type { Actor } from "@/lib/domain/accounts/actor";
import { note, type Asked } from "../audit/audit";
import { demandRecording } from "./recordings";

/** Notes that this person listened to a recording and heard no voices: from then on its bytes may be served. */
export async function tickListened(
  asked: Asked,
  { recordingId, now }: { recordingId: string; now: Date },
): Promise<void> {
  await appDb().transaction(async (tx) => {
    const { row, person } = await demandRecording(tx, asked, { recordingId, lock: true });
    if (row.listenedAt !== null) return;
    await insertListened(tx, { recordingId, byPerson: person.personId, at: now });
    await note(tx, asked, { action: "recording.listened", subjectKind: "recording", subjectId: recordingId });
  });
}

/** A recording whose bytes may be served. @throws ExpectedError moved_on before somebody listened; gone; not_found */
export async function findRecordingFile(actor: Actor, { recordingId }: { recordingId: string }): Promise<RecordingRow> {
  const { row } = await demandRecording(appDb(), { actor, requestId: null }, { recordingId });
  if (row.fileState === "taken_down") throw new ExpectedError("gone", "This recording was taken down.");
  if (row.listenedAt === null) {
    throw new ExpectedError("moved_on", "A recording is served once somebody listened to it and heard no voices.");
  }
  return row;
}
