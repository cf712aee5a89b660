import { idParams } from "@/lib/contracts/base";
import { fileTypes } from "@/lib/contracts/uploads";
import { fileAnswer } from "@/lib/http/file-answer";
import { route } from "@/lib/http/route";
import { findFile, removeFile } from "@/lib/server/designs/files";
import { openStored } from "@/lib/server/open-stored";

/** A file of a revision, as a download: whole, or the part that Range asks for. */
export const GET = route({ access: "public", params: idParams }, async ({ actor, params, request }) => {
  const file = await findFile(actor, { attachmentId: params.id });
  return fileAnswer(request, { ...file, type: fileTypes[file.kind] }, (part) => openStored(file, part));
});

/** Takes a file off a draft of one's own. */
export const DELETE = route({ access: "signed_in", params: idParams }, ({ actor, params, requestId }) =>
  removeFile({ actor, requestId }, { attachmentId: params.id }),
);
