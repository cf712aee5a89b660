import { beforeAll, describe, expect, it } from "vitest";
import { insertListened } from "@/db/queries/recordings";
import { readRawRunsPage } from "@/lib/server/reading/sheet-page";
import { findSessionFile } from "@/lib/server/reading/session-files";
import { publishDueRounds, scheduleRound } from "@/lib/server/publishing/schedule";
import { signRound } from "@/lib/server/review/sign-round";
import { asHost, asReviewer, makeBenchWorld, measureRound, type BenchWorld } from "../factories/measured-round";
import { setUpDatabase } from "../setup/database";

const db = setUpDatabase();
let world: BenchWorld;
let round: Awaited<ReturnType<typeof measureRound>>;
let kept: { logId: string; recordingId: string; readId: string };
let slugs: string[];

async function one(table: string, row: Record<string, unknown>): Promise<string> {
  const [made]: { id: string }[] = await db.owner(table).insert(row).returning("id");
  return made?.id ?? "";
}

/** A temperature log and a recording of a run of the round's first entry, as the bench keeps them. */
async function keepFiles(): Promise<typeof kept> {
  const { sessionId } = round;
  const byPerson = asHost(world).actor.personId;
  const run = await db
    .owner("run")
    .where({ session_id: sessionId, entry_id: round.entryIds[0] })
    .first<{ id: string }>();
  const position = await db.owner("microphone_position").first<{ id: string }>();
  const file = (sha256: string, kind: string) =>
    one("file", { ...{ sha256: sha256.repeat(64), bytes: 10, kind, state: "read" }, storage_key: `files/${sha256}` });
  const of = { session_id: sessionId, run_id: run.id, by_person: byPerson };
  const [csv, wav] = [await file("a", "csv"), await file("b", "wav")];
  const logId = await one("log_file", { ...of, file_id: csv, kind: "temperature", rows_read: 900 });
  const recordingId = await one("log_file", { ...of, file_id: wav, kind: "recording", rows_read: 480_000 });
  const readId = await one("recording_read", {
    ...{ ...of, position_id: position.id, purpose: "run", upload_id: recordingId, file_id: wav, name: "run.wav" },
    ...{ asked: {}, state: "read", result: {}, log_file_id: recordingId, kept_at: new Date() },
  });
  return { logId, recordingId, readId };
}

const shown = async (): Promise<string[]> =>
  (await db.public("shown.log_file").select<{ id: string }[]>("id")).map(({ id }) => id);
const listed = async (slug: string | undefined) => (await readRawRunsPage({ slug: slug ?? "" })).files;

beforeAll(async () => {
  world = await makeBenchWorld(db.owner);
  round = await measureRound(world, { number: 1 });
  kept = await keepFiles();
  slugs = world.entries.slice(0, 2).map(({ design }) => design.slug);
});

describe("logs and recordings behind figures", () => {
  it("are shown to nobody before their round is published", async () => {
    expect(await shown()).toEqual([]);
    await expect(findSessionFile({ fileId: kept.logId })).rejects.toMatchObject({ code: "not_found" });
  });

  it("stand on the sheet of their entry once it is, and a recording waits until somebody listened", async () => {
    const { roundId } = round;
    await signRound(asReviewer(world), { roundId, remark: "", at: new Date() });
    await scheduleRound(asHost(world), { roundId, publishAt: null, now: new Date() });
    await publishDueRounds(new Date(), undefined, 20);
    const files = await listed(slugs[0]);
    expect(files.map(({ id, address }) => [id, address])).toEqual([
      [kept.logId, `/api/v1/session-files/${kept.logId}`],
      [kept.recordingId, null],
    ]);
    expect(await listed(slugs[1]), "a run of another entry").toEqual([]);
    expect((await findSessionFile({ fileId: kept.logId })).rowsRead).toBe(900);
    await expect(findSessionFile({ fileId: kept.recordingId })).rejects.toMatchObject({ code: "moved_on" });
    const byPerson = asReviewer(world).actor.personId;
    await insertListened(db.app, { recordingId: kept.readId, byPerson, at: new Date() });
    expect((await findSessionFile({ fileId: kept.recordingId })).sha256).toBe("b".repeat(64));
  });

  it("a log, which may reach over all runs of its session, is shown only while all of them are public", async () => {
    const [, other] = round.entryIds;
    await db.owner("published_entry").where({ entry_id: other }).delete();
    expect(await shown()).toEqual([kept.recordingId]);
    await expect(findSessionFile({ fileId: kept.logId })).rejects.toMatchObject({ code: "not_found" });
  });

  it("are gone with their reason once taken down", async () => {
    const taken = { state: "taken_down", taken_down_at: new Date("2026-03-14"), reason: "a voice was heard after all" };
    await db
      .owner("file")
      .where({ sha256: "b".repeat(64) })
      .update(taken);
    const refused = findSessionFile({ fileId: kept.recordingId });
    await expect(refused).rejects.toMatchObject({ code: "gone", detail: expect.stringContaining("a voice was heard") });
    const [told] = await listed(slugs[0]);
    expect(told).toMatchObject({ address: null, whyNotServed: expect.stringContaining("14 Mar 2026") });
  });
});
