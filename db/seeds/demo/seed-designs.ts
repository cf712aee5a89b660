import type { Knex } from "knex";
import type { DemoDesign, DemoRevision } from "./world";

const generatorSays = { declared_by: "the demo's generator" };

function traitRow(revision: DemoRevision, revisionId: string, frames: Map<string, string>) {
  const { fan } = revision;
  return {
    revision_id: revisionId,
    stages: fan.rotors.length,
    counter_rotating: fan.counterRotating,
    spacer_mm: fan.spacerMm,
    inlet_stack: fan.inletStack,
    inlet_stack_mm: fan.inletStackMm,
    struts: fan.struts,
    frame_id: frames.get(revision.frameKey),
    tip_gap_mm: fan.tipGapMm,
    material: revision.material,
    print_time_min: revision.printTimeMin,
    holds: generatorSays,
  };
}

function rotorRows(revision: DemoRevision, revisionId: string) {
  return revision.fan.rotors.map((rotor, i) => ({
    revision_id: revisionId,
    position: i + 1,
    blades: rotor.blades,
    hand: rotor.hand,
    hub_diameter_mm: rotor.hubDiameterMm,
    tip_diameter_mm: rotor.tipDiameterMm,
    swept_diameter_mm: rotor.tipDiameterMm,
    axial_depth_mm: rotor.axialDepthMm,
    pitch_mid_deg: rotor.pitchMidDeg,
    chord_mid_mm: rotor.chordMidMm,
    solidity_mid: rotor.solidityMid,
    shroud: rotor.shroud,
    mass_g: rotor.massG,
    holds: generatorSays,
  }));
}

/** Writes designs with all their revisions, in chunks. @returns revision ids */
export async function seedDesigns(
  db: Knex,
  designs: readonly DemoDesign[],
  people: Map<string, string>,
  frames: Map<string, string>,
): Promise<Map<DemoRevision, string>> {
  const ids = new Map<DemoRevision, string>();
  const createdAt = new Date("2024-12-20T12:00:00Z");
  for (let from = 0; from < designs.length; from += 500) {
    const chunk = designs.slice(from, from + 500);
    const made: { id: string; slug: string }[] = await db("design")
      .insert(
        chunk.map((design) => ({
          slug: design.slug,
          name: design.name,
          created_by: people.get(design.owner),
          created_at: createdAt,
          summary: "Invented for the demo.",
        })),
      )
      .returning(["id", "slug"]);
    const idBySlug = new Map(made.map((row) => [row.slug, row.id]));
    await db("design_owner").insert(
      chunk.map((design) => ({
        design_id: idBySlug.get(design.slug),
        person_id: people.get(design.owner),
        from_at: createdAt,
      })),
    );
    const revisionRows = chunk.flatMap((design) => design.revisions.map((revision) => ({ design, revision })));
    const madeRevisions: { id: string; design_id: string; letter: string }[] = await db("revision")
      .insert(
        revisionRows.map(({ design, revision }) => ({
          design_id: idBySlug.get(design.slug),
          letter: revision.letter,
          licence: revision.licence,
          changes: revision.changes,
          print_notes: "0.16 mm layers, 4 walls, hub down, no supports.",
          created_at: createdAt,
        })),
      )
      .returning(["id", "design_id", "letter"]);
    const byKey = new Map(madeRevisions.map((row) => [`${row.design_id} ${row.letter}`, row.id]));
    for (const { design, revision } of revisionRows) {
      const id = byKey.get(`${idBySlug.get(design.slug)} ${revision.letter}`);
      if (!id) throw new Error(`no revision ${revision.letter} of ${design.slug} came back`);
      ids.set(revision, id);
    }
    const idOf = (revision: DemoRevision): string => ids.get(revision) ?? "";
    await db.batchInsert(
      "revision_trait",
      revisionRows.map(({ revision }) => traitRow(revision, idOf(revision), frames)),
      500,
    );
    await db.batchInsert(
      "rotor",
      revisionRows.flatMap(({ revision }) => rotorRows(revision, idOf(revision))),
      500,
    );
    const derivations = chunk.flatMap((design) =>
      design.revisions.slice(1).map((revision, i) => ({
        revision_id: ids.get(revision),
        from_revision_id: idOf(design.revisions[i] ?? revision),
        note: revision.changes,
      })),
    );
    if (derivations.length > 0) await db.batchInsert("derivation", derivations, 500);
  }
  return ids;
}
