import knex, { type Knex } from "knex";
import type { Client } from "pg";
import { typeParser } from "./parsers";

/** What every query function takes first, so that a transaction passes through unchanged. */
export type Handle = Knex;

export interface ConnectionOptions {
  /** Most connections that this process keeps. */
  poolMax?: number;
  /** Shown in pg_stat_activity. */
  name?: string;
}

/** Opens a pool on a database; `destroy()` closes it. Nothing connects before the first query. */
export function connect(url: string, { poolMax = 10, name = "fanfold" }: ConnectionOptions = {}): Knex {
  return knex({
    client: "pg",
    connection: {
      connectionString: url,
      application_name: name,
      connectionTimeoutMillis: 10_000,
      types: { getTypeParser: typeParser },
    },
    pool: { min: 0, max: poolMax, afterCreate: withoutJit },
    acquireConnectionTimeout: 15_000,
  });
}

/**
 * Pages ask short questions over joins that the planner thinks are long: compiling them took longer than answering, near
 * a second each over a hundred thousand entries.
 */
function withoutJit(connection: Client, done: (error: Error | null, connection: Client) => void): void {
  connection.query("set jit = off", (error: Error | null) => done(error, connection));
}
