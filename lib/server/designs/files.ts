import { appDb, publicDb } from "@/db/client/handles";
import { attachedFile, dropAttachment, shownFile, type AttachedFile } from "@/db/queries/files";
import { isPerson, type Actor } from "@/lib/domain/accounts/actor";
import { may } from "@/lib/domain/accounts/policy";
import { ExpectedError } from "@/lib/domain/expected-error";
import { note, type Asked } from "../audit/audit";

const missing = (): ExpectedError => new ExpectedError("not_found", "There is no such file.");

/**
 * A file that the actor may have: of a published revision everybody, before that its design's owners and the staff.
 * @throws ExpectedError not_found, alike for none and for one that isn't theirs; gone with date and reason
 */
export async function findFile(actor: Actor, { attachmentId }: { attachmentId: string }): Promise<AttachedFile> {
  const file = (await shownFile(publicDb(), { attachmentId })) ?? (await unpublished(actor, attachmentId));
  if (file.state === "taken_down") {
    const day = file.takenDownAt?.toISOString().slice(0, 10) ?? "";
    throw new ExpectedError("gone", `This file was taken down on ${day}: ${file.reason ?? "no reason was given"}`);
  }
  if (file.state !== "read") throw missing();
  return file;
}

async function unpublished(actor: Actor, attachmentId: string) {
  if (!isPerson(actor)) throw missing();
  const file = await attachedFile(appDb(), { attachmentId, personId: actor.personId });
  if (!file || !may(actor, "design.read", { ownsDesign: file.ownsDesign })) throw missing();
  return file;
}

/** Takes a file off a draft of one's own. @throws ExpectedError not_found; moved_on once the revision was sent in */
export async function removeFile(asked: Asked, { attachmentId }: { attachmentId: string }): Promise<void> {
  const { actor } = asked;
  await appDb().transaction(async (tx) => {
    const file = isPerson(actor) ? await attachedFile(tx, { attachmentId, personId: actor.personId }) : undefined;
    if (!file || !may(actor, "design.edit", { ownsDesign: file.ownsDesign })) throw missing();
    if (file.sentIn) throw new ExpectedError("moved_on", "The revision was sent in: changed files are a new revision.");
    await dropAttachment(tx, { attachmentId });
    await note(tx, asked, { action: "file.remove", subjectKind: "revision", subjectId: file.revisionId });
  });
}
