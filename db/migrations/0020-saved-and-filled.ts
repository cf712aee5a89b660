import type { Knex } from "knex";
import { roleNames } from "../cluster/roles";

/**
 * Saved comparisons can be changed and shared by a key that can't be guessed; the public reader finds a shared one by
 * its key alone, with its owner's handle as it is now. Sessions that a demo's fill made up have no readings: they are
 * named here by the owner role, so that recomputing can say so; the application can't write it.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    alter table saved_comparison
      add column updated_at timestamptz not null default now(),
      add column shared_at timestamptz,
      add constraint saved_comparison_share_key check (share_key ~ '^[A-Za-z0-9_-]{22,64}$'),
      add constraint saved_comparison_shared check ((share_key is null) = (shared_at is null));
    create view shown.shared_comparison as
      select c.share_key, c.name, c.note, c.address, c.shared_at, c.updated_at,
        coalesce(h.handle, 'former member') as handle
      from saved_comparison c join person h on h.id = c.person_id where c.share_key is not null;
    grant select on shown.shared_comparison to ${roleNames.app}, ${roleNames.public};

    create table filled_session (
      session_id uuid primary key references session,
      at timestamptz not null default now()
    );
    grant select on filled_session to ${roleNames.app};
    insert into filled_session (session_id)
      select s.id from session s
      where s.note = 'Filled in for the demo.' and not exists (select 1 from reading d where d.session_id = s.id);
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop table filled_session;
    drop view shown.shared_comparison;
    alter table saved_comparison drop constraint saved_comparison_shared, drop constraint saved_comparison_share_key,
      drop column shared_at, drop column updated_at;
  `);
}
