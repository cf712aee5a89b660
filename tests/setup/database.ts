import { randomBytes } from "node:crypto";
import type { Knex } from "knex";
import { afterAll, beforeAll, inject } from "vitest";
import type { DatabaseUrls } from "@/db/cluster/cluster";
import { dropDatabase, ensureDatabase } from "@/db/cluster/roles";
import { connect } from "@/db/client/connect";
import { closeDbs } from "@/db/client/handles";
import { adoptEnvironment } from "@/lib/env/env";

export interface TestDatabase {
  /** The schema's owner, for laying out rows that the application may not write. */
  owner: Knex;
  /** The application's own role, which use-cases and queries run as. */
  app: Knex;
  /** The public reader. */
  public: Knex;
  urls: DatabaseUrls;
  /** Closes the handles and drops the database. */
  close(): Promise<void>;
}

/**
 * A database of one's own on the project's server.
 *
 * @param content "migrated" is a copy of the migrated template; "empty" has no table yet
 */
export async function freshDatabase(content: "migrated" | "empty" = "migrated"): Promise<TestDatabase> {
  const { adminUrl, template, templateUrls } = inject("cluster");
  const name = `test_${randomBytes(6).toString("hex")}`;
  await ensureDatabase(adminUrl, name, content === "migrated" ? template : undefined);
  const urls = urlsOf(templateUrls, name);
  const handles = { owner: connect(urls.owner), app: connect(urls.app), public: connect(urls.public) };
  return {
    ...handles,
    urls,
    async close() {
      await Promise.all(Object.values(handles).map((each) => each.destroy()));
      await dropDatabase(adminUrl, name);
    },
  };
}

/**
 * Gives the test file a migrated database of its own, from before its first test until after its last, and points the
 * settings (`appDb()`, `publicDb()`) at it. Read its members inside tests and hooks, not while the file loads.
 */
export function setUpDatabase(): Omit<TestDatabase, "close"> {
  let made: TestDatabase | undefined;
  beforeAll(async () => {
    made = await freshDatabase();
    adoptEnvironment({
      DATABASE_URL: made.urls.app,
      PUBLIC_DATABASE_URL: made.urls.public,
      MIGRATE_DATABASE_URL: made.urls.owner,
    });
  });
  afterAll(async () => {
    await closeDbs();
    await made?.close();
  });
  const ready = (): TestDatabase => {
    if (!made) throw new Error("The test database is there once the tests run, not while the file loads.");
    return made;
  };
  return {
    get owner() {
      return ready().owner;
    },
    get app() {
      return ready().app;
    },
    get public() {
      return ready().public;
    },
    get urls() {
      return ready().urls;
    },
  };
}

/** Every database of the server has the same roles: only the name in the address differs. */
function urlsOf(urls: DatabaseUrls, database: string): DatabaseUrls {
  const renamed = (address: string): string => {
    const made = new URL(address);
    made.pathname = `/${database}`;
    return made.href;
  };
  return { owner: renamed(urls.owner), app: renamed(urls.app), public: renamed(urls.public) };
}
