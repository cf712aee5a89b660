import type { Knex } from "knex";
import { roleNames } from "../cluster/roles";

/**
 * Recordings of the bench on their way: what each is to be read as, how far that is, and what came of it. One that is
 * kept has its row of log_file. A recording's bytes may be served only once somebody listened to it and heard no voices:
 * that is a row of its own, which stays.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table recording_read (
      id uuid primary key default uuid_v7(),
      session_id uuid not null references session,
      run_id uuid references run,
      position_id uuid not null references microphone_position,
      purpose text not null check (purpose in ('run', 'background', 'calibration')),
      phase text check (phase in ('before', 'after')),
      upload_id uuid not null,
      file_id uuid not null references file,
      name text not null,
      -- what it is read as: channel, calibration, background, rotors, by value
      asked jsonb not null,
      state text not null default 'waiting' check (state in ('waiting', 'reading', 'read', 'refused', 'cancelled')),
      done_bytes bigint not null default 0 check (done_bytes >= 0),
      -- {code, message, at}
      refusal jsonb,
      -- {report, calibrator, given}
      result jsonb,
      log_file_id uuid unique references log_file,
      kept_at timestamptz,
      by_person uuid not null references person,
      created_at timestamptz not null default now(),
      finished_at timestamptz,
      check ((purpose = 'run') = (run_id is not null)),
      check ((purpose = 'calibration') = (phase is not null)),
      check ((state = 'read') = (result is not null)),
      check ((state = 'refused') = (refusal is not null)),
      check ((log_file_id is null) = (kept_at is null)),
      check (kept_at is null or state = 'read')
    );
    create index recording_read_session on recording_read (session_id, created_at);
    create index recording_read_run on recording_read (run_id);
    create index recording_read_file on recording_read (file_id);

    create table recording_listened (
      recording_id uuid primary key references recording_read,
      by_person uuid not null references person,
      at timestamptz not null default now()
    );
    select keep_as_written('recording_listened');

    grant select, insert, update on recording_read to ${roleNames.app};
    grant select, insert on recording_listened to ${roleNames.app};
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`drop table recording_listened, recording_read`);
}
