import type { NewRevision, OwnChoices } from "@/lib/contracts/own-designs";
import type { EntryState } from "@/lib/domain/designs/entry-moves";
import type { Handle } from "../client/connect";

export interface OwnDesignRow {
  designId: string;
  name: string;
  slug: string;
  summary: string;
  isPublic: boolean;
  revisions: {
    letter: string;
    licence: string;
    changes: string;
    printNotes: string;
    sentInAt: string | null;
    frameKey: string;
    material: string;
    stages: number;
    rotors: { position: number; blades: number; hand: string }[];
  }[];
  entries: {
    entryId: string;
    letter: string;
    seasonNumber: number;
    seasonTitle: string;
    state: EntryState;
    everPublished: boolean;
    stateAt: string;
    reason: string | null;
  }[];
}

/** Designs that a person owns today with revisions and states of entries, by name; with a slug that one alone. */
export async function ownDesignRows(
  db: Handle,
  { personId, slug }: { personId: string; slug?: string },
): Promise<OwnDesignRow[]> {
  const { rows }: { rows: OwnDesignRow[] } = await db.raw(
    `select d.id as "designId", d.name, d.slug, d.summary,
       exists (select 1 from published_entry p where p.design_id = d.id) as "isPublic",
       coalesce((select jsonb_agg(jsonb_build_object('letter', r.letter, 'licence', r.licence, 'changes', r.changes,
           'printNotes', r.print_notes, 'sentInAt', r.sent_in_at, 'frameKey', f.key, 'material', t.material, 'stages', t.stages,
           'rotors', (select jsonb_agg(jsonb_build_object('position', o.position, 'blades', o.blades, 'hand', o.hand)
             order by o.position) from rotor o where o.revision_id = r.id)) order by length(r.letter), r.letter)
         from revision r join revision_trait t on t.revision_id = r.id join frame f on f.id = t.frame_id
         where r.design_id = d.id), '[]') as revisions,
       coalesce((select jsonb_agg(jsonb_build_object('entryId', e.id, 'letter', r.letter, 'seasonNumber', s.number,
           'seasonTitle', s.title, 'state', e.state, 'everPublished', e.ever_published, 'stateAt', e.state_at,
           'reason', (select m.reason from entry_move m where m.entry_id = e.id order by m.at desc, m.id desc limit 1))
           order by s.number desc, r.letter desc)
         from entry e join revision r on r.id = e.revision_id join season s on s.id = e.season_id
         where r.design_id = d.id), '[]') as entries
     from design d join design_owner w on w.design_id = d.id and w.until_at is null
     where w.person_id = :personId and (:slug::text is null or d.slug = :slug::text) order by d.name, d.id`,
    { personId, slug: slug ?? null },
  );
  return rows;
}

/** Seasons that take entries, and the frames that there are. */
export async function ownChoiceRows(db: Handle): Promise<OwnChoices> {
  const seasons = await db("season")
    .whereNotNull("opened_at")
    .whereNull("closed_at")
    .orderBy("number", "desc")
    .select<{ seasonId: string; title: string }[]>("id as seasonId", "title");
  const frames = await db("frame").orderBy(["outer_mm", "depth_mm"]).select<{ id: string; key: string }[]>("id", "key");
  return { seasons, frames };
}

/** Makes a design with its owner. @returns undefined when the slug is taken */
export async function insertDesign(
  db: Handle,
  design: { name: string; slug: string; summary: string; personId: string },
): Promise<string | undefined> {
  const [row]: { id: string }[] = await db("design")
    .insert({ name: design.name, slug: design.slug, summary: design.summary, created_by: design.personId })
    .onConflict("slug")
    .ignore()
    .returning("id");
  if (!row) return undefined;
  await db("design_owner").insert({ design_id: row.id, person_id: design.personId });
  return row.id;
}

export interface OwnRevisionRow {
  revisionId: string;
  designId: string;
  letter: string;
  sentInAt: Date | null;
}

