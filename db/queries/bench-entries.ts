import type { Handle } from "../client/connect";

export interface BenchEntry {
  entryId: string;
  state: string;
  designName: string;
  letter: string;
  stages: number;
  specimenId: string | null;
  specimenNumber: number | null;
}

/** Entries of a round that are on the bench or were, each with its newest specimen that passed spin-up. */
export async function benchEntries(db: Handle, { roundId }: { roundId: string }): Promise<BenchEntry[]> {
  const { rows }: { rows: BenchEntry[] } = await db.raw(
    `select e.id as "entryId", e.state, d.name as "designName", r.letter, coalesce(t.stages, 1) as stages, p.id as "specimenId", p.number as "specimenNumber"
     from round_entry re join entry e on e.id = re.entry_id join revision r on r.id = e.revision_id join design d on d.id = r.design_id
       left join revision_trait t on t.revision_id = r.id
       left join lateral (
         select p.id, p.number from specimen p
         where p.revision_id = r.id and exists (select 1 from specimen_part x where x.specimen_id = p.id)
           and not exists (select 1 from specimen_part x where x.specimen_id = p.id and x.state <> 'passed')
         order by p.number desc limit 1) p on true
     where re.round_id = :roundId and re.taken_out_at is null order by d.name, r.letter`,
    { roundId },
  );
  return rows;
}

/** Whether a person owns, today, the design of an entry. */
export async function ownsEntry(
  db: Handle,
  { entryId, personId }: { entryId: string; personId: string },
): Promise<boolean> {
  const { rows } = await db.raw(
    `select 1 from entry e join revision r on r.id = e.revision_id join design_owner o on o.design_id = r.design_id
     where e.id = :entryId and o.person_id = :personId and o.until_at is null limit 1`,
    { entryId, personId },
  );
  return rows.length > 0;
}

/** Those entries of a round that a person owns today. */
export async function ownedEntries(
  db: Handle,
  { roundId, personId }: { roundId: string; personId: string },
): Promise<string[]> {
  const { rows }: { rows: { id: string }[] } = await db.raw(
    `select distinct e.id from round_entry x join entry e on e.id = x.entry_id join revision r on r.id = e.revision_id
       join design_owner o on o.design_id = r.design_id
     where x.round_id = :roundId and o.person_id = :personId and o.until_at is null`,
    { roundId, personId },
  );
  return rows.map((row) => row.id);
}
