import { createHash } from "node:crypto";
import { text } from "node:stream/consumers";
import { rmSync } from "node:fs";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { logAnswer, logQuery } from "@/lib/contracts/bench-logs";
import { readSession } from "@/lib/server/bench/read-session";
import { addRun, addRunReadings, setRunState } from "@/lib/server/bench/runs";
import { takeLog } from "@/lib/server/bench/logs";
import { storage } from "@/lib/services/storage/from-env";
import { adoptEnvironment } from "@/lib/env/env";
import { csvRequest, levelCsv, riseCsv } from "../factories/bench-csv";
import { benchRoom, speedsRpm, type BenchRoom } from "../factories/bench-room";
import { asked, openSession, toTheBench } from "../factories/bench-steps";
import { setUpDatabase } from "../setup/database";
import { temporaryFolder } from "../setup/temporary-folder";

const db = setUpDatabase();
let room: BenchRoom;
let sessionId: string;
let mountNumber = 0;
const folder = temporaryFolder("bench-logs");
afterAll(() => rmSync(folder, { recursive: true }));

beforeAll(async () => {
  adoptEnvironment({ DATA_DIR: folder });
  room = await benchRoom(db.owner);
  await toTheBench(room, room.entries[0]?.entryId ?? "");
  sessionId = await openSession(room);
});

async function newRun(): Promise<string> {
  mountNumber += 1;
  const entryId = room.entries[0]?.entryId ?? "";
  const run = { sessionId, entryId, setSpeed: speedsRpm[0], mountNumber, repeatNumber: 1, readings: [] };
  return (await addRun(asked(room.operator), run)).runId;
}

const take = async (csv: string, query: Record<string, string>, by = room.operator) =>
  logAnswer.parse(
    await takeLog(asked(by), {
      sessionId,
      query: logQuery.parse({ kind: "temperature", ...query }),
      request: csvRequest(csv),
    }),
  );
const readingsOf = async (runId: string) =>
  (await readSession(room.operator, { sessionId })).readings.filter((each) => each.runId === runId);

describe("a temperature log", () => {
  it("is only read until its columns are confirmed", async () => {
    const runId = await newRun();
    const csv = riseCsv({ finalK: 40, continental: true });
    const answer = await take(csv, { runId });
    expect(answer.chosen).toEqual({ time: "Uhrzeit", sensor: "heater (°C)", ambient: "ambient (°C)", level: null });
    expect(answer).toMatchObject({ rows: 721, refusedCount: 0, unusable: null, logFileId: null, readingIds: [] });
    expect(answer.preview[1]?.timeS).toBe(5);
    expect(await db.owner("log_file")).toEqual([]);
    await expect(take(csv, { runId, commit: "yes", sensor: "heater (°C)" })).rejects.toMatchObject({
      code: "malformed",
      fields: [{ path: "ambient" }, { path: "version" }],
    });
  });

  it("keeps the file as received and the rise of its steady part, from °F as from °C", async () => {
    for (const fahrenheit of [false, true]) {
      const runId = await newRun();
      const csv = riseCsv({ finalK: 40, fahrenheit, continental: !fahrenheit });
      const unit = fahrenheit ? "°F" : "°C";
      const confirmed = { commit: "yes", sensor: `heater (${unit})`, ambient: `ambient (${unit})`, version: "1" };
      const answer = await take(csv, { runId, name: "run 1.csv", ...confirmed });
      expect(answer.version).toBe(2);
      const [reading] = await readingsOf(runId);
      expect(reading).toMatchObject({ quantity: "delta_t_k", source: "log", unit: "K" });
      // The generator's own final value; what the gate leaves is within the reading's u (k = 3).
      expect(Math.abs((reading?.value ?? 0) - 40)).toBeLessThan(3 * Number(reading?.detail.uDeltaTK));
      expect(Number(reading?.detail.ambientC)).toBeCloseTo(22, 2);
      const sha256 = createHash("sha256").update(csv).digest("hex");
      const file = await db.owner("file").where({ sha256 }).first();
      expect(Number(file.bytes)).toBe(Buffer.byteLength(csv));
      expect(await text((await storage().get(file.storage_key)).body)).toBe(csv);
    }
  });

  it("keeps every refused row with its line and reason, and shows it in the session", async () => {
    const runId = await newRun();
    const csv = riseCsv({ finalK: 40, broken: { 100: "sensor unplugged", 101: "505,,22.0", 102: "510,abc,22.0" } });
    const answer = await take(csv, { runId, commit: "yes", sensor: "heater", ambient: "ambient", version: "1" });
    // Line 1 is the head: row n stands on line n + 2.
    expect(answer.refused.map(({ line }) => line)).toEqual([102, 103, 104]);
    const log = (await readSession(room.operator, { sessionId })).logs.find((each) => each.runId === runId);
    expect(log).toMatchObject({ refusedCount: 3, rowsRead: 718, refused: answer.refused });
    expect(answer.readingIds).toHaveLength(1);
  });

  it("gives no reading while it isn't steady and says which clause failed; the file is kept", async () => {
    const runId = await newRun();
    const csv = riseCsv({ finalK: 40, lengthS: 300 });
    const answer = await take(csv, { runId, commit: "yes", sensor: "heater", ambient: "ambient", version: "1" });
    expect(answer.unusable).toMatch(/^No steady state: .*the slope is above its limit/);
    expect(answer).toMatchObject({ readingIds: [], version: 2 });
    expect(await db.owner("log_file").where({ id: answer.logFileId })).toHaveLength(1);
    const typed = { quantity: "sensor_c" as const, value: 61.9, source: "typed" as const };
    await addRunReadings(asked(room.operator), { runId, version: 2, readings: [typed] });
  });

  it("names a column that isn't there and a file that is no log", async () => {
    const runId = await newRun();
    await expect(take(riseCsv({ finalK: 40 }), { runId, sensor: "probe 9" })).rejects.toMatchObject({
      code: "malformed",
      fields: [{ path: "sensor" }],
    });
    await expect(take("nothing in here\n", { runId })).rejects.toMatchObject({ code: "malformed" });
    await expect(take("", { runId })).rejects.toMatchObject({ code: "malformed" });
  });
});

