import { expect, test } from "vitest";
import { sqlExecutor } from "@/db/client/executor";
import { setUpDatabase } from "@/tests/setup/database";

const database = setUpDatabase();

async function one(sql: string): Promise<unknown> {
  const found: { rows: { value: unknown }[] } = await database.app.raw(sql);
  return found.rows[0]?.value;
}

test("counts, bigints and numerics arrive as numbers, dates as their own text, times as instants", async () => {
  expect(await one("select count(*) as value from person")).toBe(0);
  expect(await one("select 9007199254740991::bigint as value")).toBe(9007199254740991);
  expect(await one("select 12.50::numeric as value")).toBe(12.5);
  expect(await one("select date '2026-03-29' as value")).toBe("2026-03-29");
  expect(await one("select timestamptz '2026-03-29 01:30+00' as value")).toEqual(new Date("2026-03-29T01:30:00Z"));
  expect(await one("select array[1, null, 3]::bigint[] as value")).toEqual([1, null, 3]);
  expect(await one("select '{}'::numeric[] as value")).toEqual([]);
  expect(await one("select array[date '2026-01-02'] as value")).toEqual(["2026-01-02"]);
});

test("a bigint that a number can't hold exactly is an error, not a near miss", async () => {
  await expect(one("select 9007199254740993::bigint as value")).rejects.toThrow(RangeError);
  await expect(one("select 'NaN'::numeric as value")).rejects.toThrow(RangeError);
});

test("numbered parameters keep their values in any order, twice used or beside a question mark", async () => {
  const { rows } = await sqlExecutor(database.app).executeSql(
    `select $2::text as second, $1::int as first, $2::text as again, '{"a":1}'::jsonb ? 'a' as has, $3::text as nothing`,
    [7, "two", undefined],
  );
  expect(rows).toEqual([{ second: "two", first: 7, again: "two", has: true, nothing: null }]);
});
