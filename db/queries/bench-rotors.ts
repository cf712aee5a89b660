import type { Handle } from "../client/connect";

export interface EntryRotors {
  entryId: string;
  /** Blades, rotor 1 first. */
  blades: number[];
  /** Null for a single rotor. */
  rotation: "counter" | "co" | null;
  struts: number;
  inletStackMm: number;
}

/** Rotors of a round's entries, as far as their traits are known. */
export async function rotorsOfRound(db: Handle, { roundId }: { roundId: string }): Promise<EntryRotors[]> {
  const { rows }: { rows: EntryRotors[] } = await db.raw(
    `select e.id as "entryId", t.struts, t.inlet_stack_mm as "inletStackMm",
       case when t.stages < 2 then null when t.counter_rotating then 'counter' else 'co' end as rotation,
       coalesce((select json_agg(r.blades order by r.position) from rotor r where r.revision_id = e.revision_id), '[]') as blades
     from round_entry re join entry e on e.id = re.entry_id join revision_trait t on t.revision_id = e.revision_id
     where re.round_id = :roundId and re.taken_out_at is null order by e.id`,
    { roundId },
  );
  return rows;
}
