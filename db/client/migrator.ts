import { readdirSync } from "node:fs";
import path from "node:path";
import { pathToFileURL } from "node:url";
import type { Knex } from "knex";
import { ownerDb } from "./handles";

interface MigrationFile {
  name: string;
  file: string;
}

/** Numbered files that export `up` and `down`; applied in the order of their names, which are kept without the ending. */
export function migrationFiles(folder = path.resolve(import.meta.dirname, "../migrations")): MigrationFile[] {
  return readdirSync(folder)
    .filter((file) => /^\d{4}-[a-z0-9-]+\.ts$/.test(file))
    .sort()
    .map((file) => ({ name: file.replace(/\.ts$/, ""), file: path.join(folder, file) }));
}

const source: Knex.MigrationSource<MigrationFile> = {
  getMigrations: async () => migrationFiles(),
  getMigrationName: (migration) => migration.name,
  getMigration: async (migration) => (await import(pathToFileURL(migration.file).href)) as Knex.Migration,
};

export const migrationConfig = { migrationSource: source, tableName: "schema_migration" } satisfies Knex.MigratorConfig;

/** The number that stands for "migrating this product" among PostgreSQL's advisory locks; any fixed number will do. */
const advisoryLock = 7_246_001;

/**
 * Runs work on the schema while no other process does: the lock belongs to a session of the server's, so it goes when
 * the process dies. Knex's own lock is a row that stays after a crash; under ours it may be freed first.
 */
async function withSchemaLock<T>(url: string, work: (owner: Knex) => Promise<T>): Promise<T> {
  const owner = ownerDb(url);
  const guard = await owner.client.acquireConnection();
  try {
    await guard.query("select pg_advisory_lock($1)", [advisoryLock]);
    await owner.migrate.forceFreeMigrationsLock(migrationConfig);
    return await work(owner);
  } finally {
    await guard.query("select pg_advisory_unlock($1)", [advisoryLock]).catch(() => undefined);
    await owner.client.releaseConnection(guard);
    await owner.destroy();
  }
}

/**
 * Applies what is pending, each file in a transaction of its own.
 *
 * @param url the owner's address
 * @param afterwards further work on the schema under the same lock
 * @returns the names applied, in order; empty when the schema was current
 */
export function migrateUp(url: string, afterwards?: (owner: Knex) => Promise<void>): Promise<string[]> {
  return withSchemaLock(url, async (owner) => {
    const [, applied]: [number, string[]] = await owner.migrate.latest(migrationConfig);
    await afterwards?.(owner);
    return applied;
  });
}

/** Takes back the newest migration, or all of them; gives the names in the order taken back. */
export function migrateDown(url: string, all: boolean): Promise<string[]> {
  return withSchemaLock(url, async (owner) => {
    if (all) {
      const [, names]: [number, string[]] = await owner.migrate.rollback(migrationConfig, true);
      return names;
    }
    const [, names]: [number, string[]] = await owner.migrate.down(migrationConfig);
    return names;
  });
}

/** Names of the migrations that this program has and the database hasn't. Any role that may read the list can ask. */
export async function pendingMigrations(handle: Knex): Promise<string[]> {
  const known = await handle.schema.hasTable(migrationConfig.tableName);
  const rows: { name: string }[] = known ? await handle(migrationConfig.tableName).select("name") : [];
  const applied = new Set(rows.map((row) => row.name));
  return migrationFiles().flatMap((each) => (applied.has(each.name) ? [] : [each.name]));
}
