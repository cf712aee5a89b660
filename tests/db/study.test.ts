import { beforeAll, describe, expect, it } from "vitest";
import { studyGeneration } from "@/db/queries/shown/study";
import { keepStudyResult, resultsKept } from "@/db/queries/study-results";
import { parseStudyQuestion } from "@/lib/contracts/study-question";
import { publishDueRounds, scheduleRound } from "@/lib/server/publishing/schedule";
import { signRound } from "@/lib/server/review/sign-round";
import { readStudy, readStudyChoices, refreshStudies } from "@/lib/server/study/read-study";
import { studyCsv } from "@/lib/server/study/study-csv";
import { asHost, asReviewer, makeBenchWorld, measureRound, type BenchWorld } from "../factories/measured-round";
import { setUpDatabase } from "../setup/database";

const db = setUpDatabase();
const question = parseStudyQuestion(new URLSearchParams());
let world: BenchWorld;

/** Everything that anybody is told, but when it was worked out. */
async function told() {
  const { computedAt: _computedAt, ...answer } = await readStudy(question);
  return {
    answer,
    choices: await readStudyChoices(),
    entries: (await studyCsv(question, "entries")).text,
    effects: (await studyCsv(question, "effects")).text,
  };
}

async function publish(roundId: string): Promise<void> {
  await signRound(asReviewer(world), { roundId, remark: "", at: new Date() });
  await scheduleRound(asHost(world), { roundId, publishAt: null, now: new Date() });
  const { published } = await publishDueRounds(new Date(), undefined, 40);
  expect(published).toHaveLength(1);
}

beforeAll(async () => {
  world = await makeBenchWorld(db.owner);
});

describe("the trait study reads what is public", () => {
  let firstIds: string[];

  it("finds nothing while a round is in review, and says so by no count", async () => {
    const { roundId, entryIds } = await measureRound(world, { number: 1 });
    firstIds = entryIds;
    const before = await told();
    expect(before.answer.result).toMatchObject({ entries: 0, designers: 0, seasons: [] });
    expect(before.choices).toEqual({ frames: [], rotations: [], seasons: [] });
    expect(before.entries.split("\r\n")).toHaveLength(2);
    await publish(roundId);
  });

  it("has the round's entries as soon as it is published, though an older answer was stored", async () => {
    const { answer, entries } = await told();
    expect(answer).toMatchObject({ current: true, result: { entries: 2, seasons: [1] } });
    for (const id of firstIds) expect(entries).toContain(id);
    // The same again comes from what is stored.
    const stored = await readStudy(question);
    expect((await readStudy(question)).computedAt).toBe(stored.computedAt);
  });

  it("isn't changed by an entry that isn't published, down to the state that it goes by", async () => {
    const [before, generation] = [await told(), await studyGeneration(db.public)];
    const { entryIds } = await measureRound(world, { number: 2 });
    expect(await studyGeneration(db.public)).toBe(generation);
    await db.app("study_result").delete();
    const after = await told();
    expect(after).toEqual(before);
    for (const id of entryIds) expect(JSON.stringify(after)).not.toContain(id);
  });

  it("drops an entry that is public no more", async () => {
    await db.app("published_entry").where({ entry_id: firstIds[0] }).delete();
    const { answer, entries } = await told();
    expect(answer.result.entries).toBe(1);
    expect(entries).not.toContain(firstIds[0]);
  });

  it("names nobody in what it stores or hands out", async () => {
    const rows: unknown[] = await db.owner("study_result").select("*");
    const text = JSON.stringify([rows, await told()]);
    expect(rows.length).toBeGreaterThan(0);
    for (const handle of world.cast.people.keys()) expect(text).not.toContain(`"${handle}"`);
  });
});

describe("stored answers", () => {
  it("are worked out anew by the worker only where the public has changed", async () => {
    await refreshStudies();
    expect(await refreshStudies()).toBe(0);
    await db.owner("published_entry").update({ corrections: 0 });
    expect(await refreshStudies()).toBe(3);
  });

  it("never give way to one of an older state", async () => {
    const row = { question: "q", entries: 1 };
    await keepStudyResult(db.app, { ...row, generation: 7, result: { from: 7 } });
    await keepStudyResult(db.app, { ...row, generation: 6, result: { from: 6 } });
    expect(await db.app("study_result").where({ question: "q" }).first("generation")).toEqual({ generation: 7 });
  });

  it("are bounded, however many questions are asked", async () => {
    const rows = Array.from({ length: resultsKept + 20 }, (_, n) => ({
      question: `many ${n}`,
      generation: 1,
      entries: 0,
      result: "{}",
    }));
    await db.owner.batchInsert("study_result", rows, 100);
    await keepStudyResult(db.app, { question: "one more", generation: 1, entries: 0, result: {} });
    expect(await db.app("study_result").count({ n: "*" }).first()).toEqual({ n: resultsKept });
  });

  it("can't be written by the public reader", async () => {
    await expect(
      db.public("shown.study_result").insert({ question: "x", generation: 1, entries: 0, result: "{}" }),
    ).rejects.toThrow("permission denied");
  });
});
