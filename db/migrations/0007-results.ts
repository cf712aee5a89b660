import type { Knex } from "knex";

/** What was computed, under which method version, from which readings; and the standings, which are only ever added to. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table method_version (
      number integer primary key check (number > 0),
      note text not null,
      golden_sha256 text not null check (golden_sha256 ~ '^[0-9a-f]{64}$'),
      from_at timestamptz not null default now()
    );
    select keep_as_written('method_version');

    create table result (
      id uuid primary key default uuid_v7(),
      session_id uuid not null references session,
      entry_id uuid references entry,
      specimen_id uuid references specimen,
      baseline_unit_id uuid references baseline_unit,
      set_speed double precision not null,
      position_id uuid references microphone_position,
      quantity text not null check (quantity in ('level_dba', 'delta_t_k', 'thermal_resistance_kpw')),
      value double precision not null,
      u_own_run double precision not null check (u_own_run >= 0),
      u_own_mount double precision not null check (u_own_mount >= 0),
      u_shared_offset double precision not null check (u_shared_offset >= 0),
      u_shared_gain double precision not null check (u_shared_gain >= 0),
      dof double precision check (dof > 0),
      upper_bound boolean not null default false,
      runs integer not null check (runs > 0),
      method_version integer not null references method_version,
      reading_ids uuid[] not null check (cardinality(reading_ids) > 0),
      detail jsonb not null default '{}',
      computed_at timestamptz not null default now(),
      check ((baseline_unit_id is null) = (specimen_id is not null)),
      check ((specimen_id is null) = (entry_id is null)),
      unique nulls not distinct (session_id, entry_id, specimen_id, baseline_unit_id, set_speed, position_id, quantity)
    );
    create index result_entry on result (entry_id);

    create table comparison (
      result_id uuid primary key references result on delete cascade,
      baseline_result_id uuid not null references result on delete cascade,
      difference double precision not null,
      u_difference double precision not null check (u_difference >= 0),
      ratio double precision check (ratio > 0),
      u_ratio double precision check (u_ratio >= 0),
      dof double precision check (dof > 0)
    );
    create index comparison_baseline on comparison (baseline_result_id);

    create table curve (
      id uuid primary key default uuid_v7(),
      session_id uuid not null references session,
      entry_id uuid references entry,
      baseline_unit_id uuid references baseline_unit,
      position_id uuid references microphone_position,
      points jsonb not null,
      equal_noise jsonb not null default '[]',
      method_version integer not null references method_version,
      computed_at timestamptz not null default now(),
      check ((entry_id is null) <> (baseline_unit_id is null)),
      unique nulls not distinct (session_id, entry_id, baseline_unit_id, position_id)
    );

    create table baseline_check (
      id uuid primary key default uuid_v7(),
      baseline_unit_id uuid not null references baseline_unit,
      bench_version_id uuid not null references bench_version,
      session_id uuid not null references session,
      quantity text not null check (quantity in ('level_dba', 'thermal_resistance_kpw', 'calibrator_db')),
      set_speed double precision,
      value double precision not null,
      chart jsonb not null default '{}',
      rule_broken text,
      at timestamptz not null default now(),
      unique nulls not distinct (session_id, baseline_unit_id, quantity, set_speed)
    );
    create index baseline_check_unit on baseline_check (baseline_unit_id, bench_version_id, quantity, at);

    create table standing (
      id uuid primary key default uuid_v7(),
      season_id uuid not null references season,
      round_id uuid references round,
      rule_version_id uuid not null references scoring_rule_version,
      number integer not null check (number > 0),
      as_of timestamptz not null,
      draws integer not null check (draws > 0),
      seed bigint not null,
      method_version integer not null references method_version,
      unique nulls not distinct (season_id, round_id, rule_version_id, number)
    );
    select keep_as_written('standing');

    create table standing_row (
      standing_id uuid not null references standing,
      entry_id uuid not null references entry,
      score double precision,
      u_score double precision check (u_score >= 0),
      rank integer check (rank > 0),
      rank_low integer,
      rank_high integer,
      p_first double precision check (p_first between 0 and 1),
      letters text,
      why_not_ranked text,
      primary key (standing_id, entry_id),
      check ((rank is null) = (why_not_ranked is not null)),
      check (rank is null or (score is not null and rank_low <= rank_high))
    );
    create index standing_row_entry on standing_row (entry_id);
    select keep_as_written('standing_row');

    create table ballot (
      id uuid primary key default uuid_v7(),
      season_id uuid references season,
      title text not null,
      method text not null check (method in ('plurality', 'approval', 'ranked')),
      tie_rule text not null,
      secret boolean not null default true,
      opens_at timestamptz not null,
      closes_at timestamptz not null,
      opened_at timestamptz,
      closed_at timestamptz,
      check (closes_at > opens_at)
    );
    create table ballot_elector (
      ballot_id uuid not null references ballot,
      person_id uuid not null references person,
      primary key (ballot_id, person_id)
    );
    create table ballot_option (
      id uuid primary key default uuid_v7(),
      ballot_id uuid not null references ballot,
      ordinal integer not null,
      title text not null,
      scoring_rule_version_id uuid references scoring_rule_version,
      unique (ballot_id, ordinal)
    );
    create table vote (
      ballot_id uuid not null references ballot,
      person_id uuid not null references person,
      choice jsonb not null,
      at timestamptz not null default now(),
      primary key (ballot_id, person_id),
      foreign key (ballot_id, person_id) references ballot_elector (ballot_id, person_id)
    );
    select keep_as_written('vote');
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop table vote, ballot_option, ballot_elector, ballot, standing_row, standing, baseline_check, curve, comparison, result, method_version;
  `);
}
