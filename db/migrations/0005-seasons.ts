import type { Knex } from "knex";

/**
 * Seasons, rounds and entries. A state is never written: a move is, and the move carries the state along if the
 * table of transitions knows it. The tables of transitions repeat the ones in the domain, and a test compares them.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table scoring_rule (
      id uuid primary key default uuid_v7(),
      key text not null unique check (is_slug(key)),
      name text not null
    );

    create table scoring_rule_version (
      id uuid primary key default uuid_v7(),
      rule_id uuid not null references scoring_rule,
      number integer not null check (number > 0),
      kind text not null check (kind in ('equal-noise', 'plain-sum', 'plain-product', 'conductance-less-level', 'speed-neutral')),
      formula text not null,
      parameters jsonb not null default '{}',
      properties jsonb not null default '{}',
      created_at timestamptz not null default now(),
      unique (rule_id, number)
    );
    select keep_as_written('scoring_rule_version');

    create table season (
      id uuid primary key default uuid_v7(),
      number integer not null unique check (number > 0),
      slug text not null unique check (is_slug(slug)),
      title text not null,
      summary text not null default '',
      rules text not null default '',
      protocol_version_id uuid not null references protocol_version,
      scoring_rule_version_id uuid not null references scoring_rule_version,
      levels_dba double precision[] not null check (cardinality(levels_dba) between 1 and 12),
      headline_dba double precision not null,
      total_depth_max_mm double precision check (total_depth_max_mm > 0),
      inlet_stack_max_mm double precision check (inlet_stack_max_mm >= 0),
      opens_at timestamptz,
      closes_at timestamptz,
      opened_at timestamptz,
      closed_at timestamptz,
      frozen_at timestamptz,
      check (headline_dba = any (levels_dba)),
      check (closes_at is null or opens_at is null or closes_at > opens_at),
      check (closed_at is null or opened_at is not null)
    );

    create table season_frame (
      season_id uuid not null references season,
      frame_id uuid not null references frame,
      primary key (season_id, frame_id)
    );

    create table season_bench (
      season_id uuid not null references season,
      bench_version_id uuid not null references bench_version,
      budget_version_id uuid not null references budget_version,
      from_at timestamptz not null default now(),
      reason text not null default '',
      primary key (season_id, bench_version_id)
    );

    create table season_baseline (
      season_id uuid not null references season,
      baseline_unit_id uuid not null references baseline_unit,
      from_at timestamptz not null default now(),
      primary key (season_id, baseline_unit_id)
    );

    create function season_frozen() returns trigger language plpgsql as $$
    begin
      if old.frozen_at is not null and (
        new.protocol_version_id, new.scoring_rule_version_id, new.levels_dba, new.headline_dba, new.frozen_at)
        is distinct from
        (old.protocol_version_id, old.scoring_rule_version_id, old.levels_dba, old.headline_dba, old.frozen_at) then
        raise exception 'rule, levels and gates are frozen at the first reading of a season' using errcode = 'restrict_violation';
      end if;
      if new.slug <> old.slug or new.number <> old.number then
        raise exception 'a slug is for ever' using errcode = 'restrict_violation';
      end if;
      return new;
    end $$;
    create trigger season_frozen before update on season for each row execute function season_frozen();

    create function season_bench_frozen() returns trigger language plpgsql as $$
    begin
      if exists (select 1 from season where id = old.season_id and frozen_at is not null) then
        raise exception 'the budget of a season is frozen at its first reading' using errcode = 'restrict_violation';
      end if;
      return coalesce(new, old);
    end $$;
    create trigger season_bench_frozen before update or delete on season_bench
      for each row execute function season_bench_frozen();

    create table round_transition (
      from_state text not null,
      to_state text not null,
      movers text[] not null,
      needs_reason boolean not null,
      primary key (from_state, to_state)
    );
    insert into round_transition values
      ('planned', 'measuring', '{operator,host}', false),
      ('measuring', 'in_review', '{operator,host}', false),
      ('in_review', 'measuring', '{reviewer}', true),
      ('in_review', 'signed', '{reviewer}', false),
      ('signed', 'scheduled', '{host}', false),
      ('scheduled', 'published', '{publication}', false),
      ('signed', 'in_review', '{change}', true),
      ('scheduled', 'in_review', '{change}', true);
    select keep_as_written('round_transition');

    create table round (
      id uuid primary key default uuid_v7(),
      season_id uuid not null references season,
      number integer not null check (number > 0),
      title text not null default '',
      state text not null default 'planned',
      publish_at timestamptz,
      published_at timestamptz,
      unique (season_id, number)
    );
    create index round_state on round (state);

    create table round_move (
      id uuid primary key default uuid_v7(),
      round_id uuid not null references round,
      from_state text not null,
      to_state text not null,
      by_person uuid references person,
      reason text,
      at timestamptz not null default now(),
      foreign key (from_state, to_state) references round_transition
    );
    create index round_move_round on round_move (round_id, at);
    select keep_as_written('round_move');

    create function carry_round() returns trigger language plpgsql as $$
    declare now_in text; reason_needed boolean;
    begin
      select state into now_in from round where id = new.round_id for update;
      select needs_reason into reason_needed from round_transition where from_state = new.from_state and to_state = new.to_state;
      if reason_needed and coalesce(btrim(new.reason), '') = '' then
        raise exception 'a move from % to % needs a reason', new.from_state, new.to_state using errcode = 'not_null_violation';
      end if;
      if now_in is distinct from new.from_state then
        raise exception 'the round is %, not %', now_in, new.from_state using errcode = 'serialization_failure';
      end if;
      update round set state = new.to_state,
        published_at = case when new.to_state = 'published' then new.at else published_at end
      where id = new.round_id;
      return null;
    end $$;
    create trigger carry_round after insert on round_move for each row execute function carry_round();

    create function state_by_move() returns trigger language plpgsql as $$
    begin
      if new.state is distinct from old.state and pg_trigger_depth() < 2 then
        raise exception 'the state of % changes by a move alone', tg_table_name using errcode = 'restrict_violation';
      end if;
      return new;
    end $$;
    create trigger state_by_move before update on round for each row execute function state_by_move();

    create function state_at_birth() returns trigger language plpgsql as $$
    begin
      if new.state <> tg_argv[0] then
        raise exception 'a new % is %', tg_table_name, tg_argv[0] using errcode = 'restrict_violation';
      end if;
      return new;
    end $$;
    create trigger state_at_birth before insert on round for each row execute function state_at_birth('planned');

    create table entry_transition (
      from_state text not null,
      to_state text not null,
      history text not null check (history in ('any', 'never_published', 'ever_published')),
      movers text[] not null,
      needs_reason boolean not null,
      primary key (from_state, to_state, history)
    );
    insert into entry_transition values
      ('draft', 'sent_in', 'any', '{designer}', false),
      ('sent_in', 'returned', 'any', '{host}', false),
      ('sent_in', 'declined', 'any', '{host}', false),
      ('sent_in', 'accepted', 'any', '{host}', false),
      ('returned', 'sent_in', 'any', '{designer}', false),
      ('returned', 'replaced', 'any', '{designer}', false),
      ('accepted', 'printing', 'any', '{operator,host}', false),
      ('accepted', 'declined', 'any', '{host}', true),
      ('printing', 'declined', 'never_published', '{host}', true),
      ('on_the_bench', 'declined', 'never_published', '{host}', true),
      ('printing', 'printing', 'any', '{operator,host}', false),
      ('printing', 'on_the_bench', 'any', '{operator}', false),
      ('on_the_bench', 'printing', 'any', '{operator}', false),
      ('on_the_bench', 'in_review', 'any', '{operator}', false),
      ('in_review', 'on_the_bench', 'any', '{reviewer}', true),
      ('in_review', 'published', 'any', '{publication}', false),
      ('published', 'on_the_bench', 'any', '{host}', false),
      ('published', 'withdrawn', 'ever_published', '{host}', true),
      ('draft', 'withdrawn', 'never_published', '{designer}', false),
      ('sent_in', 'withdrawn', 'never_published', '{designer}', false),
      ('returned', 'withdrawn', 'never_published', '{designer}', false),
      ('accepted', 'withdrawn', 'never_published', '{designer}', false),
      ('printing', 'withdrawn', 'never_published', '{designer}', false),
      ('on_the_bench', 'withdrawn', 'never_published', '{designer}', false),
      ('in_review', 'withdrawn', 'never_published', '{designer}', false),
      ('printing', 'withdrawn', 'ever_published', '{host}', true),
      ('on_the_bench', 'withdrawn', 'ever_published', '{host}', true),
      ('in_review', 'withdrawn', 'ever_published', '{host}', true),
      ('sent_in', 'carried_over', 'never_published', '{host}', false),
      ('returned', 'carried_over', 'never_published', '{host}', false),
      ('accepted', 'carried_over', 'never_published', '{host}', false),
      ('printing', 'carried_over', 'never_published', '{host}', false),
      ('on_the_bench', 'carried_over', 'never_published', '{host}', false),
      ('in_review', 'carried_over', 'never_published', '{host}', false);
    select keep_as_written('entry_transition');

    create table entry (
      id uuid primary key default uuid_v7(),
      revision_id uuid not null references revision,
      season_id uuid not null references season,
      state text not null default 'draft',
      state_at timestamptz not null default now(),
      ever_published boolean not null default false,
      carried_from uuid references entry,
      created_at timestamptz not null default now(),
      unique (revision_id, season_id)
    );
    create index entry_state on entry (state, state_at);
    create index entry_season on entry (season_id);
    create trigger state_by_move before update on entry for each row execute function state_by_move();
    create trigger state_at_birth before insert on entry for each row execute function state_at_birth('draft');

    create table entry_move (
      id uuid primary key default uuid_v7(),
      entry_id uuid not null references entry,
      from_state text not null,
      to_state text not null,
      by_person uuid references person,
      by_right text not null check (by_right in ('designer', 'operator', 'host', 'reviewer', 'publication')),
      reason text,
      at timestamptz not null default now()
    );
    create index entry_move_entry on entry_move (entry_id, at);
    select keep_as_written('entry_move');

    create function carry_entry() returns trigger language plpgsql as $$
    declare e entry%rowtype; t entry_transition%rowtype;
    begin
      select * into e from entry where id = new.entry_id for update;
      if e.state is distinct from new.from_state then
        raise exception 'the entry is %, not %', e.state, new.from_state using errcode = 'serialization_failure';
      end if;
      select * into t from entry_transition where from_state = new.from_state and to_state = new.to_state
        and history <> case when e.ever_published then 'never_published' else 'ever_published' end;
      if not found then
        raise exception 'an entry does not go from % to %', new.from_state, new.to_state using errcode = 'restrict_violation';
      end if;
      if not (new.by_right = any (t.movers)) then
        raise exception 'a % may not move an entry from % to %', new.by_right, new.from_state, new.to_state
          using errcode = 'insufficient_privilege';
      end if;
      if t.needs_reason and coalesce(btrim(new.reason), '') = '' then
        raise exception 'a move from % to % needs a reason', new.from_state, new.to_state using errcode = 'not_null_violation';
      end if;
      update entry set state = new.to_state, state_at = new.at,
        ever_published = ever_published or new.to_state = 'published' where id = new.entry_id;
      if new.to_state = 'sent_in' then
        update revision set sent_in_at = new.at where id = e.revision_id and sent_in_at is null;
      end if;
      return null;
    end $$;
    create trigger carry_entry after insert on entry_move for each row execute function carry_entry();

    create table round_entry (
      round_id uuid not null references round,
      entry_id uuid not null references entry,
      attempt integer not null default 1 check (attempt > 0),
      added_at timestamptz not null default now(),
      taken_out_at timestamptz,
      reason text,
      primary key (round_id, entry_id, attempt),
      check (taken_out_at is null or reason is not null)
    );
    create index round_entry_entry on round_entry (entry_id);
    create unique index round_entry_once on round_entry (round_id, entry_id) where taken_out_at is null;

    create table specimen (
      id uuid primary key default uuid_v7(),
      revision_id uuid not null references revision,
      number integer not null check (number > 0),
      material text not null,
      colour text not null default '',
      layer_height_mm double precision check (layer_height_mm > 0),
      nozzle_mm double precision check (nozzle_mm > 0),
      infill_percent double precision check (infill_percent between 0 and 100),
      walls integer check (walls > 0),
      layers_across_axis boolean,
      print_time_min double precision check (print_time_min > 0),
      printed_at timestamptz,
      printed_by uuid references person,
      note text not null default '',
      created_at timestamptz not null default now(),
      unique (revision_id, number)
    );

    create table specimen_part (
      specimen_id uuid not null references specimen,
      rotor_position integer not null check (rotor_position between 1 and 4),
      mass_g double precision check (mass_g > 0),
      balance_record text not null default '',
      spin_up_speed_rpm double precision check (spin_up_speed_rpm > 0),
      spin_up_record text not null default '',
      spun_up_by uuid references person,
      spun_up_at timestamptz,
      state text not null default 'printed' check (state in ('printed', 'passed', 'failed', 'written_off')),
      primary key (specimen_id, rotor_position),
      check (state <> 'passed' or (spun_up_at is not null and spin_up_speed_rpm is not null))
    );
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop table specimen_part, specimen, round_entry, entry_move, entry, entry_transition, round_move, round, round_transition,
      season_baseline, season_bench, season_frame, season, scoring_rule_version, scoring_rule;
    drop function carry_entry();
    drop function state_at_birth();
    drop function state_by_move();
    drop function carry_round();
    drop function season_bench_frozen();
    drop function season_frozen();
  `);
}
