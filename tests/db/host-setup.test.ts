import { beforeAll, describe, expect, it } from "vitest";
import { newBudgetPart, newProtocolVersion } from "@/lib/contracts/bench-admin";
import { declaredTraits } from "@/lib/contracts/own-designs";
import { newSeason } from "@/lib/contracts/seasons-admin";
import type { Person } from "@/lib/domain/accounts/actor";
import * as benches from "@/lib/server/benches/benches";
import { addRevision, makeDesign } from "@/lib/server/designs/make-design";
import { readOwnDesign } from "@/lib/server/designs/own-designs";
import { moveOwnEntry, sendIn } from "@/lib/server/designs/send-in";
import { moveEntryByHost } from "@/lib/server/seasons/move-entry";
import { readHostRound } from "@/lib/server/seasons/read-round";
import { addRoundEntries, planRound } from "@/lib/server/seasons/rounds";
import { changeSeason, makeSeason, moveSeason, readHostSeason } from "@/lib/server/seasons/seasons";
import { makePerson } from "../factories/people";
import { qualifyBench } from "../factories/qualify-bench";
import { setUpDatabase } from "../setup/database";

const db = setUpDatabase();
const at = new Date();
let host: { actor: Person; requestId: null };
let designer: { actor: Person; requestId: null };
let season: ReturnType<typeof newSeason.parse>;
let frameId: string;
let positionId: string;

beforeAll(async () => {
  host = { actor: await makePerson(db.owner, "keeper", "host"), requestId: null };
  designer = { actor: await makePerson(db.owner, "osier"), requestId: null };
});

const part = (quantity: "level_dba" | "delta_t_k", unit: "dB" | "K") =>
  newBudgetPart.parse({
    quantity,
    unit,
    name: "Repeats",
    u: 0.1,
    evaluation: "A",
    distribution: "normal",
    dof: 9,
    source: "ten repeats",
    kind: "own_run",
  });

it("an empty database becomes a bench with protocol, baseline and budget by what the host adds", async () => {
  const bench = await benches.addBench(host, { slug: "north-bench", name: "North bench", description: "" });
  const version = await benches.addBenchVersion(host, {
    benchId: bench.id,
    at,
    version: {
      cooler: "tower",
      heatSource: "block with a thermal cut-out",
      temperatureSensors: "two thermistors",
      temperatureMinC: -40,
      temperatureMaxC: 150,
      microphone: "class 2",
      calibrator: "94 dB",
      calibratorLevelDb: 94,
      microphoneDistanceMm: 100,
      changeReason: "First bench.",
    },
  });
  const budget = await benches.addBudget(host, { benchVersionId: version.id, note: "" });
  await expect(
    benches.addBudgetPart(host, { budgetId: budget.id, part: part("level_dba", "K") }),
  ).rejects.toMatchObject({ code: "malformed" });
  const protocol = await benches.addProtocol(host, { slug: "north-150-w", name: "North 150 W" });
  const protocolVersion = await benches.addProtocolVersion(host, {
    protocolId: protocol.id,
    version: newProtocolVersion.parse({
      heatLoadW: 150,
      setSpeeds: [900, 1400],
      mounts: 3,
      runsPerMount: 1,
      backgroundGrade: "survey",
    }),
  });
  const baseline = await benches.addBaseline(host, { slug: "north-seven", name: "North seven", description: "" });
  const unit = await benches.addBaselineUnit(host, {
    baselineId: baseline.id,
    serial: "N-1",
    inServiceFrom: at.toISOString(),
  });
  const setup = await benches.readBenchSetup(host.actor);
  frameId = setup.frames.find((frame) => frame.key === "120x25")?.id ?? "";
  season = newSeason.parse({
    number: 1,
    title: "Season 1",
    protocolVersionId: protocolVersion.id,
    scoringRuleVersionId: setup.rules.find((rule) => rule.kind === "equal-noise")?.id,
    levelsDba: [40, 46],
    headlineDba: 46,
    frameIds: [frameId],
    inletStackMaxMm: 20,
    benchVersionId: version.id,
    budgetVersionId: budget.id,
    baselineUnitId: unit.id,
  });
  const refused = await makeSeason(host, season).catch((error: unknown) => error);
  expect(refused).toMatchObject({ code: "malformed" });
  expect((refused as { fields: { path: string }[] }).fields.map((field) => field.path)).toEqual([
    "budgetVersionId",
    "protocolVersionId",
  ]);
  await benches.addBudgetPart(host, { budgetId: budget.id, part: part("level_dba", "dB") });
  await benches.addBudgetPart(host, { budgetId: budget.id, part: part("delta_t_k", "K") });
  ({ id: positionId } = await benches.addPosition(host, {
    benchVersionId: version.id,
    position: { name: "on axis", distanceMm: 100, angleDeg: 0 },
  }));
});

