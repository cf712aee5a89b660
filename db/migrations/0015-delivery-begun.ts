import type { Knex } from "knex";

/**
 * A letter is noted as begun before it is handed over. If the worker dies in between, nobody knows whether it went out:
 * it isn't sent a second time, and the row says so.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    alter table delivery add column begun_at timestamptz;
    create index delivery_begun on delivery (begun_at) where state = 'waiting' and begun_at is not null;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop index delivery_begun;
    alter table delivery drop column begun_at;
  `);
}
