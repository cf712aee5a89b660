import type { CarryChoices } from "@/lib/contracts/carry";
import { isPerson, type Actor } from "@/lib/domain/accounts/actor";
import { may } from "@/lib/domain/accounts/policy";
import { nextLetter } from "@/lib/domain/designs/letters";
import { readOwnChoices, readOwnDesigns } from "./own-designs";

/** One's own designs with the draft of each, or the revision that comes next; null for who may make none. */
export async function readCarryChoices(actor: Actor): Promise<CarryChoices | null> {
  if (!isPerson(actor) || !may(actor, "design.create")) return null;
  const [{ items }, { frames }] = await Promise.all([readOwnDesigns(actor), readOwnChoices(actor)]);
  return {
    frames,
    designs: items.map(({ slug, name, revisions }) => {
      const last = revisions.at(-1);
      const draft = last !== undefined && last.sentInAt === null;
      return { slug, name, draft, letter: draft ? last.letter : nextLetter(last?.letter) };
    }),
  };
}
