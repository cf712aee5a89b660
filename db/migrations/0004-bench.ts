import type { Knex } from "knex";

/** The bench and its versions, what its budget is made of, what stands around the cooler, and the protocols run on it. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table bench (
      id uuid primary key default uuid_v7(),
      slug text not null unique check (is_slug(slug)),
      name text not null,
      description text not null default ''
    );

    create table bench_version (
      id uuid primary key default uuid_v7(),
      bench_id uuid not null references bench,
      number integer not null check (number > 0),
      cooler text not null,
      heat_source text not null,
      temperature_sensors text not null,
      temperature_min_c double precision not null default -40,
      temperature_max_c double precision not null default 150,
      microphone text not null,
      calibrator text not null,
      calibrator_level_db double precision not null default 94,
      microphone_distance_mm double precision not null default 100 check (microphone_distance_mm > 0),
      valid_from timestamptz not null,
      change_reason text not null,
      check (temperature_min_c < temperature_max_c),
      unique (bench_id, number)
    );

    create table microphone_position (
      id uuid primary key default uuid_v7(),
      bench_version_id uuid not null references bench_version,
      name text not null,
      distance_mm double precision not null check (distance_mm > 0),
      angle_deg double precision not null default 0 check (angle_deg between -180 and 180),
      ordinal integer not null default 1,
      unique (bench_version_id, name),
      unique (bench_version_id, ordinal)
    );

    create table budget_version (
      id uuid primary key default uuid_v7(),
      bench_version_id uuid not null references bench_version,
      number integer not null check (number > 0),
      note text not null default '',
      created_by uuid references person,
      created_at timestamptz not null default now(),
      frozen_at timestamptz,
      unique (bench_version_id, number)
    );

    create table budget_part (
      id uuid primary key default uuid_v7(),
      budget_version_id uuid not null references budget_version,
      quantity text not null check (quantity in ('level_dba', 'delta_t_k')),
      name text not null,
      u double precision not null check (u >= 0),
      unit text not null check (unit in ('dB', 'K', 'relative')),
      evaluation text not null check (evaluation in ('A', 'B')),
      distribution text not null check (distribution in ('normal', 'rectangular', 'triangular', 'arcsine', 'student')),
      dof double precision check (dof > 0),
      source text not null,
      kind text not null check (kind in ('own_run', 'own_mount', 'shared_offset', 'shared_gain')),
      unique (budget_version_id, quantity, name),
      check ((kind = 'shared_gain') = (unit = 'relative'))
    );

    create function budget_frozen() returns trigger language plpgsql as $$
    declare frozen timestamptz;
    begin
      select frozen_at into frozen from budget_version where id = coalesce(new.budget_version_id, old.budget_version_id);
      if frozen is not null then
        raise exception 'a frozen budget does not change: make a new version' using errcode = 'restrict_violation';
      end if;
      return coalesce(new, old);
    end $$;
    create trigger budget_part_frozen before insert or update or delete on budget_part
      for each row execute function budget_frozen();

    create table keep_out (
      id uuid primary key default uuid_v7(),
      bench_version_id uuid not null references bench_version,
      name text not null,
      shape text not null check (shape in ('box', 'mesh')),
      min_mm double precision[] check (cardinality(min_mm) = 3),
      max_mm double precision[] check (cardinality(max_mm) = 3),
      file_id uuid references file,
      note text not null default '',
      unique (bench_version_id, name),
      check ((shape = 'box') = (min_mm is not null and max_mm is not null)),
      check ((shape = 'mesh') = (file_id is not null)),
      check (shape = 'mesh' or (min_mm[1] < max_mm[1] and min_mm[2] < max_mm[2] and min_mm[3] < max_mm[3]))
    );

    create table protocol (
      id uuid primary key default uuid_v7(),
      slug text not null unique check (is_slug(slug)),
      name text not null
    );

    create table protocol_version (
      id uuid primary key default uuid_v7(),
      protocol_id uuid not null references protocol,
      number integer not null check (number > 0),
      heat_load_w double precision not null check (heat_load_w > 0),
      setting text not null default 'rpm' check (setting in ('rpm', 'drive_percent')),
      set_speeds double precision[] not null check (cardinality(set_speeds) between 1 and 24),
      positions text[] not null default '{on axis}' check (cardinality(positions) >= 1),
      mounts integer not null default 3 check (mounts between 1 and 20),
      runs_per_mount integer not null default 1 check (runs_per_mount between 1 and 20),
      background_grade text not null default 'engineering' check (background_grade in ('engineering', 'survey')),
      epsilon_k double precision not null default 0.1 check (epsilon_k > 0),
      ambient_min_c double precision not null default 18,
      ambient_max_c double precision not null default 28,
      ambient_drift_max_k double precision not null default 0.5 check (ambient_drift_max_k > 0),
      calibrator_drift_max_db double precision not null default 0.5 check (calibrator_drift_max_db > 0),
      level_average_s double precision not null default 10 check (level_average_s > 0),
      minutes_per_run double precision not null default 12 check (minutes_per_run > 0),
      minutes_per_mount double precision not null default 15 check (minutes_per_mount >= 0),
      frozen_at timestamptz,
      check (ambient_min_c < ambient_max_c),
      unique (protocol_id, number)
    );

    create function protocol_frozen() returns trigger language plpgsql as $$
    begin
      if old.frozen_at is not null then
        raise exception 'a frozen protocol does not change: make a new version' using errcode = 'restrict_violation';
      end if;
      return coalesce(new, old);
    end $$;
    create trigger protocol_version_frozen before update or delete on protocol_version
      for each row execute function protocol_frozen();

    create table drive (
      id uuid primary key default uuid_v7(),
      bench_id uuid not null references bench,
      serial text not null,
      description text not null default '',
      bearing text not null default '',
      hours double precision not null default 0 check (hours >= 0),
      unique (bench_id, serial)
    );

    create table drive_level (
      drive_id uuid not null references drive,
      set_speed double precision not null check (set_speed > 0),
      level_dba double precision not null,
      at timestamptz not null default now(),
      primary key (drive_id, set_speed, at)
    );

    create table baseline (
      id uuid primary key default uuid_v7(),
      slug text not null unique check (is_slug(slug)),
      name text not null,
      description text not null default '',
      blades integer check (blades between 2 and 60)
    );

    create table baseline_unit (
      id uuid primary key default uuid_v7(),
      baseline_id uuid not null references baseline,
      serial text not null,
      in_service_from timestamptz not null,
      retired_at timestamptz,
      retired_reason text,
      unique (baseline_id, serial),
      check ((retired_at is null) = (retired_reason is null))
    );
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop table baseline_unit, baseline, drive_level, drive, protocol_version, protocol, keep_out, budget_part, budget_version, microphone_position, bench_version, bench;
    drop function protocol_frozen();
    drop function budget_frozen();
  `);
}
