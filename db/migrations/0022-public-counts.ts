import type { Knex } from "knex";
import { roleNames } from "../cluster/roles";

/** How much is public, from the read model alone: the view of entries joins what a count doesn't need. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create view shown.season_count as
      select season_id, count(*)::int as entries from published_entry group by season_id;
    create view shown.total as
      select (select count(*) from (select distinct design_id from published_entry) d)::int as designs,
        coalesce(sum(entries), 0)::int as entries, count(*)::int as seasons
      from shown.season_count;
    grant select on shown.season_count, shown.total to ${roleNames.app}, ${roleNames.public};
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw("drop view shown.total, shown.season_count");
}
