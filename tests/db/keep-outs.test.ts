import { beforeAll, describe, expect, it } from "vitest";
import { newBenchVersion } from "@/lib/contracts/bench-admin";
import { newKeepOutBox } from "@/lib/contracts/keep-outs";
import { addBench, addBenchVersion } from "@/lib/server/benches/benches";
import { addKeepOutBox, dropKeepOut, readKeepOuts } from "@/lib/server/benches/keep-outs";
import { readFitLimits } from "@/lib/server/reading/fit-limits";
import { kitSolidStl } from "@/lib/server/kit/kit-solids";
import { readKit } from "@/lib/server/kit/read-kit";
import { publishDueRounds, scheduleRound } from "@/lib/server/publishing/schedule";
import { signRound } from "@/lib/server/review/sign-round";
import { analyseMesh } from "@/lib/science/geometry/analyse";
import {
  asHost,
  asOperator,
  asReviewer,
  makeBenchWorld,
  measureRound,
  type BenchWorld,
} from "../factories/measured-round";
import { readBytes } from "../factories/rotor-mesh";
import { setUpDatabase } from "../setup/database";

const db = setUpDatabase();
let world: BenchWorld;
let host: ReturnType<typeof asHost>;
let usedVersionId: string;

beforeAll(async () => {
  world = await makeBenchWorld(db.owner);
  host = asHost(world);
  ({ bench_version_id: usedVersionId } = await db.owner("season_bench").first("bench_version_id"));
});

const box = (more: object = {}) =>
  newKeepOutBox.parse({ name: "Card cover", minMm: [-80, -75, -20], maxMm: [-66, 75, 4.5], note: "folded", ...more });
const versionOf = (benchId: string) =>
  addBenchVersion(host, {
    benchId,
    at: new Date(),
    version: newBenchVersion.parse({
      cooler: "tower",
      heatSource: "block with a thermal cut-out",
      temperatureSensors: "two thermistors",
      microphone: "class 2",
      calibrator: "94 dB",
      changeReason: "A test.",
    }),
  });
const fresh = async () => {
  const slug = `bench-${Math.random().toString(36).slice(2)}`;
  const bench = await addBench(host, { slug, name: slug, description: "" });
  return { benchId: bench.id, benchVersionId: (await versionOf(bench.id)).id };
};

describe("a box of a bench version that nothing stands on", () => {
  it("is added, listed, refused a second time under its name, taken off, and noted", async () => {
    const { benchVersionId } = await fresh();
    expect(await readKeepOuts(host.actor, { benchVersionId })).toEqual({ frozen: null, items: [] });
    const { id } = await addKeepOutBox(host, { benchVersionId, box: box() });
    const { items } = await readKeepOuts(host.actor, { benchVersionId });
    expect(items).toEqual([{ id, shape: "box", ...box() }]);
    await expect(addKeepOutBox(host, { benchVersionId, box: box({ note: "" }) })).rejects.toMatchObject({
      code: "already_there",
      fields: [{ path: "name" }],
    });
    await dropKeepOut(host, { keepOutId: id });
    expect((await readKeepOuts(host.actor, { benchVersionId })).items).toEqual([]);
    const notes = await db.owner("audit").where({ subject_id: id }).orderBy("id").select("action");
    expect(notes.map((each) => each.action)).toEqual(["keep_out.add", "keep_out.drop"]);
    await expect(dropKeepOut(host, { keepOutId: id })).rejects.toMatchObject({ code: "not_found" });
  });

  it("is the host's to set, and at most forty", async () => {
    const { benchVersionId } = await fresh();
    const operator = asOperator(world);
    await expect(readKeepOuts(operator.actor, { benchVersionId })).rejects.toMatchObject({ code: "forbidden" });
    await expect(addKeepOutBox(operator, { benchVersionId, box: box() })).rejects.toMatchObject({ code: "forbidden" });
    for (let n = 0; n < 40; n++) await addKeepOutBox(host, { benchVersionId, box: box({ name: `Pin ${n}` }) });
    await expect(addKeepOutBox(host, { benchVersionId, box: box() })).rejects.toMatchObject({ code: "impossible" });
  });

  it("has three figures a corner, each largest above its smallest", () => {
    const told = (more: object) =>
      newKeepOutBox.safeParse({ ...box(), ...more }).error?.issues.map(({ path, message }) => [path[0], message]);
    expect(told({ maxMm: [-80, 75, -21] })).toEqual([["maxMm", "is not above the smallest in x, z"]]);
    expect(told({ minMm: [1, 2] })).toEqual([["minMm", "has not three figures: write x, y and z"]]);
    expect(told({ minMm: [-1001, -75, -20] })).toEqual([["minMm", "lies more than 1000 mm away"]]);
    expect(told({ name: " " })).toEqual([["name", "is missing"]]);
  });

  it("goes over to the bench's next version, which then has its own", async () => {
    const { benchId, benchVersionId } = await fresh();
    await addKeepOutBox(host, { benchVersionId, box: box() });
    const next = await versionOf(benchId);
    const { items } = await readKeepOuts(host.actor, { benchVersionId: next.id });
    expect(items).toEqual([{ id: items[0]?.id, shape: "box", ...box() }]);
    await dropKeepOut(host, { keepOutId: items[0]?.id ?? "" });
    expect((await readKeepOuts(host.actor, { benchVersionId })).items).toHaveLength(1);
  });
});

