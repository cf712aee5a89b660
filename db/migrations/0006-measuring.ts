import type { Knex } from "knex";

/**
 * What happened at the bench. Every raw number is a row of reading, whatever it belongs to; such a row is never
 * changed: a later one supersedes it, and in a closed session only a review or a correction can be the cause.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table session (
      id uuid primary key default uuid_v7(),
      number integer generated always as identity unique,
      bench_id uuid not null references bench,
      bench_version_id uuid not null references bench_version,
      protocol_version_id uuid not null references protocol_version,
      budget_version_id uuid not null references budget_version,
      baseline_unit_id uuid not null references baseline_unit,
      round_id uuid references round,
      purpose text not null default 'round' check (purpose in ('round', 'qualification', 'bridge')),
      operator_id uuid not null references person,
      checklist jsonb not null default '{}',
      note text not null default '',
      version integer not null default 1,
      began_at timestamptz not null default now(),
      ended_at timestamptz,
      check (ended_at is null or ended_at >= began_at),
      check ((purpose = 'round') = (round_id is not null))
    );
    create unique index session_one_open on session (bench_id) where ended_at is null;
    create index session_round on session (round_id);
    create index session_baseline_unit on session (baseline_unit_id);

    create table session_hold (
      id uuid primary key default uuid_v7(),
      session_id uuid not null references session,
      code text not null check (code in ('calibrator', 'baseline', 'ambient', 'background', 'operator')),
      reason text not null,
      what_to_do text not null default '',
      raised_by uuid references person,
      raised_at timestamptz not null default now(),
      lifted_by uuid references person,
      lifted_at timestamptz,
      lift_note text,
      check ((lifted_at is null) = (lifted_by is null)),
      check (lifted_by is null or lifted_by is distinct from raised_by),
      check (lifted_at is null or coalesce(btrim(lift_note), '') <> '')
    );
    create index session_hold_session on session_hold (session_id);

    create function hold_lifted_by_another() returns trigger language plpgsql as $$
    begin
      if old.lifted_at is not null then
        raise exception 'a lifted hold does not change' using errcode = 'restrict_violation';
      end if;
      if new.lifted_by is not null and exists (select 1 from session where id = new.session_id and operator_id = new.lifted_by) then
        raise exception 'another person lifts the hold of a session' using errcode = 'insufficient_privilege';
      end if;
      return new;
    end $$;
    create trigger hold_lifted_by_another before update on session_hold for each row execute function hold_lifted_by_another();

    create table run (
      id uuid primary key default uuid_v7(),
      session_id uuid not null references session,
      entry_id uuid references entry,
      specimen_id uuid references specimen,
      baseline_unit_id uuid references baseline_unit,
      set_speed double precision not null check (set_speed > 0),
      mount_number integer not null check (mount_number > 0),
      repeat_number integer not null default 1 check (repeat_number > 0),
      ordinal integer not null check (ordinal > 0),
      state text not null default 'open' check (state in ('open', 'done', 'held', 'discarded')),
      reason text,
      version integer not null default 1,
      by_person uuid not null references person,
      began_at timestamptz not null default now(),
      unique (session_id, ordinal),
      check ((baseline_unit_id is null) = (specimen_id is not null)),
      check ((specimen_id is null) = (entry_id is null)),
      check (state not in ('held', 'discarded') or coalesce(btrim(reason), '') <> '')
    );
    create unique index run_once on run (session_id, coalesce(specimen_id, baseline_unit_id), set_speed, mount_number, repeat_number)
      where state <> 'discarded';
    create index run_entry on run (entry_id);

    create function run_allowed() returns trigger language plpgsql as $$
    declare s session%rowtype;
    begin
      select * into s from session where id = new.session_id for share;
      if s.ended_at is not null then
        raise exception 'a run belongs to an open session' using errcode = 'restrict_violation';
      end if;
      if new.specimen_id is not null and not exists (
        select 1 from specimen p join entry e on e.revision_id = p.revision_id where p.id = new.specimen_id and e.id = new.entry_id) then
        raise exception 'a specimen is of the revision of its entry' using errcode = 'foreign_key_violation';
      end if;
      if new.entry_id is not null and exists (
        select 1 from entry e join revision r on r.id = e.revision_id join design_owner o on o.design_id = r.design_id
        where e.id = new.entry_id and o.person_id = new.by_person and o.until_at is null) then
        raise exception 'owners do not work runs of their own entries' using errcode = 'insufficient_privilege';
      end if;
      return new;
    end $$;
    create trigger run_allowed before insert or update on run for each row execute function run_allowed();

    create table run_speed (
      run_id uuid not null references run,
      rotor_position integer not null check (rotor_position between 1 and 4),
      drive_id uuid references drive,
      speed_rpm double precision not null check (speed_rpm > 0),
      source text not null default 'tachometer' check (source in ('tachometer', 'stroboscope', 'sound')),
      primary key (run_id, rotor_position)
    );

    create table log_file (
      id uuid primary key default uuid_v7(),
      file_id uuid not null references file,
      session_id uuid not null references session,
      run_id uuid references run,
      kind text not null check (kind in ('temperature', 'level', 'recording')),
      name text not null default '',
      columns_recognised jsonb not null default '[]',
      columns_confirmed jsonb not null default '{}',
      rows_read bigint not null default 0,
      refused_count bigint not null default 0,
      analysis jsonb not null default '{}',
      by_person uuid not null references person,
      at timestamptz not null default now()
    );
    create index log_file_session on log_file (session_id);
    create index log_file_run on log_file (run_id);

    create table log_refusal (
      log_file_id uuid not null references log_file,
      line bigint not null check (line > 0),
      reason text not null,
      primary key (log_file_id, line)
    );

    create table reading (
      id uuid primary key default uuid_v7(),
      session_id uuid not null references session,
      run_id uuid references run,
      position_id uuid references microphone_position,
      quantity text not null check (quantity in (
        'level_dba', 'background_dba', 'calibrator_db', 'sensor_c', 'ambient_c', 'delta_t_k', 'power_w',
        'speed_rpm', 'pressure_pa', 'humidity_percent', 'flow_m3s')),
      phase text check (phase in ('before', 'after')),
      rotor_position integer check (rotor_position between 1 and 4),
      value double precision not null check (value <> 'NaN' and value <> 'Infinity' and value <> '-Infinity'),
      unit text not null,
      source text not null check (source in ('typed', 'pasted', 'log', 'recording')),
      log_file_id uuid references log_file,
      detail jsonb not null default '{}',
      supersedes uuid unique references reading,
      review_id uuid,
      correction_id uuid,
      reason text,
      taken_by uuid not null references person,
      taken_at timestamptz not null default now(),
      check ((quantity in ('calibrator_db')) = (phase is not null)),
      check ((quantity = 'speed_rpm') = (rotor_position is not null)),
      check (quantity not in ('level_dba', 'background_dba', 'calibrator_db') or position_id is not null),
      check (quantity not in ('level_dba', 'sensor_c', 'delta_t_k', 'speed_rpm') or run_id is not null),
      check (quantity not in ('delta_t_k') or value > 0),
      check (review_id is null or correction_id is null),
      check (supersedes is null or coalesce(btrim(reason), '') <> '')
    );
    create index reading_session on reading (session_id);
    create index reading_run on reading (run_id);
    create index reading_taken_by on reading (taken_by);
    create index reading_correction on reading (correction_id) where correction_id is not null;
    select keep_as_written('reading');

    create function reading_allowed() returns trigger language plpgsql as $$
    declare s session%rowtype; old_one reading%rowtype;
    begin
      select * into s from session where id = new.session_id for share;
      if new.run_id is not null and not exists (select 1 from run where id = new.run_id and session_id = new.session_id) then
        raise exception 'a reading is of a run of its session' using errcode = 'foreign_key_violation';
      end if;
      if s.ended_at is not null and (new.supersedes is null or (new.review_id is null and new.correction_id is null)) then
        raise exception 'a closed session takes only readings that supersede others for a review or a correction'
          using errcode = 'restrict_violation';
      end if;
      if new.supersedes is not null then
        select * into old_one from reading where id = new.supersedes;
        if (old_one.session_id, old_one.run_id, old_one.quantity, old_one.position_id, old_one.phase, old_one.rotor_position)
          is distinct from (new.session_id, new.run_id, new.quantity, new.position_id, new.phase, new.rotor_position) then
          raise exception 'a reading supersedes one of the same quantity, run and position' using errcode = 'restrict_violation';
        end if;
      end if;
      if s.round_id is not null then
        update season set frozen_at = now() where frozen_at is null and id = (select season_id from round where id = s.round_id);
      end if;
      update budget_version set frozen_at = now() where id = s.budget_version_id and frozen_at is null;
      update protocol_version set frozen_at = now() where id = s.protocol_version_id and frozen_at is null;
      return new;
    end $$;
    create trigger reading_allowed before insert on reading for each row execute function reading_allowed();

    create table calibration_check (
      id uuid primary key default uuid_v7(),
      session_id uuid not null references session,
      position_id uuid not null references microphone_position,
      phase text not null check (phase in ('before', 'after')),
      calibrator_level_db double precision not null,
      reading_id uuid not null unique references reading,
      at timestamptz not null default now()
    );
    create index calibration_check_session on calibration_check (session_id);

    create table background_level (
      id uuid primary key default uuid_v7(),
      session_id uuid not null references session,
      position_id uuid not null references microphone_position,
      heated boolean not null default false,
      duration_s double precision check (duration_s > 0),
      reading_id uuid not null unique references reading,
      at timestamptz not null default now(),
      check (not heated or (duration_s is not null and duration_s <= 30))
    );
    create index background_level_session on background_level (session_id);

    create table baseline_value (
      id uuid primary key default uuid_v7(),
      baseline_unit_id uuid not null references baseline_unit,
      bench_version_id uuid not null references bench_version,
      quantity text not null check (quantity in ('level_dba', 'thermal_resistance_kpw')),
      set_speed double precision not null,
      value double precision not null,
      u double precision not null check (u >= 0),
      from_at timestamptz not null,
      reason text not null,
      session_ids uuid[] not null,
      created_at timestamptz not null default now()
    );
    create index baseline_value_unit on baseline_value (baseline_unit_id, bench_version_id, quantity, set_speed, from_at);
    select keep_as_written('baseline_value');

    create table bridge (
      id uuid primary key default uuid_v7(),
      unit_from uuid not null references baseline_unit,
      unit_to uuid not null references baseline_unit,
      bench_version_id uuid not null references bench_version,
      quantity text not null check (quantity in ('level_dba', 'thermal_resistance_kpw')),
      set_speed double precision,
      level_dba double precision,
      ratio double precision check (ratio > 0),
      difference double precision,
      u double precision not null check (u >= 0),
      dof double precision check (dof > 0),
      session_ids uuid[] not null check (cardinality(session_ids) > 0),
      created_at timestamptz not null default now(),
      check (unit_from <> unit_to),
      check ((ratio is null) <> (difference is null)),
      check ((set_speed is null) <> (level_dba is null))
    );
    select keep_as_written('bridge');

    create table control_phase (
      id uuid primary key default uuid_v7(),
      baseline_unit_id uuid not null references baseline_unit,
      bench_version_id uuid not null references bench_version,
      quantity text not null check (quantity in ('level_dba', 'thermal_resistance_kpw', 'calibrator_db')),
      set_speed double precision,
      centre double precision,
      sigma double precision check (sigma >= 0),
      trial boolean not null,
      from_at timestamptz not null,
      reason text not null,
      by_person uuid references person,
      created_at timestamptz not null default now()
    );
    create index control_phase_unit on control_phase (baseline_unit_id, bench_version_id, quantity, from_at);
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop table control_phase, bridge, baseline_value, background_level, calibration_check, reading, log_refusal, log_file,
      run_speed, run, session_hold, session;
    drop function reading_allowed();
    drop function run_allowed();
    drop function hold_lifted_by_another();
  `);
}
