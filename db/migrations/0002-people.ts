import type { Knex } from "knex";

/** People, their ways in, and what they chose to be told by mail. Everything else refers to a person by id alone. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table person (
      id uuid primary key default uuid_v7(),
      email text,
      handle text check (handle ~ '^[a-z0-9][a-z0-9-]{1,29}$'),
      role text not null default 'member' check (role in ('member', 'operator', 'host')),
      password_hash text,
      email_verified_at timestamptz,
      session_version integer not null default 1 check (session_version > 0),
      created_at timestamptz not null default now(),
      closed_at timestamptz,
      erased_at timestamptz,
      check (erased_at is not null or (email is not null and handle is not null)),
      check (erased_at is null or (email is null and handle is null and password_hash is null and closed_at is not null))
    );
    create unique index person_email on person (lower(email));
    create unique index person_handle on person (lower(handle));

    create table sign_in_attempt (
      id bigint generated always as identity primary key,
      account_key text not null,
      address text not null,
      succeeded boolean not null,
      at timestamptz not null default now()
    );
    create index sign_in_attempt_account on sign_in_attempt (account_key, at desc);
    create index sign_in_attempt_address on sign_in_attempt (address, at desc);

    create table mail_token (
      id uuid primary key default uuid_v7(),
      person_id uuid not null references person,
      purpose text not null check (purpose in ('verify', 'reset', 'change_email')),
      token_hash text not null unique,
      new_email text,
      created_at timestamptz not null default now(),
      expires_at timestamptz not null,
      used_at timestamptz,
      check (expires_at > created_at),
      check ((purpose = 'change_email') = (new_email is not null))
    );
    create index mail_token_person on mail_token (person_id, purpose);

    create table access_token (
      id uuid primary key default uuid_v7(),
      person_id uuid not null references person,
      name text not null check (length(name) between 1 and 80),
      token_hash text not null unique,
      scopes text[] not null default '{}',
      created_at timestamptz not null default now(),
      expires_at timestamptz,
      last_used_at timestamptz,
      revoked_at timestamptz
    );
    create index access_token_person on access_token (person_id);

    create table mail_choice (
      person_id uuid not null references person,
      topic text not null check (topic in ('entry_state', 'questions', 'corrections', 'seasons', 'watched')),
      wanted boolean not null,
      primary key (person_id, topic)
    );
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`drop table mail_choice, access_token, mail_token, sign_in_attempt, person`);
}
