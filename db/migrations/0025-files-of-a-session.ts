import type { Knex } from "knex";
import { roleNames } from "../cluster/roles";

/**
 * The logs and recordings behind published figures. A log may reach over every run of its session, so it is shown only
 * when all of them are public; a recording is one run's or one check's, and its bytes wait until somebody listened.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create view shown.log_file as
      select l.id, l.session_id, l.run_id, l.kind, l.rows_read, l.refused_count, l.at, f.sha256, f.bytes, f.state, f.storage_key,
        f.taken_down_at, case when f.state = 'taken_down' then f.reason end as reason,
        l.kind <> 'recording' or exists (
          select 1 from recording_read k join recording_listened h on h.recording_id = k.id where k.log_file_id = l.id) as cleared
      from log_file l join file f on f.id = l.file_id
      where f.state in ('read', 'taken_down')
        and exists (select 1 from shown.publication_session p where p.session_id = l.session_id)
        and not exists (
          select 1 from run r
          where r.session_id = l.session_id and r.entry_id is not null and (l.kind <> 'recording' or r.id = l.run_id)
            and not exists (select 1 from published_entry p where p.entry_id = r.entry_id));
    grant select on shown.log_file to ${roleNames.app}, ${roleNames.public};
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw("drop view shown.log_file");
}
