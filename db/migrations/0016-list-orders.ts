import type { Knex } from "knex";
import { roleNames } from "../cluster/roles";

/**
 * The orders in which the index page begins, where nothing is chosen yet and every public entry would be sorted: by the
 * ratio as the public view shows it, in percent, and by the difference at equal noise. Designers of public designs, one
 * a row, so that a choice of designers doesn't gather those of every entry first.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create index published_entry_percent on published_entry ((100 * equal_noise_ratio), entry_id);
    create index published_entry_equal on published_entry (equal_noise_k, entry_id);
    create view shown.designer as
      select o.design_id, coalesce(h.handle, 'former member') as handle
      from design_owner o join person h on h.id = o.person_id
      where o.until_at is null and exists (select 1 from published_entry p where p.design_id = o.design_id);
    grant select on shown.designer to ${roleNames.app}, ${roleNames.public};
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop view shown.designer;
    drop index published_entry_percent, published_entry_equal;
  `);
}
