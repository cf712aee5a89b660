import { idParams } from "@/lib/contracts/base";
import { fileTypes } from "@/lib/contracts/uploads";
import { fileAnswer } from "@/lib/http/file-answer";
import { route } from "@/lib/http/route";
import { findRecordingFile } from "@/lib/server/bench/recording-file";
import { openStored } from "@/lib/server/open-stored";

/** A recording as it was received, once somebody listened to it: whole, or the part that Range asks for. */
export const GET = route({ access: "signed_in", params: idParams }, async ({ actor, params, request }) => {
  const row = await findRecordingFile(actor, { recordingId: params.id });
  const file = { name: row.name, bytes: row.bytes, sha256: row.sha256, type: fileTypes.wav };
  return fileAnswer(request, file, (part) => openStored(row, part));
});
