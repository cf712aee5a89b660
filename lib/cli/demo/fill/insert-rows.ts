import type { Handle } from "@/db/client/connect";

/** Inserts rows of one shape in one statement with one parameter; columns that are not named keep their defaults. */
export async function insertRows(
  db: Handle,
  table: string,
  rows: readonly Readonly<Record<string, unknown>>[],
): Promise<void> {
  const [first] = rows;
  if (!first) return;
  const columns = Object.keys(first);
  const names = columns.map(() => "??").join(", ");
  await db.raw(
    `insert into ?? (${names}) select ${names} from json_populate_recordset(null::??, ?::json) on conflict do nothing`,
    [table, ...columns, ...columns, table, JSON.stringify(rows)],
  );
}
