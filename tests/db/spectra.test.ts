import { beforeAll, expect, it } from "vitest";
import { insertSpectra, standingSpectra, type SpectrumInsert } from "@/db/queries/spectra";
import { snapshotSchema } from "@/lib/contracts/publication";
import { recomputePublications } from "@/lib/server/publishing/recompute";
import { publishDueRounds, scheduleRound } from "@/lib/server/publishing/schedule";
import { readRoundForReview } from "@/lib/server/review/read-round";
import { signRound } from "@/lib/server/review/sign-round";
import { asHost, asReviewer, makeBenchWorld, measureRound, type BenchWorld } from "../factories/measured-round";
import { setUpDatabase } from "../setup/database";

const db = setUpDatabase();
let world: BenchWorld;
let open: Awaited<ReturnType<typeof measureRound>>;
let closed: Awaited<ReturnType<typeof measureRound>>;

beforeAll(async () => {
  world = await makeBenchWorld(db.owner);
  closed = await measureRound(world, { number: 1 });
  open = await measureRound(world, { number: 2, ends: "measuring" });
});

const personId = (handle: string) => world.cast.people.get(handle) ?? "";

async function likeFirst(sessionId: string): Promise<SpectrumInsert & { supersedesId: string }> {
  const [first] = (await standingSpectra(db.app, { sessionIds: [sessionId] })).filter((each) => each.runId !== null);
  if (!first) throw new Error("the demo's session has no spectrum");
  const { id, at: _at, supersedes: _s, ...same } = first;
  return { ...same, byPerson: personId("benchwright"), supersedesId: id };
}

it("stands as written: neither the application nor the owner changes or deletes it", async () => {
  for (const role of [db.app, db.owner]) {
    const rows = role("spectrum").where({ session_id: open.sessionId });
    await expect(rows.clone().update({ level_a_dba: 1 })).rejects.toThrow(/permission denied|insert only/);
    await expect(rows.clone().delete()).rejects.toThrow(/permission denied|insert only/);
  }
});

it("goes into an open session, of its own run and bench, and gives way to a later one of the same run", async () => {
  const { supersedesId, ...like } = await likeFirst(open.sessionId);
  await expect(insertSpectra(db.app, [{ ...like, sessionId: closed.sessionId }])).rejects.toMatchObject({
    code: "23503",
  });
  const other = world.bench.versions[1]?.positions[0]?.id ?? "";
  await expect(insertSpectra(db.app, [{ ...like, positionId: other }])).rejects.toMatchObject({ code: "23503" });
  await expect(insertSpectra(db.app, [{ ...like, source: "recording" }])).rejects.toMatchObject({ code: "23514" });
  await expect(insertSpectra(db.app, [{ ...like, supersedes: supersedesId }])).rejects.toMatchObject({ code: "23514" });
  const next = { ...like, supersedes: supersedesId, reason: "A door slammed." };
  await expect(insertSpectra(db.app, [{ ...next, runId: null, purpose: "background" }])).rejects.toMatchObject({
    code: "23001",
  });
  const [made] = await insertSpectra(db.app, [next]);
  const standing = (await standingSpectra(db.app, { sessionIds: [open.sessionId] })).map((each) => each.id);
  expect(standing).toContain(made);
  expect(standing).not.toContain(supersedesId);
});

it("comes into a closed session only in another's place, for a review or a correction", async () => {
  const { supersedesId, ...like } = await likeFirst(closed.sessionId);
  await expect(insertSpectra(db.app, [like])).rejects.toMatchObject({ code: "23001" });
  const next = { ...like, supersedes: supersedesId, reason: "Read anew." };
  await expect(insertSpectra(db.app, [next])).rejects.toMatchObject({ code: "23001" });
});

it("keeps whoever brought one in from signing", async () => {
  const { supersedesId: _id, ...like } = await likeFirst(open.sessionId);
  const may = async () =>
    (await db.app.raw("select may_sign(?, ?) as may", [open.roundId, personId("secondlook")])).rows[0]?.may as boolean;
  expect(await may()).toBe(true);
  await insertSpectra(db.app, [{ ...like, byPerson: personId("secondlook") }]);
  expect(await may()).toBe(false);
});

it("is seen at review, signed, frozen and found again from what stands", async () => {
  const { roundId, sessionId } = closed;
  const seen = await readRoundForReview(asReviewer(world).actor, { roundId });
  const spectra = seen.entries[0]?.snapshot?.spectra;
  expect(spectra?.entry.map((each) => each.setSpeed)).toEqual([750, 1100, 1450, 1800]);
  expect(spectra?.baseline.map((each) => each.setSpeed)).toEqual([750, 1100, 1450, 1800]);

  // Behind the program's back, as a fault would do it: another spectrum stands, so what was on screen isn't signed.
  const { supersedesId, ...like } = await likeFirst(sessionId);
  await db.owner.raw("alter table spectrum disable trigger spectrum_allowed");
  await insertSpectra(db.owner, [{ ...like, supersedes: supersedesId, reason: "fault" }]);
  await db.owner.raw("alter table spectrum enable trigger spectrum_allowed");
  const signing = { roundId, remark: "", at: new Date() };
  const stale = signRound(asReviewer(world), { ...signing, expectedSha256: seen.sha256 });
  await expect(stale).rejects.toMatchObject({ code: "moved_on" });

  await signRound(asReviewer(world), signing);
  await scheduleRound(asHost(world), { roundId, publishAt: null, now: new Date() });
  expect((await publishDueRounds(new Date(), undefined, 20)).published).toEqual([roundId]);
  expect(await recomputePublications(db.owner)).toMatchObject({ same: 2, differing: [] });
  const row = await db.public("shown.publication").where({ round_id: roundId }).first("snapshot", "entry_id");
  const frozen = snapshotSchema.parse(row?.snapshot).spectra;
  // Every figure's budget adds up to the whole of its variance (JCGM 100:2008, 5.1.2), and to the figure's own u.
  const whole = snapshotSchema.parse(row?.snapshot);
  expect(whole.budgets?.figures.length).toBe((whole.equalCooling ? 1 : 0) + 5 * whole.points.length);
  for (const { figure, setSpeed, lines } of whole.budgets?.figures ?? []) {
    expect(lines.reduce((sum, line) => sum + line.share, 0)).toBeCloseTo(1, 6);
    const point = whole.points.find((each) => each.setSpeed === setSpeed);
    const u = figure === "level" ? point?.level.u : figure === "delta-t" ? point?.deltaT.u : undefined;
    if (u !== undefined) expect(Math.hypot(...lines.map((line) => line.u))).toBeCloseTo(u, 6);
    // A session's offset is the same for both, so that it's gone from a difference (JCGM 100:2008, F.1.2.3).
    const offset = lines.find((line) => line.kind === "shared_offset" && figure === "delta-t-difference");
    if (offset) expect(offset.cancels).toBe("fully");
  }
  const full = frozen?.entry.find((each) => each.setSpeed === 1800);
  const listed = await db.owner("published_entry").where({ entry_id: row?.entry_id }).first("*");
  expect(listed?.loudness_sone).toBe(full?.loudness?.sone);
  expect(listed?.prominent_tone).toBe(frozen?.entry.some(({ tones }) => tones.some((tone) => tone.prominent === true)));
  // What the world may read of them is that session's; the open round's stays closed.
  const shown = await db.public("shown.spectrum").distinct("session_id").pluck("session_id");
  expect(shown).toEqual([sessionId]);
});