/** Revisions of a design that a person owns today, the first first; the design's row is held. Undefined: not theirs. */
export async function lockOwnRevisions(
  db: Handle,
  { slug, personId }: { slug: string; personId: string },
): Promise<{ designId: string; revisions: OwnRevisionRow[] } | undefined> {
  const design = await db("design as d")
    .join("design_owner as w", "w.design_id", "d.id")
    .where({ "d.slug": slug, "w.person_id": personId })
    .whereNull("w.until_at")
    .forUpdate("d")
    .first<{ id: string } | undefined>("d.id");
  if (!design) return undefined;
  const revisions = await db("revision")
    .where({ design_id: design.id })
    .orderByRaw("length(letter), letter")
    .select<OwnRevisionRow[]>({
      revisionId: "id",
      designId: "design_id",
      letter: "letter",
      sentInAt: "sent_in_at",
    });
  return { designId: design.id, revisions };
}

/** Writes a revision with what is declared of it; every trait holds as declared until a mesh is read. */
export async function insertRevision(
  db: Handle,
  { designId, letter, revision }: { designId: string; letter: string; revision: NewRevision },
): Promise<string> {
  const { rotors, ...traits } = revision.traits;
  const [row]: { id: string }[] = await db("revision")
    .insert({
      design_id: designId,
      letter,
      licence: revision.licence,
      changes: revision.changes,
      print_notes: revision.printNotes,
    })
    .returning("id");
  if (!row) throw new Error("no revision came back");
  await db("revision_trait").insert({
    revision_id: row.id,
    stages: rotors.length,
    counter_rotating: traits.counterRotating,
    spacer_mm: traits.spacerMm,
    inlet_stack: traits.inletStack,
    inlet_stack_mm: traits.inletStackMm,
    struts: traits.struts,
    frame_id: traits.frameId,
    tip_gap_mm: traits.tipGapMm ?? null,
    material: traits.material,
    print_time_min: traits.printTimeMin ?? null,
    traits_declared: JSON.stringify(traits),
    holds: JSON.stringify({ all: "declared" }),
  });
  await db("rotor").insert(
    rotors.map((rotor, i) => ({
      revision_id: row.id,
      position: i + 1,
      blades: rotor.blades,
      hand: rotor.hand,
      hub_diameter_mm: rotor.hubDiameterMm ?? null,
      tip_diameter_mm: rotor.tipDiameterMm ?? null,
      pitch_mid_deg: rotor.pitchMidDeg ?? null,
      solidity_mid: rotor.solidityMid ?? null,
      shroud: rotor.shroud,
      mass_g: rotor.massG ?? null,
      traits_declared: JSON.stringify(rotor),
      holds: JSON.stringify({ all: "declared" }),
    })),
  );
  return row.id;
}

/** What a season asks of a revision that is sent in. */
export async function seasonFit(
  db: Handle,
  { seasonId, revisionId }: { seasonId: string; revisionId: string },
): Promise<{ open: boolean; frame: boolean; stack: boolean } | undefined> {
  const { rows }: { rows: { open: boolean; frame: boolean; stack: boolean }[] } = await db.raw(
    `select s.opened_at is not null and s.closed_at is null as open,
       exists (select 1 from season_frame f where f.season_id = s.id and f.frame_id = t.frame_id) as frame,
       s.inlet_stack_max_mm is null or t.inlet_stack_mm <= s.inlet_stack_max_mm as stack
     from season s, revision_trait t where s.id = :seasonId and t.revision_id = :revisionId`,
    { seasonId, revisionId },
  );
  return rows[0];
}

/** Entries of a design in a season, with their states. */
export async function entriesOfDesign(
  db: Handle,
  { designId, seasonId }: { designId: string; seasonId: string },
): Promise<{ entryId: string; revisionId: string; state: EntryState }[]> {
  return db("entry as e")
    .join("revision as r", "r.id", "e.revision_id")
    .where({ "r.design_id": designId, "e.season_id": seasonId })
    .orderBy("e.id")
    .select({ entryId: "e.id", revisionId: "e.revision_id", state: "e.state" });
}
