import type { Knex } from "knex";
import { roleNames } from "../cluster/roles";

/**
 * Band spectra of runs, session backgrounds and calibrations, as read from a recording or given as bands. A row is a raw
 * reading and kept like one: insert only; a later row supersedes it, in a closed session only for a review or a
 * correction. Levels are in dB as read, over the used seconds, not background-corrected. Who brought one in may not sign.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table spectrum (
      id uuid primary key default uuid_v7(),
      session_id uuid not null references session,
      run_id uuid references run,
      position_id uuid not null references microphone_position,
      purpose text not null check (purpose in ('run', 'background', 'calibration')),
      source text not null check (source in ('recording', 'bands')),
      log_file_id uuid references log_file,
      reader_version integer not null check (reader_version > 0),
      level_z_db double precision check (level_z_db between -200 and 300),
      level_c_db double precision check (level_c_db between -200 and 300),
      level_a_dba double precision check (level_a_dba between -200 and 300),
      -- [{nominalHz, midHz, levelDb}] in rising order; levelDb may be null
      bands jsonb not null check (jsonb_typeof(bands) = 'array'),
      -- as the report on a recording lists them
      tones jsonb not null default '[]' check (jsonb_typeof(tones) = 'array'),
      -- speeds that the sound tells, rotor 1 first; null where it tells none
      speeds_rpm jsonb check (jsonb_typeof(speeds_rpm) = 'array'),
      loudness_sone double precision check (loudness_sone between 0 and 1e6),
      loudness_phon double precision check (loudness_phon between 0 and 300),
      duration_s double precision check (duration_s > 0 and duration_s < 1e9),
      used_s double precision check (used_s between 0 and duration_s),
      -- [{fromS, toS}]
      disturbed jsonb not null default '[]' check (jsonb_typeof(disturbed) = 'array'),
      -- [{code, message}]
      warnings jsonb not null default '[]' check (jsonb_typeof(warnings) = 'array'),
      supersedes uuid unique references spectrum,
      review_id uuid references review,
      correction_id uuid references correction,
      reason text,
      by_person uuid not null references person,
      at timestamptz not null default now(),
      check ((purpose = 'run') = (run_id is not null)),
      check (source <> 'recording' or log_file_id is not null),
      check ((loudness_sone is null) = (loudness_phon is null)),
      check (review_id is null or correction_id is null),
      check (supersedes is null or coalesce(btrim(reason), '') <> '')
    );
    create index spectrum_session on spectrum (session_id);
    create index spectrum_run on spectrum (run_id);
    create index spectrum_by_person on spectrum (by_person);
    create index spectrum_correction on spectrum (correction_id) where correction_id is not null;
    select keep_as_written('spectrum');

    create function spectrum_allowed() returns trigger language plpgsql as $$
    declare s session%rowtype; old_one spectrum%rowtype;
    begin
      select * into s from session where id = new.session_id for share;
      if new.run_id is not null and not exists (select 1 from run where id = new.run_id and session_id = new.session_id) then
        raise exception 'a spectrum is of a run of its session' using errcode = 'foreign_key_violation';
      end if;
      if not exists (select 1 from microphone_position where id = new.position_id and bench_version_id = s.bench_version_id) then
        raise exception 'a spectrum is of a microphone position of its bench version' using errcode = 'foreign_key_violation';
      end if;
      if new.log_file_id is not null and not exists (
        select 1 from log_file where id = new.log_file_id and session_id = new.session_id) then
        raise exception 'a spectrum is of a file of its session' using errcode = 'foreign_key_violation';
      end if;
      if s.ended_at is not null and (new.supersedes is null or (new.review_id is null and new.correction_id is null)) then
        raise exception 'a closed session takes only spectra that supersede others for a review or a correction'
          using errcode = 'restrict_violation';
      end if;
      if new.supersedes is not null then
        select * into old_one from spectrum where id = new.supersedes;
        if (old_one.session_id, old_one.run_id, old_one.purpose, old_one.position_id)
          is distinct from (new.session_id, new.run_id, new.purpose, new.position_id) then
          raise exception 'a spectrum supersedes one of the same purpose, run and position' using errcode = 'restrict_violation';
        end if;
      end if;
      return new;
    end $$;
    create trigger spectrum_allowed before insert on spectrum for each row execute function spectrum_allowed();

    create or replace function may_sign(the_round uuid, the_person uuid) returns boolean language sql stable as $$
      select (
          exists (select 1 from person where id = the_person and role in ('operator', 'host') and closed_at is null)
          or exists (select 1 from review_loan where round_id = the_round and person_id = the_person)
        )
        and not exists (
          select 1 from reading d join session s on s.id = d.session_id where s.round_id = the_round and d.taken_by = the_person)
        and not exists (
          select 1 from spectrum d join session s on s.id = d.session_id where s.round_id = the_round and d.by_person = the_person)
        and not exists (
          select 1 from round_entry re join entry e on e.id = re.entry_id join revision r on r.id = e.revision_id
            join design_owner o on o.design_id = r.design_id
          where re.round_id = the_round and o.person_id = the_person
            and (o.until_at is null or o.until_at >= re.added_at))
    $$;

    create view shown.spectrum as
      select d.id, d.session_id, d.run_id, d.position_id, d.purpose, d.source, d.log_file_id, d.reader_version, d.level_z_db, d.level_c_db,
        d.level_a_dba, d.bands, d.tones, d.speeds_rpm, d.loudness_sone, d.loudness_phon, d.duration_s, d.used_s, d.disturbed, d.warnings,
        d.supersedes, d.correction_id, d.reason, d.at
      from spectrum d
      where (d.correction_id is null or exists (select 1 from correction c where c.id = d.correction_id and c.published_at is not null))
        and (case when d.run_id is null
          then exists (select 1 from publication_session p where p.session_id = d.session_id)
          else exists (select 1 from run r join publication_session p on p.session_id = r.session_id
            where r.id = d.run_id and (r.entry_id is null or r.entry_id = p.entry_id)) end);

    grant select, insert on spectrum to ${roleNames.app};
    grant select on shown.spectrum to ${roleNames.app}, ${roleNames.public};
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop view shown.spectrum;
    create or replace function may_sign(the_round uuid, the_person uuid) returns boolean language sql stable as $$
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
    drop table spectrum;
    drop function spectrum_allowed();
  `);
}
