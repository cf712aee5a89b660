import type { Knex } from "knex";

/**
 * The rest of what marks entries for the search index: names of seasons. Every mark wakes the sender when it commits.
 * A rebuild says when it exchanges indexes, since a sender that dies then can't know which of them is which.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create function wake_search_sender() returns trigger language plpgsql as $$
    begin
      perform pg_notify('search_outbox', '');
      return null;
    end $$;
    create trigger wake_sender after insert on search_outbox for each statement execute function wake_search_sender();

    create function mark_season_dirty() returns trigger language plpgsql as $$
    begin
      insert into search_outbox (entry_id) select entry_id from published_entry where season_id = new.id;
      return null;
    end $$;
    create trigger search_dirty after update of title, slug on season for each row
      when (new.title is distinct from old.title or new.slug is distinct from old.slug) execute function mark_season_dirty();

    alter table search_build add column swapping boolean not null default false;
    insert into search_state (only_one) values (true) on conflict do nothing;
    revoke insert, delete on search_state from fanfold_app;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    grant insert on search_state to fanfold_app;
    alter table search_build drop column swapping;
    drop trigger search_dirty on season;
    drop function mark_season_dirty();
    drop trigger wake_sender on search_outbox;
    drop function wake_search_sender();
  `);
}
