import { publicDb } from "@/db/client/handles";
import { namesOfEntries, type NamedEntry } from "@/db/queries/shown/entry-names";
import { studyChoices, studyEntries } from "@/db/queries/shown/study";
import type { OwnDesign } from "@/lib/contracts/own-designs";
import type { Actor } from "@/lib/domain/accounts/actor";
import { fieldOf, type Field } from "@/lib/domain/study/field";
import type { OutcomeKey } from "@/lib/domain/study/outcomes";
import type { StudyEntry } from "@/lib/domain/study/study-entry";
import { readOwnDesign } from "../designs/own-designs";
import { seasonSlugs } from "./choices";
import { oneView } from "./compute-study";

export interface FieldRead {
  design: OwnDesign;
  /** Frame size and rotation that make the class; undefined while nothing of the design is public. */
  className: { frame: string; rotation: string } | undefined;
  field: Field | undefined;
  names: Record<string, NamedEntry>;
}

const rotationOf = (entry: StudyEntry) => (entry.stages === 1 ? "single" : entry.counterRotating ? "counter" : "co");
const letterFirst = (a: string, b: string) => a.length - b.length || (a < b ? -1 : 1);

/**
 * A designer's own public entries against those of their class: the frame's size and the rotation, in the last three
 * seasons and that of its newest entry (house rule, no source). Only what is public is read, the design's own entries from all seasons.
 *
 * @throws ExpectedError not_found for another's design as for none
 */
export async function readField(actor: Actor, asked: { slug: string; outcome: OutcomeKey }): Promise<FieldRead> {
  const design = await readOwnDesign(actor, asked);
  const ids = design.entries.map(({ entryId }) => entryId);
  const db = publicDb();
  const ownNames = await namesOfEntries(db, { entryIds: ids });
  const none = { design, className: undefined, field: undefined, names: {} };
  if (ownNames.length === 0) return none;
  const letterOf = new Map(ownNames.map((each) => [each.entryId, each.letter]));
  const { own, field, className } = await oneView(async (view) => {
    const counted = await studyChoices(view);
    const entryIds = [...letterOf.keys()];
    const ownEntries = await studyEntries(view, { frames: [], rotations: [], seasons: [], entryIds });
    ownEntries.sort(
      (a, b) =>
        a.seasonNumber - b.seasonNumber ||
        letterFirst(letterOf.get(a.entryId) ?? "", letterOf.get(b.entryId) ?? "") ||
        a.roundNumber - b.roundNumber,
    );
    const latest = ownEntries.at(-1);
    if (!latest) return { own: [], field: [], className: undefined };
    const frame = latest.frameKey.split("x")[0] ?? latest.frameKey;
    const rotation = rotationOf(latest);
    const itsOwn = counted.find(({ seasonNumber }) => seasonNumber === latest.seasonNumber)?.season;
    const seasons = [...new Set([...(seasonSlugs("last-3", counted) ?? []), ...(itsOwn ? [itsOwn] : [])])];
    return {
      own: ownEntries,
      className: { frame, rotation },
      field: await studyEntries(view, { frames: [frame], rotations: [rotation], seasons }),
    };
  });
  const found = fieldOf(own, field, asked.outcome);
  const shown = [...own.map(({ entryId }) => entryId), ...(found?.neighbours ?? []).map(({ entryId }) => entryId)];
  const names = await namesOfEntries(db, { entryIds: shown });
  return { design, className, field: found, names: Object.fromEntries(names.map((each) => [each.entryId, each])) };
}
