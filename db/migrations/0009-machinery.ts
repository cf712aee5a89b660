import type { Knex } from "knex";

/** Outbox, events and their deliveries, audit, throttling. The outbox holds dirty keys and no payload: state is sent, not change. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table search_outbox (
      id bigint generated always as identity primary key,
      entry_id uuid not null,
      at timestamptz not null default now()
    );
    create table search_dead_letter (
      entry_id uuid primary key,
      reason text not null,
      at timestamptz not null default now()
    );
    create table search_build (
      only_one boolean primary key default true check (only_one),
      index_uid text not null,
      cursor_id uuid,
      sent bigint not null default 0,
      total bigint not null default 0,
      began_at timestamptz not null default now()
    );
    create table search_state (
      only_one boolean primary key default true check (only_one),
      settings_sha256 text,
      compared_at timestamptz,
      differences integer
    );

    create function mark_entry_dirty() returns trigger language plpgsql as $$
    begin
      insert into search_outbox (entry_id) values (coalesce(new.entry_id, old.entry_id));
      perform pg_notify('search_outbox', '');
      return null;
    end $$;
    create trigger search_dirty after insert or update or delete on published_entry
      for each row execute function mark_entry_dirty();

    create function mark_design_dirty() returns trigger language plpgsql as $$
    begin
      insert into search_outbox (entry_id) select entry_id from published_entry
        where design_id = (case when tg_table_name = 'design' then new.id else null end);
      return null;
    end $$;
    create trigger search_dirty after update of name, summary on design for each row execute function mark_design_dirty();

    create function mark_owner_dirty() returns trigger language plpgsql as $$
    begin
      insert into search_outbox (entry_id) select entry_id from published_entry where design_id = coalesce(new.design_id, old.design_id);
      return null;
    end $$;
    create trigger search_dirty after insert or update or delete on design_owner
      for each row execute function mark_owner_dirty();

    create function mark_person_dirty() returns trigger language plpgsql as $$
    begin
      if new.handle is distinct from old.handle then
        insert into search_outbox (entry_id)
          select p.entry_id from published_entry p join design_owner o on o.design_id = p.design_id where o.person_id = new.id;
        perform pg_notify('search_outbox', '');
      end if;
      return null;
    end $$;
    create trigger search_dirty after update of handle on person for each row execute function mark_person_dirty();

    create table event (
      id bigint generated always as identity primary key,
      kind text not null,
      subject jsonb not null,
      at timestamptz not null default now()
    );
    select keep_as_written('event');
    create table webhook (
      id uuid primary key default uuid_v7(),
      person_id uuid not null references person,
      address text not null check (address ~ '^https?://'),
      secret text not null,
      kinds text[] not null default '{}',
      disabled_at timestamptz,
      created_at timestamptz not null default now()
    );
    create table delivery (
      id bigint generated always as identity primary key,
      event_id bigint not null references event,
      consumer text not null,
      target text not null default '',
      state text not null default 'waiting' check (state in ('waiting', 'sent', 'failed')),
      attempts integer not null default 0,
      next_at timestamptz not null default now(),
      last_error text,
      sent_at timestamptz,
      unique (event_id, consumer, target)
    );
    create index delivery_waiting on delivery (next_at) where state = 'waiting';

    create table audit (
      id bigint generated always as identity primary key,
      actor_id uuid,
      action text not null,
      subject_kind text not null,
      subject_id text not null,
      before jsonb,
      after jsonb,
      request_id text,
      at timestamptz not null default now()
    );
    create index audit_at on audit (at desc, id desc);
    create index audit_subject on audit (subject_kind, subject_id);
    select keep_as_written('audit');

    create table idempotency_key (
      person_id uuid not null references person,
      key text not null check (length(key) between 8 and 200),
      request_sha256 text not null,
      status integer,
      body jsonb,
      created_at timestamptz not null default now(),
      primary key (person_id, key)
    );
    create table rate_window (
      key text not null,
      window_start timestamptz not null,
      count integer not null default 0,
      primary key (key, window_start)
    );
    create table demo_seed (
      only_one boolean primary key default true check (only_one),
      version integer not null,
      seeded_at timestamptz not null default now()
    );
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop trigger search_dirty on person;
    drop trigger search_dirty on design_owner;
    drop trigger search_dirty on design;
    drop trigger search_dirty on published_entry;
    drop table demo_seed, rate_window, idempotency_key, audit, delivery, webhook, event, search_state, search_build, search_dead_letter, search_outbox;
    drop function mark_person_dirty();
    drop function mark_owner_dirty();
    drop function mark_design_dirty();
    drop function mark_entry_dirty();
  `);
}
