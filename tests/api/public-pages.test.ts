import { expect, test } from "vitest";
import { baselineSchema } from "@/lib/contracts/baselines";
import { ledgerSchema } from "@/lib/contracts/corrections";
import { indexAnswerSchema } from "@/lib/contracts/index-query";
import { methodSchema } from "@/lib/contracts/method";
import { rawRunsSchema } from "@/lib/contracts/raw-runs";
import { roundSchema, roundsSchema, seasonSchema, seasonsSchema } from "@/lib/contracts/seasons";
import { sheetSchema } from "@/lib/contracts/sheet";
import { SaxesParser } from "saxes";
import { signedOut } from "@/tests/setup/session";

const get = (path: string) => signedOut().fetch(path);
const slug = "heronwing";

test("a sheet, its readings and their CSV answer anybody by their contracts", async () => {
  const sheet = sheetSchema.parse(await (await get(`/api/v1/sheets/${slug}`)).json());
  expect(sheet.name).toBe("Heronwing");
  const older = sheet.history.at(-1);
  const asked = sheetSchema.parse(await (await get(`/api/v1/sheets/${slug}?entry=${older?.entryId}`)).json());
  expect(asked.letter).toBe(older?.letter);
  const raw = rawRunsSchema.parse(await (await get(`/api/v1/sheets/${slug}/readings`)).json());
  const csv = await get(`/api/v1/sheets/${slug}/readings.csv`);
  expect(csv.headers.get("content-type")).toBe("text/csv; charset=utf-8");
  expect(csv.headers.get("content-disposition")).toContain(`filename="${slug}-readings.csv"`);
  expect((await csv.text()).trimEnd().split("\r\n").length).toBe(raw.readings.length + 1);
});

test.each([
  ["/seasons/%ff", 404],
  ["/api/v1/sheets/%ff", 404],
  ["/designs/a%00b", 404],
  ["/api/v1/sheets/a%00b", 404],
  ["/designs?q=a%00b", 400],
  ["/api/v1/designs?q=a%00b", 400],
  ["/designs?q=100%", 200],
  ["/designs?season=__proto__&rotation=constructor&tone=toString&shroud=valueOf", 200],
  ["/traits?season=__proto__&frame=constructor&rotation=toString", 200],
])("an address that can name nothing is answered: %s with %d", async (path, status) => {
  expect((await get(path)).status).toBe(status);
});

test("words that were typed bring the design of that name first, whatever it scored, also where one letter is wrong", async () => {
  for (const words of ["heronwing", "heronwign"]) {
    const { items } = indexAnswerSchema.parse(await (await get(`/api/v1/designs?q=${words}`)).json());
    expect(items[0]?.name).toBe("Heronwing");
  }
  const { items } = indexAnswerSchema.parse(await (await get("/api/v1/designs?q=mill&sort=name")).json());
  expect(items.map(({ name }) => name)).toEqual(items.map(({ name }) => name).toSorted((a, b) => (a < b ? -1 : 1)));
});

test.each([
  ["/api/v1/sheets/no-such-design", 404],
  ["/api/v1/sheets/NO", 404],
  [`/api/v1/sheets/${slug}?entry=7`, 400],
  [`/api/v1/sheets/${slug}?entry=00000000-0000-7000-8000-000000000000`, 404],
  [`/api/v1/sheets/${slug}?entri=7`, 400],
  ["/api/v1/seasons/season-9", 404],
  ["/api/v1/seasons/season-4?rule=best", 400],
  ["/api/v1/seasons/season-4?rule=plain-product", 404],
  ["/api/v1/seasons/season-4/rounds/0", 404],
  ["/api/v1/seasons/season-4/rounds/5", 404],
  ["/api/v1/seasons/season-4/rounds/6", 404],
  ["/api/v1/baselines/none", 404],
])("%s answers %d with a problem body", async (path, status) => {
  const answer = await get(path);
  expect(answer.status).toBe(status);
  expect(answer.headers.get("content-type")).toContain("application/problem+json");
});

test("seasons, rounds, baselines, the method and the ledger answer by their contracts", async () => {
  const seasons = seasonsSchema.parse(await (await get("/api/v1/seasons")).json());
  expect(seasons.items.map((season) => season.slug)).toEqual(["season-4", "season-3", "season-2", "season-1"]);
  const season = seasonSchema.parse(await (await get("/api/v1/seasons/season-3?rule=plain-sum")).json());
  expect(season.standing?.rule.kind).toBe("plain-sum");
  const round = roundSchema.parse(await (await get("/api/v1/seasons/season-3/rounds/2")).json());
  expect([round.before, round.after]).toEqual([1, 3]);
  roundsSchema.parse(await (await get("/api/v1/rounds")).json());
  const baseline = baselineSchema.parse(await (await get("/api/v1/baselines/alder-reference-seven")).json());
  expect(baseline.bridges.length).toBeGreaterThan(0);
  methodSchema.parse(await (await get("/api/v1/methods")).json());
  ledgerSchema.parse(await (await get("/api/v1/corrections")).json());
});

test("the feed is well-formed XML with Atom's required parts", async () => {
  const answer = await get("/corrections/feed.xml");
  expect(answer.headers.get("content-type")).toBe("application/atom+xml; charset=utf-8");
  const names: string[] = [];
  const parser = new SaxesParser({ xmlns: true });
  parser.on("opentag", (tag) => names.push(`${tag.uri} ${tag.local}`));
  parser.on("error", (error) => {
    throw error;
  });
  parser.write(await answer.text()).close();
  // RFC 4287, 4.1.1: a feed has exactly one id, one title and one updated.
  for (const part of ["feed", "id", "title", "updated"]) expect(names).toContain(`http://www.w3.org/2005/Atom ${part}`);
});
