import { idParams } from "@/lib/contracts/base";
import { fileTypes } from "@/lib/contracts/uploads";
import { fileAnswer } from "@/lib/http/file-answer";
import { route } from "@/lib/http/route";
import { findSessionFile } from "@/lib/server/reading/session-files";
import { openStored } from "@/lib/server/open-stored";

/** A log or recording behind published figures, as it was received: whole, or the part that Range asks for. */
export const GET = route({ access: "public", params: idParams }, async ({ params, request }) => {
  const file = await findSessionFile({ fileId: params.id });
  const [name, type] = file.kind === "recording" ? ["recording.wav", fileTypes.wav] : ["log.csv", fileTypes.csv];
  return fileAnswer(request, { ...file, name: `${file.id}-${name}`, type }, (part) => openStored(file, part));
});