describe("a level log", () => {
  it("gives the energy mean at the position that was confirmed", async () => {
    const runId = await newRun();
    const query = {
      runId,
      kind: "level",
      commit: "yes",
      level: "LAeq (dB(A))",
      positionId: room.positionId,
      version: "1",
    };
    await take(levelCsv(45, 55, 60), query);
    const [reading] = await readingsOf(runId);
    // 10 lg((10^4.5 + 10^5.5) / 2) = 52.4036 dB (energy mean, ISO 3744:2010, Eq. (12)), by hand.
    expect(reading?.value).toBeCloseTo(52.4036, 4);
    expect(reading).toMatchObject({ positionId: room.positionId, detail: { n: 60 } });
    await expect(take(levelCsv(45, 55, 60), query)).rejects.toMatchObject({ code: "moved_on" });
    await expect(take(levelCsv(45, 55, 60), { ...query, version: "2" })).rejects.toMatchObject({
      code: "already_there",
    });
  });

  it("is too short below the protocol's averaging time", async () => {
    const runId = await newRun();
    const answer = await take(levelCsv(45, 45.2, 10), { runId, kind: "level" });
    expect(answer.unusable).toBe("The record is 5 s long; the protocol averages over 10 s.");
  });

  it("isn't kept for a run that was discarded, nor taken from outside the bench or for another session", async () => {
    const runId = await newRun();
    const query = { runId, kind: "level" };
    await expect(take(levelCsv(45, 46, 60), query, room.designer)).rejects.toMatchObject({ code: "forbidden" });
    await expect(
      takeLog(asked(room.operator), { sessionId: runId, query: logQuery.parse(query), request: csvRequest("") }),
    ).rejects.toMatchObject({ code: "not_found" });
    await setRunState(asked(room.operator), { runId, version: 1, state: "discarded", reason: "belt slipped" });
    await expect(take(levelCsv(45, 46, 60), query)).rejects.toMatchObject({ code: "moved_on" });
  });

  it("is refused as another kind of file, and beyond 64 MB while it comes, before anything is kept", async () => {
    const runId = await newRun();
    const query = logQuery.parse({ runId, kind: "level" });
    const send = (request: Request) => takeLog(asked(room.operator), { sessionId, query, request });
    const words = new Request("http://bench.example/", { method: "POST", body: "x" });
    await expect(send(words)).rejects.toMatchObject({ code: "wrong_kind" });
    const megabyte = new TextEncoder().encode(`0.5,45.0,${"x".repeat(54)}\n`.repeat(2 ** 14));
    let sent = 0;
    const endless = new ReadableStream<Uint8Array>({
      pull(controller) {
        sent += 1;
        controller.enqueue(sent === 1 ? new TextEncoder().encode("time (s),LAeq (dB(A)),note\n") : megabyte);
      },
    });
    const headers = { "content-type": "text/csv" };
    const init: RequestInit & { duplex: "half" } = { method: "POST", body: endless, headers, duplex: "half" };
    const long = new Request("http://bench.example/", init);
    await expect(send(long)).rejects.toMatchObject({ code: "too_large" });
    expect(sent).toBeLessThan(70);
    expect(await db.owner("log_file").where({ run_id: runId })).toEqual([]);
  });
});
