import type { Knex } from "knex";

/** Views that show a sheet's number, and the expressions that they read it by, as PostgreSQL writes them. */
const ofSheet = "( SELECT sn.number FROM sheet_number sn WHERE (sn.design_id = d.id))";
const readers = [
  { view: "shown.entry", ofRow: "d.number AS design_number", ofSheet: `${ofSheet} AS design_number` },
  { view: "shown.design", ofRow: "d.number", ofSheet: `${ofSheet} AS number` },
] as const;

/**
 * A sheet is numbered when it first appears. The number of a design's row counts drafts as well: shown in public, its
 * gaps told how many designs were waiting.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table sheet_number (
      design_id uuid primary key references design,
      number integer not null generated always as identity unique
    );
    create function number_sheet() returns trigger language plpgsql security definer set search_path = public, pg_temp as $$
    begin
      if not exists (select 1 from sheet_number where design_id = new.design_id) then
        insert into sheet_number (design_id) values (new.design_id) on conflict do nothing;
      end if;
      return null;
    end $$;
    create trigger published_entry_numbers_sheet after insert on published_entry
      for each row execute function number_sheet();
    insert into sheet_number (design_id)
      select r.design_id from publication b join entry e on e.id = b.entry_id join revision r on r.id = e.revision_id
      group by r.design_id order by min(b.published_at), r.design_id;
  `);
  for (const each of readers) await putFor(knex, each.view, each.ofRow, each.ofSheet);
}

export async function down(knex: Knex): Promise<void> {
  for (const each of readers) await putFor(knex, each.view, each.ofSheet, each.ofRow);
  await knex.raw("drop table sheet_number; drop function number_sheet cascade");
}

/** Puts one expression for another in a view, whose columns stay what they are. */
async function putFor(knex: Knex, view: string, from: string, to: string): Promise<void> {
  const { rows }: { rows: { text: string }[] } = await knex.raw("select pg_get_viewdef(?::regclass) as text", [view]);
  const text = (rows[0]?.text ?? "").replace(/\s+/g, " ");
  if (text.split(from).length !== 2) throw new Error(`${view} does not hold ${from} once`);
  await knex.raw(`create or replace view ${view} as ${text.replace(from, to)}`);
}
