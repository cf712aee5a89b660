import { expect, test } from "vitest";
import { connect } from "@/db/client/connect";
import { migrateDown, migrationFiles, pendingMigrations } from "@/db/client/migrator";
import { migrateEverything } from "@/lib/cli/migrate";
import { freshDatabase, type TestDatabase } from "@/tests/setup/database";

const listTables = `select table_schema || '.' || table_name as name from information_schema.tables
  where table_schema in ('public', 'shown') and table_name not like 'schema_migration%' order by 1`;

async function tables(database: TestDatabase): Promise<string[]> {
  const found: { rows: { name: string }[] } = await database.owner.raw(listTables);
  return found.rows.map((row) => row.name);
}

test("every migration goes up, down to nothing, and up again to the same tables", async () => {
  const database = await freshDatabase("empty");
  try {
    const all = migrationFiles().map((each) => each.name);
    expect(all.length).toBeGreaterThan(0);
    expect(await pendingMigrations(database.owner)).toEqual(all);
    expect(await migrateEverything(database.urls.owner)).toEqual(all);
    const first = await tables(database);
    expect(await pendingMigrations(database.app)).toEqual([]);
    expect(await migrateDown(database.urls.owner, true)).toEqual(all.toReversed());
    expect(await tables(database)).toEqual([]);
    await migrateEverything(database.urls.owner);
    expect(await tables(database)).toEqual(first);
  } finally {
    await database.close();
  }
});

test("two processes that migrate at once apply each migration once", async () => {
  const database = await freshDatabase("empty");
  try {
    const both = await Promise.all([migrateEverything(database.urls.owner), migrateEverything(database.urls.owner)]);
    expect(both.flat().sort()).toEqual(migrationFiles().map((each) => each.name));
  } finally {
    await database.close();
  }
});

test("a lock row that a killed migration left behind does not stop the next one", async () => {
  const database = await freshDatabase();
  try {
    await database.owner("schema_migration_lock").update({ is_locked: 1 });
    expect(await migrateEverything(database.urls.owner)).toEqual([]);
  } finally {
    await database.close();
  }
});

test("neither the application nor the public reader may make or change tables", async () => {
  const database = await freshDatabase();
  try {
    for (const url of [database.urls.app, database.urls.public]) {
      const handle = connect(url);
      try {
        await expect(handle.raw("create table mine (a integer)")).rejects.toThrow(/permission denied|read-only/);
        await expect(handle.raw("create schema mine")).rejects.toThrow(/permission denied|read-only/);
        await expect(handle.raw("drop table person")).rejects.toThrow(/must be owner|permission denied|read-only/);
      } finally {
        await handle.destroy();
      }
    }
  } finally {
    await database.close();
  }
});
