import type { Handle } from "@/db/client/connect";
import { insertRows } from "./insert-rows";

/** What the filled-in seasons lean on: the demo's bench, its people, and everything that carries an id. */
export interface FieldBench {
  benchId: string;
  versions: { id: string; budgetId: string }[];
  protocolVersionIds: string[];
  baselineUnitIds: string[];
  ruleVersionId: string;
  methodVersion: number;
  frames: Map<string, string>;
  /** Ids of designers by handle. */
  designers: { id: string; handle: string }[];
  operatorId: string;
  lastSeason: number;
}

async function column<T>(db: Handle, sql: string): Promise<T[]> {
  const { rows }: { rows: T[] } = await db.raw(sql);
  return rows;
}

/** Reads the demo's bench from a seeded database. @throws when it isn't there */
export async function readFieldBench(db: Handle): Promise<FieldBench> {
  const versions = await column<{ id: string; budgetId: string; benchId: string }>(
    db,
    `select v.id, b.id as "budgetId", v.bench_id as "benchId" from bench_version v join bench n on n.id = v.bench_id
       join budget_version b on b.bench_version_id = v.id where n.slug = 'alder' and b.number = 1 order by v.number`,
  );
  const ids = async (sql: string) => (await column<{ id: string }>(db, sql)).map((row) => row.id);
  const frames = await column<{ id: string; key: string }>(db, "select id, key from frame");
  const [method] = await column<{ number: number }>(db, "select max(number) as number from method_version");
  const [season] = await column<{ number: number | null }>(db, "select max(number) as number from season");
  const [operatorId] = await ids("select id from person where handle = 'benchwright'");
  const [ruleVersionId] = await ids(
    "select id from scoring_rule_version where kind = 'equal-noise' order by id limit 1",
  );
  const [first] = versions;
  if (!first || !operatorId || !ruleVersionId || !method) throw new Error("the demo's bench is not in this database");
  return {
    benchId: first.benchId,
    versions,
    protocolVersionIds: await ids("select id from protocol_version order by number"),
    baselineUnitIds: await ids("select id from baseline_unit order by serial"),
    ruleVersionId,
    methodVersion: method.number,
    frames: new Map(frames.map((row) => [row.key, row.id])),
    designers: [],
    operatorId,
    lastSeason: season?.number ?? 0,
  };
}

/** One designer to so many entries, up to two thousand: invented members without a password. */
const entriesPerDesigner = 40;

/** Adds designers to the invented members of the demo. @returns all who may own a design */
export async function addDesigners(db: Handle, entries: number): Promise<FieldBench["designers"]> {
  const known = await column<{ handle: string }>(
    db,
    "select handle from person where role = 'member' and handle !~ '[0-9]' order by handle",
  );
  const wanted = Math.min(2000, Math.ceil(entries / entriesPerDesigner));
  const made = Array.from({ length: wanted }, (_, n) => `${known[n % known.length]?.handle ?? "member"}-${n + 1}`);
  await insertRows(
    db,
    "person",
    made.map((handle) => ({
      email: `${handle}@alder.example`,
      handle,
      role: "member",
      email_verified_at: "2024-12-05T10:00:00Z",
    })),
  );
  return db("person")
    .where({ role: "member" })
    .whereNotNull("handle")
    .orderBy("handle")
    .select<FieldBench["designers"]>("id", "handle");
}
