import { appDb } from "@/db/client/handles";
import type { Handle } from "@/db/client/connect";
import { insertDesign, insertRevision, lockOwnRevisions, type OwnRevisionRow } from "@/db/queries/own-designs";
import type { NewRevision } from "@/lib/contracts/own-designs";
import type { Actor } from "@/lib/domain/accounts/actor";
import { slugOf } from "@/lib/domain/designs/slug";
import { nextLetter } from "@/lib/domain/designs/letters";
import { ExpectedError } from "@/lib/domain/expected-error";
import { note, type Asked } from "../audit/audit";
import { demand } from "../permission";

/** Makes a design that its maker owns. Its slug comes from the name and is for ever. */
export async function makeDesign(asked: Asked, input: { name: string; summary: string }): Promise<{ slug: string }> {
  const { actor } = asked;
  demand(actor, "design.create");
  const slug = slugOf(input.name);
  await appDb().transaction(async (tx) => {
    const id = await insertDesign(tx, { ...input, slug, personId: actor.personId });
    if (id === undefined) {
      throw new ExpectedError("already_there", "There is a design of that name already. Choose another.", [
        { path: "name", message: "is taken" },
      ]);
    }
    await note(tx, asked, { action: "design.make", subjectKind: "design", subjectId: id });
  });
  return { slug };
}

/** Holds a design of the actor's own. @throws ExpectedError not_found for another's design as for none */
export async function ownRevisions(
  tx: Handle,
  actor: Actor,
  slug: string,
): Promise<{ designId: string; revisions: OwnRevisionRow[]; personId: string }> {
  demand(actor, "design.create");
  const found = await lockOwnRevisions(tx, { slug, personId: actor.personId });
  if (!found) throw new ExpectedError("not_found", "You own no such design.");
  demand(actor, "design.edit", { ownsDesign: true });
  return { ...found, personId: actor.personId };
}

/** Adds the next revision with its declared traits; one that wasn't sent in yet comes first. */
export async function addRevision(
  asked: Asked,
  { slug, revision }: { slug: string; revision: NewRevision },
): Promise<{ letter: string }> {
  return appDb().transaction(async (tx) => {
    const { designId, revisions } = await ownRevisions(tx, asked.actor, slug);
    const last = revisions.at(-1);
    if (last && last.sentInAt === null) {
      throw new ExpectedError(
        "moved_on",
        `Revision ${last.letter} wasn't sent in yet: send it in before the next one.`,
      );
    }
    const letter = nextLetter(last?.letter);
    const revisionId = await insertRevision(tx, { designId, letter, revision });
    await note(tx, asked, { action: "revision.add", subjectKind: "revision", subjectId: revisionId });
    return { letter };
  });
}
