import type { Knex } from "knex";

/**
 * What every later table leans on: ids that sort by time, and the triggers that keep a row as it was written.
 * TRUNCATE has a trigger of its own, since row triggers do not see it.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create extension if not exists btree_gist;

    -- UUID version 7 (RFC 9562, 5.7): 48 bits of milliseconds, then random bits.
    create function uuid_v7() returns uuid language sql volatile parallel safe as $$
      select encode(
        set_bit(set_bit(
          overlay(uuid_send(gen_random_uuid())
            placing substring(int8send((extract(epoch from clock_timestamp()) * 1000)::bigint) from 3) from 1 for 6),
          52, 1), 53, 1), 'hex')::uuid
    $$;

    create function refuse_change() returns trigger language plpgsql as $$
    begin
      raise exception 'rows of % are insert only', tg_table_name using errcode = 'restrict_violation';
    end $$;

    create function keep_as_written(target regclass) returns void language plpgsql as $$
    begin
      execute format('create trigger insert_only before update or delete on %s for each row execute function refuse_change()', target);
      execute format('create trigger never_truncated before truncate on %s for each statement execute function refuse_change()', target);
    end $$;

    create function is_slug(text) returns boolean language sql immutable as $$
      select $1 ~ '^[a-z0-9]+(-[a-z0-9]+)*$' and length($1) <= 80
    $$;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop function is_slug(text);
    drop function keep_as_written(regclass);
    drop function refuse_change();
    drop function uuid_v7();
  `);
}
