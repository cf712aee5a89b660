import { beforeAll, describe, expect, it } from "vitest";
import { frameFigures } from "@/lib/contracts/frames-admin";
import { kitFrameParams } from "@/lib/contracts/kit";
import { formatFrame } from "@/lib/format/frames";
import { addFrame, changeFrame, readHostFrames } from "@/lib/server/benches/frames";
import { kitSvg } from "@/lib/server/kit/kit-drawing";
import { readFitLimits } from "@/lib/server/reading/fit-limits";
import { asHost, asOperator, makeBenchWorld, type BenchWorld } from "../factories/measured-round";
import { setUpDatabase } from "../setup/database";

const db = setUpDatabase();
let world: BenchWorld;
let host: ReturnType<typeof asHost>;

beforeAll(async () => {
  world = await makeBenchWorld(db.owner);
  host = asHost(world);
});

/** Figures of a usual 92 mm frame; common practice, no source. */
const figures = (more: object = {}) =>
  frameFigures.parse({
    frameClass: "92",
    outerMm: 92,
    depthMm: 25.4,
    boreMm: 88,
    holeSpacingMm: 82.5,
    holeDiameterMm: 4.3,
    toleranceMm: 0.5,
    ...more,
  });
const frameOf = async (key: string) => (await readHostFrames(host.actor)).items.find((each) => each.key === key);

describe("a frame that nothing stands on", () => {
  it("is added under its class and depth, told apart by a word, changed, and noted; the fit page has it at once", async () => {
    await expect(addFrame(host, figures())).rejects.toMatchObject({
      code: "already_there",
      fields: [{ path: "word" }],
    });
    const { id } = await addFrame(host, figures({ boreMm: 86, word: "narrow" }));
    const made = await frameOf("92x25-narrow");
    expect(made).toEqual({
      id,
      key: "92x25-narrow",
      frozen: null,
      figures: figures({ boreMm: 86, word: "narrow" }),
    });
    await changeFrame(host, { frameId: id, figures: figures({ depthMm: 14.8, word: "narrow" }) });
    const { frames } = await readFitLimits();
    expect(frames.find((each) => each.key === "92x15-narrow")).toEqual({
      key: "92x15-narrow",
      sizeMm: 92,
      depthMm: 14.8,
      boreMm: 88,
      holeSpacingMm: 82.5,
      holeMm: 4.3,
      toleranceMm: 0.5,
    });
    await expect(changeFrame(host, { frameId: id, figures: figures() })).rejects.toMatchObject({
      code: "already_there",
    });
    const notes = await db.owner("audit").where({ subject_id: id }).orderBy("id").select("action");
    expect(notes.map((each) => each.action)).toEqual(["frame.add", "frame.change"]);
  });

  it("is the host's to set", async () => {
    const operator = asOperator(world);
    await expect(readHostFrames(operator.actor)).rejects.toMatchObject({ code: "forbidden" });
    await expect(addFrame(operator, figures({ depthMm: 32 }))).rejects.toMatchObject({ code: "forbidden" });
  });

  it("has holes inside the square and outside the bore", () => {
    const told = (more: object) =>
      frameFigures.safeParse({ ...figures(), ...more }).error?.issues.map(({ path }) => path[0]);
    expect(told({ boreMm: 93 })).toContain("boreMm");
    expect(told({ outerMm: 98 })).toEqual(["outerMm"]);
    expect(told({ holeSpacingMm: 89 })).toEqual(["holeSpacingMm"]);
    // Closed form: the centres of holes 65 mm apart lie 65 √2 = 91.9 mm apart over the corner, their inner edges 87.6 mm.
    expect(told({ holeSpacingMm: 65 })).toEqual(["holeSpacingMm"]);
    expect(told({ holeSpacingMm: 66 })).toBeUndefined();
    expect(told({ frameClass: "200" })).toEqual(["frameClass"]);
    expect(told({ word: "two words" })).toEqual(["word"]);
  });

  it("is drawn in the kit of a season that allows it, by its name with the word", async () => {
    const { id } = await addFrame(host, figures({ boreMm: 84, depthMm: 32, word: "ring" }));
    const { season_id } = await db.owner("season_frame").first("season_id");
    const { slug } = await db.owner("season").where({ id: season_id }).first("slug");
    await db.owner("season_frame").insert({ season_id, frame_id: id });
    const asked = kitFrameParams.parse({ slug, frame: "92x32-ring" });
    expect((await kitSvg(asked)).text).toContain(">bore Ø 84.0<");
    expect((await frameOf("92x32-ring"))?.frozen).toBe("Season 1 opened with it");
    expect(["92x32-ring", "120x25", "other"].map(formatFrame)).toEqual(["92 × 32 ring", "120 × 25", "other"]);
  });
});

describe("a frame in use", () => {
  it("stands once a season opened with it, in the use-case as in the database", async () => {
    const frame = await frameOf("120x25");
    expect(frame?.frozen).toMatch(/Season 1 opened with it/);
    const frameId = frame?.id ?? "";
    const change = { frameId, figures: figures({ frameClass: "120", outerMm: 120, boreMm: 113, holeSpacingMm: 105 }) };
    await expect(changeFrame(host, change)).rejects.toMatchObject({
      code: "moved_on",
      detail: expect.stringMatching(/^The frame 120 × 25 doesn’t change any more: Season 1 opened with it/),
    });
    const update = db.app("frame").where({ id: frameId }).update({ bore_mm: 113 });
    await expect(update).rejects.toThrow("the frame is in use");
  });

  it("stands once a revision was sent in for it, though no season opened with it; a draft alone leaves it free", async () => {
    const { id: frameId } = await addFrame(host, figures({ depthMm: 38 }));
    const { id: design_id } = await db.owner("design").first("id");
    const [revision] = await db
      .owner("revision")
      .insert({ design_id, letter: "Z", licence: "CC0-1.0" })
      .returning("id");
    await db
      .owner("revision_trait")
      .insert({ revision_id: revision.id, stages: 1, frame_id: frameId, material: "PLA" });
    await changeFrame(host, { frameId, figures: figures({ depthMm: 38, boreMm: 87 }) });
    await db.owner("revision").where({ id: revision.id }).update({ sent_in_at: new Date() });
    await expect(changeFrame(host, { frameId, figures: figures({ depthMm: 38 }) })).rejects.toMatchObject({
      code: "moved_on",
      detail: expect.stringContaining("1 revision was sent in for it"),
    });
    await expect(db.app("frame").where({ id: frameId }).update({ bore_mm: 86 })).rejects.toThrow("the frame is in use");
  });
});
