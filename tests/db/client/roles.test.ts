import { expect, inject, test } from "vitest";
import { withClient } from "@/db/cluster/roles";
import { setUpDatabase } from "@/tests/setup/database";

const database = setUpDatabase();

test("none of the product's roles is more than a role that signs in", async () => {
  const rows = await withClient(inject("cluster").adminUrl, async (client) => {
    const found = await client.query(
      `select rolname, rolsuper, rolcreatedb, rolcreaterole, rolbypassrls, rolreplication from pg_roles
       where rolname like 'fanfold_%' and rolname <> 'fanfold_admin' order by rolname`,
    );
    return found.rows as Record<string, unknown>[];
  });
  expect(rows.map((row) => row.rolname)).toEqual(["fanfold_app", "fanfold_owner", "fanfold_public"]);
  for (const row of rows) expect(Object.values(row).slice(1)).toEqual([false, false, false, false, false]);
});

test("the application owns nothing and is no member of the owner", async () => {
  const found: { rows: { n: number }[] } = await database.app.raw(
    "select count(*) as n from pg_class where relowner = current_user::regrole",
  );
  expect(found.rows).toEqual([{ n: 0 }]);
  await expect(database.app.raw("set role fanfold_owner")).rejects.toThrow(/permission denied/);
});

test("a password is asked for, also on the loopback address", async () => {
  const url = new URL(database.urls.app);
  url.password = "wrong";
  await expect(withClient(url.href, (client) => client.query("select 1"))).rejects.toThrow(
    /password authentication failed/,
  );
});
