import { parse } from "csv-parse/sync";
import { beforeAll, describe, expect, it } from "vitest";
import { GET as getCompare } from "@/app/api/v1/compare/route";
import { GET as getCsv } from "@/app/api/v1/compare/csv/route";
import { GET as getDesigns } from "@/app/api/v1/designs/route";
import { problemSchema } from "@/lib/contracts/base";
import { compareAnswerSchema, type CompareAnswer } from "@/lib/contracts/compare";
import { indexAnswerSchema } from "@/lib/contracts/index-query";
import { snapshotSchema, type Snapshot } from "@/lib/contracts/publication";
import { entryToken, type EntryName } from "@/lib/domain/designs/entry-token";
import { adoptEnvironment } from "@/lib/env/env";
import { publishDueRounds, scheduleRound } from "@/lib/server/publishing/schedule";
import { signRound } from "@/lib/server/review/sign-round";
import { asHost, asReviewer, makeBenchWorld, measureRound } from "../../factories/measured-round";
import { setUpDatabase } from "../../setup/database";

const db = setUpDatabase();
const origin = "http://127.0.0.1:3000";
let shown: readonly string[];
let hidden: readonly string[];

beforeAll(async () => {
  adoptEnvironment({
    NEXTAUTH_SECRET: "a secret of thirty-two characters or more",
    NEXTAUTH_URL: origin,
    LOG_LEVEL: "silent",
  });
  const world = await makeBenchWorld(db.owner);
  const first = await measureRound(world, { number: 1 });
  shown = first.entryIds;
  hidden = (await measureRound(world, { number: 2 })).entryIds;
  const { roundId } = first;
  await signRound(asReviewer(world), { roundId, remark: "", at: new Date() });
  await scheduleRound(asHost(world), { roundId, publishAt: null, now: new Date() });
  await publishDueRounds(new Date(), undefined, 20);
});

type Handler = (request: Request, next: { params: Promise<Record<string, string>> }) => Promise<Response>;
const get = (handler: Handler, query: string) =>
  handler(new Request(`${origin}/api/v1/x?${query}`), { params: Promise.resolve({}) });

const compare = async (query: string): Promise<CompareAnswer> =>
  compareAnswerSchema.parse(await (await get(getCompare, query)).json());

/** The entry's name in an address, read as the schema's owner whether it is public or not. */
async function tokenOf(entryId: string | undefined): Promise<string> {
  const { rows }: { rows: EntryName[] } = await db.owner.raw(
    `select d.slug, r.letter, s.slug as "seasonSlug" from entry e join revision r on r.id = e.revision_id
     join design d on d.id = r.design_id join season s on s.id = e.season_id where e.id = :entryId`,
    { entryId: entryId ?? "" },
  );
  const [name] = rows;
  if (!name) throw new Error("there is no such entry");
  return entryToken(name);
}

async function snapshotOf(entryId: string | undefined): Promise<Snapshot> {
  const row = await db.owner("publication").where({ entry_id: entryId }).first("snapshot");
  return snapshotSchema.parse(row?.snapshot);
}

