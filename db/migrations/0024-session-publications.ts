import type { Knex } from "knex";
import { roleNames } from "../cluster/roles";

/** Which session stands behind which entry's current publication: asked from a session's side, without its runs. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create view shown.publication_session as
      select s.session_id, s.entry_id, s.publication_id
      from publication_session s join published_entry p on p.publication_id = s.publication_id;
    grant select on shown.publication_session to ${roleNames.app}, ${roleNames.public};
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw("drop view shown.publication_session");
}
