import type { Knex } from "knex";

/**
 * The trait study's stored aggregates. study_change has a row for each transaction that changed what is public; since
 * it only grows, the number of rows that a snapshot sees says which state of the public it saw, and no publication
 * waits for another. Results hold ids of entries and figures, never a person's name.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table study_change (
      tx bigint not null default txid_current(),
      at timestamptz not null default now(),
      primary key (tx, at)
    );
    select keep_as_written('study_change');
    insert into study_change default values;

    create function note_study_change() returns trigger language plpgsql as $$
    begin
      insert into study_change default values on conflict do nothing;
      return null;
    end $$;
    create trigger study_change after insert or update or delete on published_entry
      for each statement execute function note_study_change();

    -- Designers are the study's clusters, so a change of owners of a public design is one of what it reads.
    create function note_study_owner() returns trigger language plpgsql as $$
    begin
      if exists (select 1 from published_entry where design_id = coalesce(new.design_id, old.design_id)) then
        insert into study_change default values on conflict do nothing;
      end if;
      return null;
    end $$;
    create trigger study_change after insert or update or delete on design_owner
      for each row execute function note_study_owner();

    create table study_result (
      question text primary key check (length(question) <= 400),
      generation bigint not null check (generation >= 0),
      entries integer not null check (entries >= 0),
      result jsonb not null,
      computed_at timestamptz not null default now()
    );
    create index study_result_computed on study_result (computed_at);

    create view shown.study_generation as select count(*) as generation from study_change;
    create view shown.study_result as select question, generation, entries, result, computed_at from study_result;

    grant select, insert on study_change to fanfold_app;
    grant select, insert, update, delete on study_result to fanfold_app;
    grant select on shown.study_generation, shown.study_result to fanfold_app, fanfold_public;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop view shown.study_result, shown.study_generation;
    drop trigger study_change on design_owner;
    drop trigger study_change on published_entry;
    drop function note_study_owner(), note_study_change();
    drop table study_result, study_change;
  `);
}