describe("a comparison", () => {
  it("gives at the headline level the very figures that were published", async () => {
    const answer = await compare(`entries=${shown.join(",")}`);
    expect(answer.comparability).toBe("same-axis");
    expect(answer.entries.map((entry) => entry.entryId)).toEqual(shown);
    for (const { entryId, atLevel, points } of answer.entries) {
      const snapshot = await snapshotOf(entryId);
      const headline = snapshot.equalNoise.find((reading) => reading.levelDba === snapshot.headlineDba);
      if (!headline || !("ratio" in headline)) throw new Error("the headline level is not reached");
      expect(atLevel.levelDba).toBe(snapshot.headlineDba);
      expect(atLevel.ratioPercent?.value).toBeCloseTo(100 * headline.ratio.value, 6);
      expect(atLevel.differenceK?.value).toBeCloseTo(headline.difference.value, 8);
      expect(atLevel.deltaTK?.value).toBeCloseTo(headline.deltaT.value, 8);
      const { u } = headline.difference;
      // k of 95 % lies above the normal distribution's 1.95996 (JCGM 100:2008, table G.2, ν = ∞).
      expect(atLevel.differenceK?.half95).toBeGreaterThanOrEqual(1.9599 * u);
      expect(points.map((point) => point.levelDba.value)).toEqual(
        snapshot.points.map((point) => expect.closeTo(point.level.value, 8)),
      );
    }
  });

  it("takes ids and names alike, and the order that is asked for", async () => {
    const [one, two] = [await tokenOf(shown[0]), await tokenOf(shown[1])];
    const byName = await compare(`entries=${two},${one.toUpperCase()}`);
    expect(byName.entries.map((entry) => entry.token)).toEqual([two, one]);
    expect(byName.entries).toEqual((await compare(`entries=${shown[1]},${shown[0]}`)).entries);
  });

  it("reads another level when one is asked for, moved to the slider's end where it lies outside", async () => {
    const low = await compare(`entries=${shown[0]}&level=1`);
    const high = await compare(`entries=${shown[0]}&level=140`);
    const levels = low.entries[0]?.points.map((point) => point.levelDba.value) ?? [];
    expect(low.entries[0]?.atLevel.levelDba).toBeGreaterThanOrEqual(Math.min(...levels));
    expect(high.entries[0]?.atLevel.levelDba).toBeLessThanOrEqual(Math.max(...levels));
    expect(high.entries[0]?.atLevel.differenceK).toBeDefined();
  });

  it("refuses what it can't read, at the field", async () => {
    for (const [query, field] of [
      ["", "entries"],
      ["entries=", "entries"],
      ["entries=a,b,c,d,e", "entries"],
      [`entries=${shown[0]}&level=loud`, "level"],
      [`entries=${shown[0]}&colour=red`, "colour"],
    ] as const) {
      const answer = await get(getCompare, query);
      expect(answer.status, query).toBe(400);
      expect(
        problemSchema.parse(await answer.json()).fields.map(({ path }) => path),
        query,
      ).toContain(field);
    }
  });

  it("comes as CSV in which names can't pass for formulas", async () => {
    await db.owner("design").update({ name: "=1+1" });
    const text = await (await get(getCsv, `entries=${shown[0]}`)).text();
    const [head = "", ...lines] = text.trimEnd().split("\r\n");
    expect(head.split(",")).toContain("delta_t_u95_k");
    // OWASP, CSV Injection: a cell that begins like a formula is prefixed by an apostrophe.
    expect(lines.filter((line) => line.includes(",'=1+1,")).length).toBeGreaterThan(1);
    expect(lines.some((line) => /(^|,)=/.test(line))).toBe(false);
    // csv-parse refuses records of another length than the first one's.
    const records: string[][] = parse(text);
    expect(records.length).toBe(lines.length + 1);
  });
});

describe("an entry that isn't published", () => {
  it("is not compared by its id or its name, and answers as one that never was", async () => {
    const nobody = "01a00000-0000-7000-8000-000000000000";
    const answers = [];
    for (const named of [hidden[0], await tokenOf(hidden[0]), nobody, "nobody.a.season-1"]) {
      const answer = await get(getCompare, `entries=${named}`);
      const { requestId: _, ...problem } = problemSchema.parse(await answer.json());
      answers.push({ status: answer.status, problem });
    }
    expect(answers[0]?.status).toBe(404);
    for (const answer of answers) expect(answer).toEqual(answers[0]);
  });

  it("is left out beside a published one, with none of its figures", async () => {
    const text = await (await get(getCompare, `entries=${shown[0]},${hidden[0]}`)).text();
    expect(compareAnswerSchema.parse(JSON.parse(text)).missing).toBe(1);
    for (const entryId of hidden) expect(text).not.toContain(entryId);
    const csv = await (await get(getCsv, `entries=${shown[0]},${hidden[0]}`)).text();
    for (const entryId of hidden) expect(csv).not.toContain((await tokenOf(entryId)).split(".")[0]);
  });

  it("is in no count, facet or page of the index", async () => {
    const answer = indexAnswerSchema.parse(await (await get(getDesigns, "")).json());
    expect([answer.total, answer.ofAll]).toEqual([shown.length, shown.length]);
    expect(answer.items.map((item) => item.entryId).sort()).toEqual([...shown].sort());
    for (const [facet, values] of Object.entries(answer.facets)) {
      const sum = values.reduce((all, { count }) => all + count, 0);
      expect(sum, facet).toBeLessThanOrEqual(facet === "designer" ? 4 * shown.length : shown.length);
    }
    for (const bins of Object.values(answer.histograms))
      expect(bins.reduce((all, { count }) => all + count, 0)).toBeLessThanOrEqual(shown.length);
  });
});
