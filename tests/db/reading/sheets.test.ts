import { describe, expect, test } from "vitest";
import { sheetSchema } from "@/lib/contracts/sheet";
import { snapshotSchema } from "@/lib/contracts/publication";
import { isWithdrawnSheet } from "@/lib/server/reading/withdrawn";
import { readSheetPage, readRawRunsPage } from "@/lib/server/reading/sheet-page";
import { readingsCsv } from "@/lib/server/reading/readings-csv";
import { setUpSmallDemo } from "./seeded-demo";

const db = setUpSmallDemo();

interface Published {
  slug: string;
  entryId: string;
  snapshot: unknown;
}

const published = async (): Promise<Published[]> => {
  const { rows }: { rows: Published[] } = await db.owner.raw(
    `select d.slug, p.entry_id as "entryId", b.snapshot from published_entry p join publication b on b.id = p.publication_id
     join design d on d.id = p.design_id order by p.entry_id`,
  );
  return rows;
};

describe("the figures shown are those that the publication froze", () => {
  test("every figure of every public entry equals its snapshot, and U is k times u", async () => {
    const entries = await published();
    expect(entries.length).toBe(24);
    for (const { slug, entryId, snapshot } of entries) {
      const frozen = snapshotSchema.parse(snapshot);
      const sheet = sheetSchema.parse(await readSheetPage({ slug, entryId }));
      expect(sheet.entryId).toBe(entryId);
      expect(sheet.points.map((point) => [point.setSpeed, point.levelDba.value, point.levelDba.u])).toEqual(
        frozen.points.map((point) => [point.setSpeed, point.level.value, point.level.u]),
      );
      expect(sheet.points.map((point) => [point.deltaTK.value, point.resistanceKpw.value])).toEqual(
        frozen.points.map((point) => [point.deltaT.value, point.resistance.value]),
      );
      expect(sheet.baselinePoints.map((point) => point.levelDba.value)).toEqual(
        frozen.baselinePoints.map((point) => point.level.value),
      );
      for (const [i, reading] of frozen.equalNoise.entries()) {
        const told = sheet.equalNoise[i];
        expect(told?.levelDba).toBe(reading.levelDba);
        if ("why" in reading) expect(told).toMatchObject({ reached: null, why: reading.why });
        else expect(told?.reached?.differenceK).toMatchObject(reading.difference);
      }
      expect(sheet.budget).toEqual(frozen.budget);
      expect(sheet.levelRangeDba.high).toBe(Math.max(...frozen.points.map((point) => point.level.value)));
      for (const { levelDba } of sheet.points) expect(levelDba.u95).toBe(levelDba.k * levelDba.u);
    }
  });

  test("a revision's letter leads to its newest entry, an unknown one to nothing", async () => {
    const [first] = await published();
    const sheet = await readSheetPage({ slug: first?.slug ?? "", letter: "A" });
    expect(sheet.letter).toBe("A");
    await expect(readSheetPage({ slug: first?.slug ?? "", letter: "Z" })).rejects.toMatchObject({ code: "not_found" });
    const other = "00000000-0000-7000-8000-000000000000";
    await expect(readSheetPage({ slug: first?.slug ?? "", entryId: other })).rejects.toMatchObject({
      code: "not_found",
    });
  });

  test("ranks on the sheet are those of the standings, with their number ranked", async () => {
    for (const { slug, entryId } of await published()) {
      const { ranks } = await readSheetPage({ slug, entryId });
      const { rows } = await db.owner.raw(
        `select r.rank, r.rank_low, (select count(*)::int from standing_row o where o.standing_id = t.id and o.rank is not null) as of
         from standing_row r join standing t on t.id = r.standing_id
         join season s on s.id = t.season_id and s.scoring_rule_version_id = t.rule_version_id
         where r.entry_id = ? and t.round_id is not null order by t.number limit 1`,
        [entryId],
      );
      expect([ranks.then?.rank, ranks.then?.low, ranks.then?.of]).toEqual([
        rows[0]?.rank,
        rows[0]?.rank_low,
        rows[0]?.of,
      ]);
      expect(ranks.season?.scope).toBe("season");
    }
  });
});

describe("raw runs", () => {
  test("every reading of the entry's runs, the baseline's and the session's is there, and no other entry's", async () => {
    const [first] = await published();
    const { slug = "", entryId = "" } = first ?? {};
    const raw = await readRawRunsPage({ slug, entryId });
    const { rows } = await db.owner.raw(
      `select count(*)::int as n from reading d left join run r on r.id = d.run_id
       where d.session_id = ? and (r.entry_id is null or r.entry_id = ?)`,
      [raw.sessionId, entryId],
    );
    expect(raw.readings.length).toBe(rows[0]?.n);
    expect(raw.readings.length).toBeGreaterThan(100);
    expect(new Set(raw.runs.map((run) => run.subject))).toEqual(new Set(["entry", "baseline"]));
  });

  test("the CSV has a line a reading and its own reading ids", async () => {
    const [first] = await published();
    const asked = { slug: first?.slug ?? "", entryId: first?.entryId };
    const raw = await readRawRunsPage(asked);
    const { text } = await readingsCsv(asked);
    const lines = text.trimEnd().split("\r\n");
    expect(lines.length).toBe(raw.readings.length + 1);
    for (const { id } of raw.readings) expect(text).toContain(id);
  });
});

test("a withdrawn design leaves a stub with the reason and no figure", async () => {
  const all = await published();
  const lone = all.find(({ slug }) => all.filter((each) => each.slug === slug).length === 1);
  const { slug = "", entryId = "" } = lone ?? {};
  const host: { id: string } | undefined = await db.owner("person").where({ role: "host" }).first("id");
  await db.owner("entry_move").insert({
    entry_id: entryId,
    from_state: "published",
    to_state: "withdrawn",
    by_right: "host",
    by_person: host?.id,
    reason: "Asked for by its designer.",
  });
  await db.owner("withdrawal").insert({ entry_id: entryId, reason: "Asked for by its designer.", by_person: host?.id });
  await db.owner("published_entry").where({ entry_id: entryId }).delete();
  await expect(readSheetPage({ slug })).rejects.toMatchObject({
    code: "gone",
    detail: expect.stringContaining("Asked for by its designer."),
  });
  await expect(readRawRunsPage({ slug })).rejects.toMatchObject({ code: "gone" });
  // RFC 9110, 15.5.11: 410 where access is gone for good. A design with anything public left is no stub.
  expect(await isWithdrawnSheet(`/designs/${slug}`)).toBe(true);
  expect(await isWithdrawnSheet(`/designs/${slug}/A`)).toBe(true);
  const other = all.find((each) => each.slug !== slug)?.slug ?? "";
  expect(await isWithdrawnSheet(`/designs/${other}`)).toBe(false);
  expect(await isWithdrawnSheet("/designs")).toBe(false);
});