describe("a season", () => {
  let seasonId: string;
  let entryId: string;

  it("is made, stays hidden until it is opened, and takes entries only while it is open", async () => {
    await expect(makeSeason(designer, season)).rejects.toMatchObject({ code: "forbidden" });
    await expect(makeSeason(host, { ...season, headlineDba: 50 })).rejects.toMatchObject({ code: "malformed" });
    ({ id: seasonId } = await makeSeason(host, season));
    expect(await db.public("shown.season").select("id")).toEqual([]);
    const { slug } = await makeDesign(designer, { name: "Grüne Mühle", summary: "" });
    expect(slug).toBe("grune-muhle");
    await expect(makeDesign(host, { name: "grune muhle!", summary: "" })).rejects.toMatchObject({
      code: "already_there",
    });
    const traits = declaredTraits.parse({ frameId, material: "PETG", rotors: [{ blades: 7, hand: "right" }] });
    const revision = { licence: "CC0-1.0" as const, changes: "", printNotes: "", traits };
    expect(await addRevision(designer, { slug, revision })).toEqual({ letter: "A" });
    await expect(addRevision(designer, { slug, revision })).rejects.toMatchObject({ code: "moved_on" });
    const send = { slug, letter: "A", seasonId, at };
    await expect(sendIn(designer, send)).rejects.toThrow("takes no entries");
    await expect(moveSeason(host, { seasonId, to: "opened", at })).rejects.toMatchObject({
      code: "moved_on",
      detail: expect.stringMatching(/North bench, version 1 is not qualified at 900, 1400 rpm.*10 baseline remounts/),
    });
    await qualifyBench({
      by: host.actor,
      ...season,
      positionId,
      setSpeeds: [900, 1400],
      reads: ({ mount, setSpeed }) => ({ levelDba: setSpeed / 30 + (mount % 2) / 20, deltaTK: 60 - setSpeed / 100 }),
      at,
    });
    await moveSeason(host, { seasonId, to: "opened", at });
    await expect(sendIn(host, send)).rejects.toMatchObject({ code: "not_found" });
    ({ entryId } = await sendIn(designer, send));
    await expect(sendIn(designer, send)).rejects.toMatchObject({ code: "already_there" });
    expect(await db.public("shown.design").select("id")).toEqual([]);
  });

  it("has an entry returned with a reason, replaced by the next revision, accepted and planned with its hours", async () => {
    const slug = "grune-muhle";
    const move = (id: string, from: string, to: object) =>
      moveEntryByHost(host, { entryId: id, move: { from, ...to } as never, at: new Date() });
    await expect(move(entryId, "accepted", { to: "declined", reason: "x" })).rejects.toMatchObject({
      code: "moved_on",
    });
    await move(entryId, "sent_in", { to: "returned", reason: "The hub doesn't clear the motor." });
    expect((await readOwnDesign(designer.actor, { slug })).entries).toMatchObject([
      { state: "returned", reason: "The hub doesn't clear the motor.", moves: ["sent_in", "withdrawn"] },
    ]);
    const traits = declaredTraits.parse({ frameId, material: "PETG", rotors: [{ blades: 9, hand: "right" }] });
    await addRevision(designer, { slug, revision: { licence: "CC0-1.0", changes: "", printNotes: "", traits } });
    const next = await sendIn(designer, { slug, letter: "B", seasonId, at: new Date() });
    expect((await readOwnDesign(designer.actor, { slug })).entries.map((entry) => entry.state)).toEqual([
      "sent_in",
      "replaced",
    ]);
    const { id: roundId } = await planRound(host, { seasonId, title: "", entryIds: [] });
    const add = () => addRoundEntries(host, { roundId, entryIds: [next.entryId] });
    await expect(add()).rejects.toThrow("is sent in");
    await move(next.entryId, "sent_in", { to: "accepted" });
    await add();
    await expect(add()).rejects.toThrow("stands in a round already");
    const round = await readHostRound(host.actor, { roundId });
    // 3 mounts of 15 min with two runs of 12 min; the baseline's two mounts beside them, by hand: 1.95 h + 1.3 h.
    expect(round.hours).toMatchObject({ entries: 1, sessions: 1, hoursPerEntry: 1.95 });
    expect(round.hours?.hours).toBeCloseTo(3.25, 9);
    const withdrawn = {
      slug,
      entryId: next.entryId,
      from: "accepted" as const,
      to: "withdrawn" as const,
      at: new Date(),
    };
    await moveOwnEntry(designer, withdrawn);
    expect((await readHostRound(host.actor, { roundId })).takenOut).toMatchObject([
      { entryId: next.entryId, reason: "Withdrawn by its designer." },
    ]);
  });

  it("keeps protocol, rule, levels and budget from its first reading on, and still takes new words", async () => {
    const { number: _number, ...same } = season;
    await changeSeason(host, { seasonId, season: { ...same, levelsDba: [40, 46, 50] } });
    await changeSeason(host, { seasonId, season: same });
    await db.owner("season").where({ id: seasonId }).update({ frozen_at: at });
    const levels = changeSeason(host, { seasonId, season: { ...same, levelsDba: [40, 46, 52] } });
    await expect(levels).rejects.toMatchObject({
      code: "moved_on",
      detail: expect.stringContaining("declared levels"),
    });
    await changeSeason(host, { seasonId, season: { ...same, title: "The first season" } });
    expect((await readHostSeason(host.actor, { seasonId })).title).toBe("The first season");
    const byHand = db.app("season").where({ id: seasonId }).update({ headline_dba: 40 });
    await expect(byHand).rejects.toMatchObject({ code: "23001" });
    const budget = db.app("season_bench").where({ season_id: seasonId }).delete();
    await expect(budget).rejects.toMatchObject({ code: "23001" });
  });
});