describe("a bench version that an opened season stands on", () => {
  it("keeps its solids, in the use-cases as in the database", async () => {
    const { frozen, items } = await readKeepOuts(host.actor, { benchVersionId: usedVersionId });
    expect(frozen).toMatch(/Season 1 opened on this bench version\. Add a new version/);
    const keepOutId = items[0]?.id ?? "";
    const add = addKeepOutBox(host, { benchVersionId: usedVersionId, box: box() });
    await expect(add).rejects.toMatchObject({ code: "moved_on", detail: frozen });
    await expect(dropKeepOut(host, { keepOutId })).rejects.toMatchObject({ code: "moved_on", detail: frozen });
    const change = db.app("keep_out").where({ id: keepOutId }).update({ note: "moved" });
    await expect(change).rejects.toThrow("the bench version is in use");
    await expect(db.app("keep_out").where({ id: keepOutId }).delete()).rejects.toThrow("the bench version is in use");
  });

  it("has in its kit and on the fit page the box that was added before it opened", async () => {
    const { benchVersionId } = await fresh();
    const { id } = await addKeepOutBox(host, { benchVersionId, box: box() });
    const budget = await db.owner("season_bench").first("budget_version_id");
    const { id: _id, ...season } = await db.owner("season").first();
    const [made] = await db
      .owner("season")
      .insert({ ...season, number: 9, slug: "season-9", opened_at: null, closed_at: null, frozen_at: null })
      .returning("id");
    await db.owner("season_bench").insert({ season_id: made.id, bench_version_id: benchVersionId, ...budget });
    await expect(readKit({ slug: "season-9" })).rejects.toMatchObject({ code: "not_found" });
    await db.owner("season").where({ id: made.id }).update({ opened_at: new Date() });
    const { name, minMm, maxMm, note } = box();
    expect((await readKit({ slug: "season-9" })).solids).toEqual([{ id, name, minMm, maxMm, note, shape: "box" }]);
    const limits = (await readFitLimits()).seasons.find((each) => each.slug === "season-9");
    expect(limits?.keepOuts).toEqual([{ name, minMm, maxMm }]);
    // Closed form: 14 mm × 150 mm × 24.5 mm; single precision holds these corners exactly.
    const { mesh } = await readBytes((await kitSolidStl({ slug: "season-9", id })).bytes);
    expect(analyseMesh(mesh).volumeMm3).toBeCloseTo(14 * 150 * 24.5, 6);
    await expect(dropKeepOut(host, { keepOutId: id })).rejects.toMatchObject({ code: "moved_on" });
  });
});

describe("a bench version whose figures are published", () => {
  it("keeps its solids, whatever becomes of the season", async () => {
    const { roundId } = await measureRound(world, { number: 1 });
    const at = new Date();
    await signRound(asReviewer(world), { roundId, remark: "", at });
    await scheduleRound(host, { roundId, publishAt: null, now: at });
    expect((await publishDueRounds(new Date(), undefined, 50)).published).toEqual([roundId]);
    // No host can close a season's opening; the figures alone are to hold the solids here.
    await db.owner("season").where({ slug: "season-1" }).update({ opened_at: null });
    const { frozen, items } = await readKeepOuts(host.actor, { benchVersionId: usedVersionId });
    expect(frozen).toMatch(/any more: figures measured on it are published\./);
    const keepOutId = items[0]?.id ?? "";
    await expect(dropKeepOut(host, { keepOutId })).rejects.toMatchObject({ code: "moved_on", detail: frozen });
    await expect(db.app("keep_out").where({ id: keepOutId }).delete()).rejects.toThrow("the bench version is in use");
  });
});
