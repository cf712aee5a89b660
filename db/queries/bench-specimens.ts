import type { NewSpecimen, SpecimenPart } from "@/lib/contracts/bench-prints";
import type { Handle } from "../client/connect";

export interface SpecimenRow {
  id: string;
  revisionId: string;
  number: number;
  material: string;
  colour: string;
  layerHeightMm: number | null;
  nozzleMm: number | null;
  infillPercent: number | null;
  walls: number | null;
  layersAcrossAxis: boolean | null;
  printTimeMin: number | null;
  note: string;
  printedAt: Date | null;
  parts: SpecimenPart[];
}

const select = `
  select p.id, p.revision_id as "revisionId", p.number, p.material, p.colour, p.layer_height_mm as "layerHeightMm",
    p.nozzle_mm as "nozzleMm", p.infill_percent as "infillPercent", p.walls, p.layers_across_axis as "layersAcrossAxis",
    p.print_time_min as "printTimeMin", p.note, p.printed_at as "printedAt",
    coalesce((select json_agg(json_build_object('rotorPosition', x.rotor_position, 'massG', x.mass_g,
        'balanceRecord', x.balance_record, 'spinUpSpeedRpm', x.spin_up_speed_rpm, 'spinUpRecord', x.spin_up_record,
        'state', x.state) order by x.rotor_position)
      from specimen_part x where x.specimen_id = p.id), '[]') as parts
  from specimen p`;

/** Printed copies of some revisions, the newest first. */
export async function specimensOfRevisions(
  db: Handle,
  { revisionIds }: { revisionIds: readonly string[] },
): Promise<SpecimenRow[]> {
  const { rows }: { rows: SpecimenRow[] } = await db.raw(
    `${select} where p.revision_id = any (:ids) order by p.number desc`,
    { ids: [...revisionIds] },
  );
  return rows;
}

export async function specimenById(
  db: Handle,
  { specimenId }: { specimenId: string },
): Promise<SpecimenRow | undefined> {
  const { rows }: { rows: SpecimenRow[] } = await db.raw(`${select} where p.id = :specimenId`, { specimenId });
  return rows[0];
}

/** Adds the next copy of a revision with a part for each rotor; the caller holds the entry's row. */
export async function insertSpecimen(
  db: Handle,
  {
    revisionId,
    rotors,
    specimen,
    printedBy,
    at,
  }: {
    revisionId: string;
    rotors: number;
    specimen: Omit<NewSpecimen, "entryId">;
    printedBy: string;
    at: Date;
  },
): Promise<{ specimenId: string; number: number }> {
  const last = await db("specimen")
    .where({ revision_id: revisionId })
    .max<{ max: number | null }>("number as max")
    .first();
  const number = (last?.max ?? 0) + 1;
  const [made]: { id: string }[] = await db("specimen")
    .insert({
      revision_id: revisionId,
      number,
      material: specimen.material,
      colour: specimen.colour,
      layer_height_mm: specimen.layerHeightMm ?? null,
      nozzle_mm: specimen.nozzleMm ?? null,
      infill_percent: specimen.infillPercent ?? null,
      walls: specimen.walls ?? null,
      layers_across_axis: specimen.layersAcrossAxis ?? null,
      print_time_min: specimen.printTimeMin ?? null,
      note: specimen.note,
      printed_by: printedBy,
      printed_at: at,
    })
    .returning("id");
  if (!made) throw new Error("no specimen came back");
  await db("specimen_part").insert(
    Array.from({ length: rotors }, (_, i) => ({ specimen_id: made.id, rotor_position: i + 1 })),
  );
  return { specimenId: made.id, number };
}

/** Writes what became of a part. @returns whether there is such a part */
export async function updatePart(
  db: Handle,
  {
    specimenId,
    rotorPosition,
    part,
    spunUpBy,
    at,
  }: {
    specimenId: string;
    rotorPosition: number;
    part: Omit<SpecimenPart, "rotorPosition">;
    spunUpBy: string;
    at: Date;
  },
): Promise<boolean> {
  const spun = part.state === "passed" || part.state === "failed";
  const changed = await db("specimen_part")
    .where({ specimen_id: specimenId, rotor_position: rotorPosition })
    .update({
      mass_g: part.massG,
      balance_record: part.balanceRecord,
      spin_up_speed_rpm: part.spinUpSpeedRpm,
      spin_up_record: part.spinUpRecord,
      state: part.state,
      ...(spun && { spun_up_by: spunUpBy, spun_up_at: at }),
    });
  return changed === 1;
}

/** Sets the parts of a copy that are in one of some states to another. */
export async function setParts(
  db: Handle,
  { specimenId, from, to }: { specimenId: string; from: readonly SpecimenPart["state"][]; to: SpecimenPart["state"] },
): Promise<void> {
  await db("specimen_part")
    .where({ specimen_id: specimenId })
    .whereIn("state", [...from])
    .update({ state: to });
}

export async function hasRuns(db: Handle, { specimenId }: { specimenId: string }): Promise<boolean> {
  return (
    (await db("run").where({ specimen_id: specimenId }).whereNot({ state: "discarded" }).first("id")) !== undefined
  );
}

export interface JobRow {
  revisionId: string;
  printNotes: string;
  material: string | null;
  printTimeMin: number | null;
  rotorMasses: { position: number; blades: number; massG: number | null }[];
}

/** What the designer asks for when some revisions are printed. */
export async function jobRows(db: Handle, { revisionIds }: { revisionIds: readonly string[] }): Promise<JobRow[]> {
  const { rows }: { rows: JobRow[] } = await db.raw(
    `select r.id as "revisionId", r.print_notes as "printNotes", t.material, t.print_time_min as "printTimeMin",
       coalesce((select json_agg(json_build_object('position', o.position, 'blades', o.blades, 'massG', o.mass_g) order by o.position)
         from rotor o where o.revision_id = r.id), '[]') as "rotorMasses"
     from revision r left join revision_trait t on t.revision_id = r.id where r.id = any (:ids)`,
    { ids: [...revisionIds] },
  );
  return rows;
}

/** The highest set speed of each season's protocol, where speeds are set in rpm. */
export async function topSpeeds(
  db: Handle,
  { seasonIds }: { seasonIds: readonly string[] },
): Promise<Map<string, number>> {
  const rows = await db("season as s")
    .join("protocol_version as p", "p.id", "s.protocol_version_id")
    .whereIn("s.id", [...new Set(seasonIds)])
    .where("p.setting", "rpm")
    .select<{ id: string; speeds: number[] }[]>("s.id", "p.set_speeds as speeds");
  return new Map(rows.map((row) => [row.id, Math.max(...row.speeds)]));
}

/** Seasons in which a revision is printed now. */
export async function seasonsOfRevision(db: Handle, { revisionId }: { revisionId: string }): Promise<string[]> {
  const rows = await db("entry")
    .where({ revision_id: revisionId })
    .whereIn("state", ["printing", "on_the_bench"])
    .select<{ id: string }[]>("season_id as id");
  return rows.map((row) => row.id);
}
