import type { Knex } from "knex";

/**
 * Designs last over seasons; a revision is one geometry and its files never change once it was sent in.
 * Traits stand in typed columns (what holds), with what was read, what was declared and which holds beside them.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table frame (
      id uuid primary key default uuid_v7(),
      key text not null unique check (key ~ '^[0-9]+x[0-9]+$'),
      class_mm integer not null check (class_mm in (80, 92, 120, 140)),
      outer_mm double precision not null check (outer_mm > 0),
      hole_spacing_mm double precision not null check (hole_spacing_mm > 0 and hole_spacing_mm < outer_mm),
      hole_diameter_mm double precision not null check (hole_diameter_mm > 0),
      bore_mm double precision not null check (bore_mm > 0 and bore_mm < outer_mm),
      depth_mm double precision not null check (depth_mm > 0),
      tolerance_mm double precision not null check (tolerance_mm >= 0)
    );

    create table design (
      id uuid primary key default uuid_v7(),
      number integer generated always as identity unique,
      slug text not null unique check (is_slug(slug)),
      name text not null check (length(name) between 1 and 80),
      summary text not null default '' check (length(summary) <= 2000),
      created_by uuid not null references person,
      created_at timestamptz not null default now()
    );
    create index design_created_by on design (created_by);

    create table design_name (
      id bigint generated always as identity primary key,
      design_id uuid not null references design,
      name text not null,
      at timestamptz not null default now()
    );
    create index design_name_design on design_name (design_id, at);

    create function note_design_name() returns trigger language plpgsql as $$
    begin
      if tg_op = 'UPDATE' and new.slug <> old.slug then
        raise exception 'a slug is for ever' using errcode = 'restrict_violation';
      end if;
      if tg_op = 'INSERT' or new.name <> old.name then
        insert into design_name (design_id, name) values (new.id, new.name);
      end if;
      return null;
    end $$;
    create trigger design_name_history after insert or update on design for each row execute function note_design_name();

    create table design_owner (
      id uuid primary key default uuid_v7(),
      design_id uuid not null references design,
      person_id uuid not null references person,
      from_at timestamptz not null default now(),
      until_at timestamptz,
      check (until_at is null or until_at > from_at),
      exclude using gist (design_id with =, person_id with =, tstzrange(from_at, until_at) with &&)
    );
    create index design_owner_person on design_owner (person_id);

    create table revision (
      id uuid primary key default uuid_v7(),
      design_id uuid not null references design,
      letter text not null check (letter ~ '^[A-Z]{1,2}$'),
      licence text not null check (licence in ('CC0-1.0', 'CC-BY-4.0', 'CC-BY-SA-4.0', 'CC-BY-NC-4.0', 'CC-BY-NC-SA-4.0')),
      changes text not null default '' check (length(changes) <= 4000),
      print_notes text not null default '' check (length(print_notes) <= 4000),
      created_at timestamptz not null default now(),
      sent_in_at timestamptz,
      unique (design_id, letter)
    );

    create table revision_trait (
      revision_id uuid primary key references revision,
      stages integer not null check (stages between 1 and 4),
      counter_rotating boolean not null default false,
      spacer_mm double precision not null default 0 check (spacer_mm >= 0),
      inlet_stack text not null default 'none' check (inlet_stack in ('none', 'bellmouth', 'cone', 'straight')),
      inlet_stack_mm double precision not null default 0 check (inlet_stack_mm >= 0),
      struts integer not null default 0 check (struts between 0 and 40),
      frame_id uuid not null references frame,
      tip_gap_mm double precision check (tip_gap_mm >= 0),
      material text not null check (material in ('PLA', 'PETG', 'ABS', 'ASA', 'PA', 'PC', 'resin', 'other')),
      print_time_min double precision check (print_time_min > 0),
      traits_read jsonb not null default '{}',
      traits_declared jsonb not null default '{}',
      holds jsonb not null default '{}',
      check (not counter_rotating or stages >= 2),
      check ((inlet_stack = 'none') = (inlet_stack_mm = 0))
    );

    create table rotor (
      revision_id uuid not null references revision,
      position integer not null check (position between 1 and 4),
      blades integer not null check (blades between 2 and 60),
      hand text not null check (hand in ('right', 'left')),
      hub_diameter_mm double precision check (hub_diameter_mm > 0),
      tip_diameter_mm double precision check (tip_diameter_mm > hub_diameter_mm),
      swept_diameter_mm double precision check (swept_diameter_mm > 0),
      axial_depth_mm double precision check (axial_depth_mm > 0),
      pitch_mid_deg double precision check (pitch_mid_deg between 0 and 90),
      chord_mid_mm double precision check (chord_mid_mm > 0),
      solidity_mid double precision check (solidity_mid > 0),
      shroud boolean not null default false,
      unequal_spacing boolean not null default false,
      mass_g double precision check (mass_g > 0),
      traits_read jsonb not null default '{}',
      traits_declared jsonb not null default '{}',
      holds jsonb not null default '{}',
      primary key (revision_id, position)
    );

    create table derivation (
      revision_id uuid not null references revision,
      from_revision_id uuid not null references revision,
      note text not null default '',
      primary key (revision_id, from_revision_id),
      check (revision_id <> from_revision_id)
    );

    create table file (
      id uuid primary key default uuid_v7(),
      sha256 text not null unique check (sha256 ~ '^[0-9a-f]{64}$'),
      bytes bigint not null check (bytes >= 0),
      kind text not null check (kind in ('stl', '3mf', 'step', 'csv', 'wav', 'png', 'jpeg', 'webp', 'pdf', 'text', 'unknown')),
      state text not null default 'quarantined' check (state in ('quarantined', 'read', 'refused', 'taken_down')),
      storage_key text not null,
      received_at timestamptz not null default now(),
      received_from uuid references person,
      reason text,
      taken_down_at timestamptz,
      check ((state = 'taken_down') = (taken_down_at is not null)),
      check (state not in ('refused', 'taken_down') or reason is not null)
    );

    -- One upload on its way: a random one-use key, a length that was signed, and what became of it.
    create table upload (
      id uuid primary key default uuid_v7(),
      person_id uuid not null references person,
      purpose text not null check (purpose in ('model', 'photograph', 'source', 'print_profile', 'log', 'recording')),
      subject_id uuid not null,
      quarantine_key text not null unique,
      name text not null check (length(name) between 1 and 255),
      bytes bigint not null check (bytes > 0),
      state text not null default 'sending' check (state in ('sending', 'received', 'read', 'refused')),
      file_id uuid references file,
      progress jsonb not null default '{}',
      reason text,
      created_at timestamptz not null default now(),
      finished_at timestamptz
    );
    create index upload_person on upload (person_id, created_at desc);

    create table attachment (
      id uuid primary key default uuid_v7(),
      revision_id uuid not null references revision,
      file_id uuid not null references file,
      role text not null check (role in ('model', 'photograph', 'source', 'print_profile')),
      name text not null check (length(name) between 1 and 255),
      ordinal integer not null default 1,
      unique (revision_id, role, ordinal)
    );
    create index attachment_file on attachment (file_id);

    create table mesh_reading (
      id uuid primary key default uuid_v7(),
      file_id uuid not null references file,
      reader_version text not null,
      result jsonb not null,
      at timestamptz not null default now(),
      unique (file_id, reader_version)
    );

    create function refuse_after_sending_in() returns trigger language plpgsql as $$
    declare sent timestamptz;
    begin
      select sent_in_at into sent from revision where id = coalesce(new.revision_id, old.revision_id);
      if sent is not null then
        raise exception 'the files of a revision that was sent in do not change' using errcode = 'restrict_violation';
      end if;
      return coalesce(new, old);
    end $$;
    create trigger attachment_fixed before insert or update or delete on attachment
      for each row execute function refuse_after_sending_in();

    create function revision_fixed() returns trigger language plpgsql as $$
    begin
      if new.letter <> old.letter or new.design_id <> old.design_id
        or (old.sent_in_at is not null and new.sent_in_at is distinct from old.sent_in_at) then
        raise exception 'a revision keeps its letter, its design and the moment it was sent in' using errcode = 'restrict_violation';
      end if;
      return new;
    end $$;
    create trigger revision_fixed before update on revision for each row execute function revision_fixed();
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop table mesh_reading, attachment, upload, file, derivation, rotor, revision_trait, revision, design_owner, design_name, design, frame;
    drop function revision_fixed();
    drop function refuse_after_sending_in();
    drop function note_design_name();
  `);
}
