import type { Knex } from "knex";

/**
 * Review, publication and what comes after it. published_entry is the read model: one row an entry that the world
 * sees now, written by publishing alone. Its presence is visibility; no query asks the clock.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table review_loan (
      round_id uuid primary key references round,
      person_id uuid not null references person,
      by_person uuid not null references person,
      at timestamptz not null default now()
    );

    create table review (
      id uuid primary key default uuid_v7(),
      round_id uuid not null references round,
      reviewer_id uuid not null references person,
      verdict text not null check (verdict in ('signed', 'sent_back')),
      note text not null default '',
      signed_sha256 text check (signed_sha256 ~ '^[0-9a-f]{64}$'),
      at timestamptz not null default now(),
      check ((verdict = 'signed') = (signed_sha256 is not null)),
      check (verdict = 'signed' or btrim(note) <> '')
    );
    create index review_round on review (round_id, at);
    select keep_as_written('review');

    create table review_entry (
      review_id uuid not null references review,
      entry_id uuid not null references entry,
      reason text not null check (btrim(reason) <> ''),
      primary key (review_id, entry_id)
    );
    select keep_as_written('review_entry');

    create function may_sign(the_round uuid, the_person uuid) returns boolean language sql stable as $$
      select (
          exists (select 1 from person where id = the_person and role in ('operator', 'host') and closed_at is null)
          or exists (select 1 from review_loan where round_id = the_round and person_id = the_person)
        )
        and not exists (
          select 1 from reading d join session s on s.id = d.session_id where s.round_id = the_round and d.taken_by = the_person)
        and not exists (
          select 1 from round_entry re join entry e on e.id = re.entry_id join revision r on r.id = e.revision_id
            join design_owner o on o.design_id = r.design_id
          where re.round_id = the_round and o.person_id = the_person
            and (o.until_at is null or o.until_at >= re.added_at))
    $$;

    create function review_allowed() returns trigger language plpgsql as $$
    begin
      if not may_sign(new.round_id, new.reviewer_id) then
        raise exception 'this person may not sign the round' using errcode = 'insufficient_privilege';
      end if;
      if new.verdict = 'signed' and exists (
        select 1 from session_hold h join session s on s.id = h.session_id where s.round_id = new.round_id and h.lifted_at is null) then
        raise exception 'a held session is not signed' using errcode = 'restrict_violation';
      end if;
      return new;
    end $$;
    create trigger review_allowed before insert on review for each row execute function review_allowed();

    create table publication (
      id uuid primary key default uuid_v7(),
      entry_id uuid not null references entry,
      number integer not null check (number > 0),
      round_id uuid not null references round,
      snapshot jsonb not null,
      schema_version integer not null check (schema_version > 0),
      sha256 text not null check (sha256 ~ '^[0-9a-f]{64}$'),
      method_version integer not null references method_version,
      published_at timestamptz not null default now(),
      unique (entry_id, number)
    );
    create index publication_round on publication (round_id);
    select keep_as_written('publication');

    create table publication_session (
      publication_id uuid not null references publication,
      entry_id uuid not null references entry,
      session_id uuid not null references session,
      primary key (publication_id, session_id)
    );
    create index publication_session_session on publication_session (session_id, entry_id);
    select keep_as_written('publication_session');

    create function publication_allowed() returns trigger language plpgsql as $$
    declare s text;
    begin
      select state into s from round where id = new.round_id;
      if s is null or s not in ('signed', 'scheduled', 'published') then
        raise exception 'a publication belongs to a signed round, this one is %', s using errcode = 'restrict_violation';
      end if;
      if not exists (select 1 from round_entry where round_id = new.round_id and entry_id = new.entry_id and taken_out_at is null) then
        raise exception 'the entry is not of this round' using errcode = 'foreign_key_violation';
      end if;
      return new;
    end $$;
    create trigger publication_allowed before insert on publication for each row execute function publication_allowed();

    create table published_entry (
      entry_id uuid primary key references entry,
      publication_id uuid not null references publication,
      design_id uuid not null references design,
      revision_id uuid not null references revision,
      season_id uuid not null references season,
      round_id uuid not null references round,
      bench_version_id uuid not null references bench_version,
      protocol_version_id uuid not null references protocol_version,
      baseline_unit_id uuid not null references baseline_unit,
      method_version integer not null references method_version,
      published_at timestamptz not null,
      first_published_at timestamptz not null,
      corrections integer not null default 0,
      -- traits, as they held when it was published
      stages integer not null,
      counter_rotating boolean not null,
      blades_first integer not null,
      blades_second integer,
      hand_first text not null,
      inlet_stack text not null,
      inlet_stack_mm double precision not null,
      spacer_mm double precision not null,
      struts integer not null,
      shroud boolean not null,
      frame_key text not null,
      material text not null,
      licence text not null,
      tip_gap_mm double precision,
      solidity_mid double precision,
      pitch_mid_deg double precision,
      mass_g double precision,
      print_time_min double precision,
      -- figures: at the season's headline level, and at the highest set speed
      headline_dba double precision not null,
      equal_noise_ratio double precision,
      u_equal_noise_ratio double precision,
      equal_noise_k double precision,
      u_equal_noise_k double precision,
      dof_equal_noise_k double precision check (dof_equal_noise_k > 0),
      equal_cooling_db double precision,
      u_equal_cooling_db double precision,
      dof_equal_cooling_db double precision check (dof_equal_cooling_db > 0),
      equal_noise_why text,
      full_set_speed double precision not null,
      level_full_dba double precision not null,
      u_level_full_db double precision not null,
      dof_level_full_db double precision check (dof_level_full_db > 0),
      level_full_bound boolean not null,
      delta_t_full_k double precision not null,
      u_delta_t_full_k double precision not null,
      dof_delta_t_full_k double precision check (dof_delta_t_full_k > 0),
      level_difference_db double precision not null,
      u_level_difference_db double precision not null,
      dof_level_difference_db double precision check (dof_level_difference_db > 0),
      resistance_ratio double precision not null,
      u_resistance_ratio double precision not null,
      dof_resistance_ratio double precision check (dof_resistance_ratio > 0),
      level_low_dba double precision not null,
      level_high_dba double precision not null,
      loudness_sone double precision,
      prominent_tone boolean,
      -- ranks: in the round when it was published, and in the season now
      score double precision,
      u_score double precision,
      round_rank integer,
      round_rank_low integer,
      round_rank_high integer,
      round_of integer,
      season_rank integer,
      season_rank_low integer,
      season_rank_high integer,
      season_of integer,
      why_not_ranked text
    );
    create index published_entry_design on published_entry (design_id);
    create index published_entry_revision on published_entry (revision_id);
    create index published_entry_round on published_entry (round_id);
    create index published_entry_publication on published_entry (publication_id);
    create index published_entry_season_ratio on published_entry (season_id, equal_noise_ratio, entry_id);
    create index published_entry_ratio on published_entry (equal_noise_ratio, entry_id);
    create index published_entry_level on published_entry (level_difference_db, entry_id);
    create index published_entry_resistance on published_entry (resistance_ratio, entry_id);
    create index published_entry_published on published_entry (published_at desc, entry_id);
    create index published_entry_comparable on published_entry (bench_version_id, protocol_version_id, baseline_unit_id);

    create table question (
      id uuid primary key default uuid_v7(),
      publication_id uuid not null references publication,
      figure text not null,
      body text not null check (length(body) between 1 and 4000),
      by_person uuid not null references person,
      state text not null default 'open' check (state in ('open', 'answered', 'dismissed')),
      answer text,
      answered_by uuid references person,
      answered_at timestamptz,
      created_at timestamptz not null default now(),
      check ((state = 'open') = (answered_at is null)),
      check (state = 'open' or (answer is not null and answered_by is not null))
    );
    create index question_publication on question (publication_id);

    create table correction (
      id uuid primary key default uuid_v7(),
      number integer generated always as identity unique,
      what text not null,
      why text not null,
      question_id uuid references question,
      by_person uuid not null references person,
      signed_by uuid references person,
      signed_at timestamptz,
      signed_sha256 text,
      published_at timestamptz,
      created_at timestamptz not null default now(),
      check (signed_by is null or signed_by <> by_person),
      check ((signed_by is null) = (signed_at is null)),
      check (published_at is null or signed_at is not null)
    );
    create table correction_reading (
      correction_id uuid not null references correction,
      reading_id uuid not null references reading,
      primary key (correction_id, reading_id)
    );
    create table correction_publication (
      correction_id uuid not null references correction,
      old_publication_id uuid not null references publication,
      new_publication_id uuid references publication,
      primary key (correction_id, old_publication_id)
    );
    create table correction_standing (
      correction_id uuid not null references correction,
      standing_id uuid not null references standing,
      primary key (correction_id, standing_id)
    );
    alter table reading add foreign key (review_id) references review;
    alter table reading add foreign key (correction_id) references correction;

    create table withdrawal (
      id uuid primary key default uuid_v7(),
      entry_id uuid not null unique references entry,
      reason text not null check (btrim(reason) <> ''),
      by_person uuid not null references person,
      at timestamptz not null default now()
    );
    select keep_as_written('withdrawal');

    create table saved_comparison (
      id uuid primary key default uuid_v7(),
      person_id uuid not null references person,
      name text not null check (length(name) between 1 and 120),
      note text not null default '' check (length(note) <= 2000),
      address text not null check (length(address) <= 2000),
      share_key text unique,
      created_at timestamptz not null default now()
    );
    create index saved_comparison_person on saved_comparison (person_id, created_at desc);
    create table saved_search (
      id uuid primary key default uuid_v7(),
      person_id uuid not null references person,
      name text not null check (length(name) between 1 and 120),
      address text not null check (length(address) <= 2000),
      created_at timestamptz not null default now()
    );
    create index saved_search_person on saved_search (person_id, created_at desc);
    create table watch (
      person_id uuid not null references person,
      design_id uuid not null references design,
      at timestamptz not null default now(),
      primary key (person_id, design_id)
    );
    create index watch_design on watch (design_id);
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    alter table reading drop constraint reading_review_id_fkey, drop constraint reading_correction_id_fkey;
    drop table watch, saved_search, saved_comparison, withdrawal, correction_standing, correction_publication, correction_reading,
      correction, question, published_entry, publication_session, publication, review_entry, review, review_loan;
    drop function publication_allowed();
    drop function review_allowed();
    drop function may_sign(uuid, uuid);
  `);
}
