import { expect, test } from "vitest";
import { seasonSchema, roundSchema, seasonsSchema } from "@/lib/contracts/seasons";
import { baselineSchema } from "@/lib/contracts/baselines";
import { readBaseline, readBaselines } from "@/lib/server/reading/read-baselines";
import { readCorrections } from "@/lib/server/reading/read-corrections";
import { readMethod } from "@/lib/server/reading/read-method";
import { readRound, readRounds, readSeason, readSeasons } from "@/lib/server/reading/read-seasons";
import { readSheetPage } from "@/lib/server/reading/sheet-page";
import { levelDba, referenceFan, resistanceKPerW, secondReferenceFan, type ToyFan } from "@/db/seeds/demo/toy-model";
import { setUpSmallDemo } from "./seeded-demo";

const db = setUpSmallDemo();

test("rounds in review and on the bench show nowhere: not as a round, a sheet, a session or an id", async () => {
  const hidden: { entryId: string; slug: string; number: number; public: boolean }[] = (
    await db.owner.raw(
      `select e.id as "entryId", d.slug, n.number, exists (select 1 from published_entry p where p.design_id = d.id) as public
       from round_entry x join entry e on e.id = x.entry_id join round n on n.id = x.round_id
       join revision r on r.id = e.revision_id join design d on d.id = r.design_id where n.state <> 'published'`,
    )
  ).rows;
  expect(hidden.length).toBeGreaterThan(6);
  const seasons = seasonsSchema.parse(await readSeasons());
  const everything: unknown[] = [seasons, await readRounds(), await readBaselines(), await readCorrections()];
  for (const { slug, rounds } of seasons.items) {
    everything.push(seasonSchema.parse(await readSeason({ slug })));
    for (const { number } of rounds) everything.push(roundSchema.parse(await readRound({ slug, number })));
  }
  for (const { slug } of (await readBaselines()).items) everything.push(await readBaseline({ slug }));
  const text = JSON.stringify(everything);
  for (const { entryId } of hidden) expect(text).not.toContain(entryId);
  for (const number of new Set(hidden.map((each) => each.number))) {
    await expect(readRound({ slug: "season-2", number })).rejects.toMatchObject({ code: "not_found" });
  }
  for (const { slug, entryId, public: alsoPublic } of hidden) {
    await expect(readSheetPage({ slug, entryId })).rejects.toMatchObject({ code: "not_found" });
    if (!alsoPublic) await expect(readSheetPage({ slug })).rejects.toMatchObject({ code: "not_found" });
  }
});

test("baseline pages list the sessions of published rounds alone", async () => {
  const baseline = baselineSchema.parse(await readBaseline({ slug: "alder-reference-seven" }));
  const { rows }: { rows: { number: number }[] } = await db.owner.raw(
    `select s.number from session s join round n on n.id = s.round_id where n.state = 'published' order by 1`,
  );
  expect(baseline.sessions.map((each) => each.session).sort((a, b) => a - b)).toEqual(rows.map((row) => row.number));
});

/** The toy model's own truth: ΔT/P of a fan at the speed where it is as loud as asked. */
function truth(fan: ToyFan, level: number): number {
  let [low, high] = [300, 6000];
  for (let i = 0; i < 80; i += 1) {
    const middle = (low + high) / 2;
    if (levelDba(fan, middle) < level) low = middle;
    else high = middle;
  }
  return resistanceKPerW(fan, low);
}

test("the bridge between the two units covers the ratio that the toy model was given", async () => {
  const { bridges } = await readBaseline({ slug: "alder-reference-seven" });
  const atLevels = bridges.filter((bridge) => bridge.levelDba !== null);
  expect(atLevels.map((bridge) => bridge.levelDba)).toEqual([40, 46, 52]);
  for (const { levelDba: level, figure, from, to } of atLevels) {
    expect([from, to]).toEqual(["ARS-01", "ARS-02"]);
    const expected = truth(referenceFan, level ?? 0) / truth(secondReferenceFan, level ?? 0);
    expect(Math.abs(figure.value - expected)).toBeLessThan(1.5 * figure.u95);
    expect(figure.u95).toBeLessThan(0.05);
  }
});

test("agreed values cover what the toy model was given, for each unit and bench version", async () => {
  const { agreed } = await readBaseline({ slug: "alder-reference-seven" });
  const groups = new Set(agreed.map((each) => `${each.serial} ${each.bench}`));
  expect([...groups].sort()).toEqual(["ARS-01 Alder Bench, version 1", "ARS-02 Alder Bench, version 2"]);
  for (const { quantity, setSpeed, value, u } of agreed) {
    const expected =
      quantity === "level_dba" ? levelDba(referenceFan, setSpeed) : resistanceKPerW(referenceFan, setSpeed);
    expect(Math.abs(value - expected)).toBeLessThan(3 * u);
  }
});

test("the method's page knows every version and every part of the benches' budgets", async () => {
  const { versions, budgets } = await readMethod();
  expect(versions.map((version) => version.number)).toEqual([1]);
  expect(budgets.map((budget) => budget.parts.length)).toEqual([8, 8]);
});

test("a rule without a standing is not found, the plain sum is there with the season's ranks beside its own", async () => {
  const summed = await readSeason({ slug: "season-1", rule: "plain-sum" });
  expect(summed.standing?.rule.kind).toBe("plain-sum");
  const ruled = await readSeason({ slug: "season-1" });
  const byId = new Map(ruled.standing?.rows.map((row) => [row.entryId, row.rank]));
  for (const row of summed.standing?.rows ?? []) expect(row.rankByRule).toBe(byId.get(row.entryId) ?? null);
  await expect(readSeason({ slug: "season-1", rule: "plain-product" })).rejects.toMatchObject({ code: "not_found" });
});
