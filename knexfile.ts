import type { Knex } from "knex";
import { migrationConfig } from "@/db/client/migrator";
import { requiredEnv } from "@/lib/env/env";

/** For Knex's own command (`node --import tsx node_modules/.bin/knex …`); `npm run migrate` needs nothing of it. */
const config: Knex.Config = {
  client: "pg",
  connection: requiredEnv("MIGRATE_DATABASE_URL"),
  migrations: migrationConfig,
};

export default config;
