import { randomBytes } from "node:crypto";
import type { Knex } from "knex";

/** A draft revision of a design of somebody's own, with the traits that a person declared. */
export async function draftRevision(owner: Knex, email: string): Promise<{ revisionId: string; slug: string }> {
  const person = await owner("person").where({ email }).first("id");
  const slug = `draft-${randomBytes(4).toString("hex")}`;
  const [design] = await owner("design").insert({ slug, name: slug, created_by: person.id }).returning("id");
  await owner("design_owner").insert({ design_id: design.id, person_id: person.id });
  const [revision] = await owner("revision")
    .insert({ design_id: design.id, letter: "A", licence: "CC-BY-4.0" })
    .returning("id");
  const frame = await owner("frame").where({ class_mm: 120 }).first("id");
  await owner("revision_trait").insert({ revision_id: revision.id, stages: 1, frame_id: frame.id, material: "PLA" });
  await owner("rotor").insert({ revision_id: revision.id, position: 1, blades: 5, hand: "left" });
  return { revisionId: String(revision.id), slug };
}
