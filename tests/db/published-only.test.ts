import { beforeAll, describe, expect, it } from "vitest";
import { publishDueRounds, scheduleRound } from "@/lib/server/publishing/schedule";
import { signRound } from "@/lib/server/review/sign-round";
import { asHost, asReviewer, makeBenchWorld, measureRound, type BenchWorld } from "../factories/measured-round";
import { setUpDatabase } from "../setup/database";

const db = setUpDatabase();
let world: BenchWorld;
let first: Awaited<ReturnType<typeof measureRound>>;
let second: Awaited<ReturnType<typeof measureRound>>;

beforeAll(async () => {
  // As if so many drafts had been made before.
  await db.owner.raw("alter table design alter column number restart with 500");
  world = await makeBenchWorld(db.owner);
  first = await measureRound(world, { number: 1 });
  second = await measureRound(world, { number: 2 });
});

/** Every row of every view that the public role may read, as text. */
async function allThatIsShown(): Promise<Map<string, string[]>> {
  const { rows: views }: { rows: { name: string }[] } = await db.owner.raw(
    `select table_name as name from information_schema.views where table_schema = 'shown' order by 1`,
  );
  expect(views.length).toBeGreaterThan(30);
  const shown = new Map<string, string[]>();
  for (const { name } of views) {
    const { rows }: { rows: { text: string }[] } = await db.public.raw(`select v::text as text from shown.?? v`, [
      name,
    ]);
    shown.set(
      name,
      rows.map((row) => row.text),
    );
  }
  return shown;
}

/** Ids of a round, its entries, designs, revisions, specimens, session, runs and readings, and the designs' slugs. */
async function secretsOf({ roundId, sessionId, entryIds }: typeof first): Promise<string[]> {
  const { rows }: { rows: { word: string }[] } = await db.owner.raw(
    `select unnest(array[e.id::text, r.id::text, d.id::text, d.slug]) as word
       from entry e join revision r on r.id = e.revision_id join design d on d.id = r.design_id where e.id = any (:entryIds)
     union select id::text from run where session_id = :sessionId
     union select id::text from reading where session_id = :sessionId
     union select p.id::text from specimen p join entry e on e.revision_id = p.revision_id where e.id = any (:entryIds)`,
    { entryIds, sessionId },
  );
  return [roundId, sessionId, ...rows.map((row) => row.word)];
}

function leaks(shown: Map<string, string[]>, secrets: readonly string[]): string[] {
  return [...shown].flatMap(([view, rows]) =>
    secrets.flatMap((secret) => (rows.some((row) => row.includes(secret)) ? [`${view} shows ${secret}`] : [])),
  );
}

describe("the public role", () => {
  it("reads nothing of a round before its publication, in no view", async () => {
    const shown = await allThatIsShown();
    expect(leaks(shown, [...(await secretsOf(first)), ...(await secretsOf(second))])).toEqual([]);
    for (const view of ["entry", "publication", "reading", "run", "session", "standing", "round", "design"]) {
      expect(shown.get(view), view).toEqual([]);
    }
  });

  it("reads all of a published round, and nothing of the one that isn't", async () => {
    const { roundId } = first;
    await signRound(asReviewer(world), { roundId, remark: "", at: new Date() });
    await scheduleRound(asHost(world), { roundId, publishAt: null, now: new Date() });
    await publishDueRounds(new Date(), undefined, 20);
    const shown = await allThatIsShown();
    const found = leaks(shown, await secretsOf(first)).map((line) => line.split(" shows ")[1]);
    expect(new Set(found)).toEqual(new Set(await secretsOf(first)));
    expect(leaks(shown, await secretsOf(second))).toEqual([]);
    const numbers: { number: number }[] = await db.public("shown.design").orderBy("number").select("number");
    expect(
      numbers.map(({ number }) => number),
      "sheets are counted, not drafts",
    ).toEqual(numbers.map((_, i) => i + 1));
    const entries: { number: number }[] = await db
      .public("shown.entry")
      .distinct({ number: "design_number" })
      .orderBy("number");
    expect(entries).toEqual(numbers);
  });

  it("reads no table, and writes nothing", async () => {
    const { rows: tables }: { rows: { name: string }[] } = await db.owner.raw(
      `select table_name as name from information_schema.tables where table_schema = 'public' and table_type = 'BASE TABLE'`,
    );
    for (const { name } of tables) {
      await expect(db.public(`public.${name}`).first("*"), name).rejects.toMatchObject({ code: "42501" });
    }
    await expect(db.public.raw(`delete from shown.frame`)).rejects.toMatchObject({ code: "42501" });
  });
});

describe("what was written stays as written, for the application's own role", () => {
  it("readings, publications, standings, reviews, withdrawals, moves, events and audit rows", async () => {
    const tables = [
      "reading",
      "publication",
      "publication_session",
      "standing",
      "standing_row",
      "review",
      "review_entry",
      "withdrawal",
      "entry_move",
      "round_move",
      "entry_transition",
      "round_transition",
      "event",
      "audit",
    ];
    for (const table of tables) {
      const { rows }: { rows: { name: string }[] } = await db.owner.raw(
        `select column_name as name from information_schema.columns where table_name = :table and table_schema = 'public' limit 1`,
        { table },
      );
      const column = rows[0]?.name ?? "";
      await expect(db.app(table).update({ [column]: db.app.ref(column) }), `update ${table}`).rejects.toThrow();
      await expect(db.app(table).delete(), `delete ${table}`).rejects.toThrow();
      await expect(db.app.raw(`truncate ?? cascade`, [table]), `truncate ${table}`).rejects.toThrow();
    }
  });

  it("also for the schema's owner, by triggers", async () => {
    for (const table of ["reading", "publication", "standing", "standing_row", "audit"]) {
      await expect(db.owner.raw(`truncate ?? cascade`, [table]), table).rejects.toThrow();
      await expect(db.owner(table).delete(), table).rejects.toThrow();
    }
  });
});
