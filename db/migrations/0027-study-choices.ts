import type { Knex } from "knex";
import { roleNames } from "../cluster/roles";

/** How often each frame, rotation and season occurs among the public entries: counted before anything is joined to it. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create view shown.study_choice as
      select c.frame_key, c.rotation, s.slug as season_slug, s.number as season_number, s.title as season_title, c.count
      from (
        select p.season_id, p.frame_key, case when p.stages = 1 then 'single' when p.counter_rotating then 'counter' else 'co' end as rotation,
          count(*)::int as count
        from published_entry p group by 1, 2, 3) c
        join season s on s.id = c.season_id;
    grant select on shown.study_choice to ${roleNames.app}, ${roleNames.public};
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw("drop view shown.study_choice");
}
