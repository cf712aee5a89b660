import { beforeAll, describe, expect, it } from "vitest";
import { parseIndexQuery, type IndexAnswer, type IndexItem } from "@/lib/contracts/index-query";
import { listDesigns } from "@/lib/server/reading/list-designs";
import { setUpDatabase } from "../../setup/database";
import { layOutField } from "../../setup/search-field";

const db = setUpDatabase();

beforeAll(() => layOutField(db.owner, 900));

const list = (text: string) => listDesigns(parseIndexQuery(new URLSearchParams(text)));

/** A recount in plain SQL over the table itself, with the conditions written out by hand. */
async function recount(column: string, where: string): Promise<Record<string, number>> {
  const { rows }: { rows: { value: string; count: number }[] } = await db.owner.raw(
    `select (${column})::text as value, count(*)::int as count from published_entry
     where (${column}) is not null and ${where} group by 1`,
  );
  return Object.fromEntries(rows.map(({ value, count }) => [value, count]));
}

const counts = (answer: IndexAnswer, facet: string) =>
  Object.fromEntries((answer.facets[facet] ?? []).map(({ value, count }) => [value, count]));

const blades = "blades_first in (7, 9)";
const inlet = "inlet_stack = 'bellmouth'";
const gap = "tip_gap_mm >= 0.8";
const question = "blades1=7&blades1=9&inlet=bellmouth&gap-from=0.8";

describe("counts beside the choices, against a plain recount", () => {
  it("are of everything asked but the facet's own choice", async () => {
    const answer = await list(question);
    const all = `${blades} and ${inlet} and ${gap}`;
    expect(counts(answer, "blades1")).toEqual(await recount("blades_first", `${inlet} and ${gap}`));
    expect(counts(answer, "inlet")).toEqual(await recount("inlet_stack", `${blades} and ${gap}`));
    expect(counts(answer, "material")).toEqual(await recount("material", all));
    expect(counts(answer, "struts")).toEqual(await recount("struts", all));
    expect(counts(answer, "shroud")).toEqual(await recount("shroud", all));
    expect(counts(answer, "spacer")).toEqual(await recount("spacer_mm > 0", all));
    const turning = "case when stages = 1 then 'single' when counter_rotating then 'counter' else 'co' end";
    expect(counts(answer, "rotation")).toEqual(await recount(turning, all));
    const slug = "(select s.slug from season s where s.id = season_id)";
    expect(counts(answer, "season")).toEqual(await recount(slug, all));
    const total = Object.values(await recount("1", all)).reduce((sum, count) => sum + count, 0);
    expect(answer.total).toBe(total);
    expect(total).toBeGreaterThan(20);
  });

  it("count an entry once for each designer of its design", async () => {
    const { rows }: { rows: { handle: string; count: number }[] } = await db.owner.raw(
      `select h.handle, count(*)::int as count from published_entry e
       join design_owner o on o.design_id = e.design_id and o.until_at is null join person h on h.id = o.person_id
       where ${blades} and ${inlet} and ${gap} group by 1`,
    );
    const expected = Object.fromEntries(rows.map(({ handle, count }) => [handle, count]));
    expect(counts(await list(question), "designer")).toEqual(expected);
  });

  it("bin a range's values under everything asked but its own bounds", async () => {
    const answer = await list(question);
    const binned = async (column: string, where: string, milli: number) => {
      const rows: { value: number }[] = await db
        .owner("published_entry")
        .whereRaw(where)
        .whereNotNull(column)
        .select({ value: column });
      const bins = new Map<number, number>();
      for (const { value } of rows) {
        const from = (Math.floor(Math.round(value * 1000) / milli) * milli) / 1000;
        bins.set(from, (bins.get(from) ?? 0) + 1);
      }
      return [...bins].sort((x, y) => x[0] - y[0]).map(([from, count]) => ({ from, count }));
    };
    expect(answer.histograms.gap).toEqual(await binned("tip_gap_mm", `${blades} and ${inlet}`, 100));
    expect(answer.histograms.mass).toEqual(await binned("mass_g", `${blades} and ${inlet} and ${gap}`, 2000));
  });
});

describe("pages of the list", () => {
  it("hold every match once, in one order, however often they are turned", async () => {
    const turn = async () => {
      const first = await list(`${question}&sort=gap`);
      const items: IndexItem[] = [...first.items];
      for (let page = 2; page <= first.pages; page += 1) {
        items.push(...(await list(`${question}&sort=gap&page=${page}`)).items);
      }
      return { total: first.total, items };
    };
    const once = await turn();
    const ids = once.items.map((item) => item.entryId);
    expect(new Set(ids).size).toBe(once.total);
    expect(ids).toEqual((await turn()).items.map((item) => item.entryId));
    const gaps = once.items.map((item) => item.tipGapMm ?? Infinity);
    expect(gaps).toEqual(gaps.toSorted((x, y) => x - y));
    expect(new Set(gaps).size, "there are ties to break").toBeLessThan(gaps.length);
  });
});

describe("figures that need one bench, protocol and baseline unit", () => {
  it("stand where all matches share them", async () => {
    const { rows }: { rows: { slug: string }[] } = await db.owner.raw(
      `select slug from season order by number limit 1`,
    );
    const answer = await list(`season=${rows[0]?.slug}&sort=leveldba`);
    expect(answer.comparableOnly).toBe(true);
    const levels = answer.items.map((item) => item.levelFullDba ?? Number.NaN);
    expect(levels).toHaveLength(20);
    expect(levels).toEqual(levels.toSorted((x, y) => x - y));
  });

  it("neither stand, sort nor bound where they don't", async () => {
    const [taken] = await db.owner("published_entry").select("entry_id", "bench_version_id").limit(1);
    const other = await db.owner("bench_version").whereNot({ id: taken?.bench_version_id }).first("id");
    const moved = { bench_version_id: other?.id };
    expect(await db.owner("published_entry").where({ entry_id: taken?.entry_id }).update(moved)).toBe(1);
    const answer = await list("sort=leveldba&equal-to=-90");
    expect(answer.comparableOnly).toBe(false);
    expect(answer.total, "the bound in K was let go").toBe(900);
    for (const item of answer.items) {
      expect([item.levelFullDba, item.deltaTFullK, item.equalNoiseK, item.loudnessSone]).toEqual([
        null,
        null,
        null,
        null,
      ]);
      expect(item.levelDifferenceDb).toBeTypeOf("number");
    }
    const ratios = answer.items.map((item) => item.equalNoisePercent ?? Infinity);
    expect(ratios).toEqual(ratios.toSorted((x, y) => x - y));
    expect(answer.histograms.equal).toBeUndefined();
  });
});
