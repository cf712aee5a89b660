import { execFile } from "node:child_process";
import { writeFileSync, rmSync } from "node:fs";
import path from "node:path";
import { afterAll, beforeAll, describe, expect, it, vi } from "vitest";
import { askedRecording, benchRecording, type BenchRecording } from "@/lib/contracts/bench-recordings";
import { benchSession, sessionList, type BenchSession } from "@/lib/contracts/bench-session";
import { encodings, fanWav, fullScaleDb } from "../factories/recordings";
import { signInAs, type Session } from "../setup/session";
import { temporaryFolder } from "../setup/temporary-folder";
import { announce, begin, outcome, sendByTus } from "../setup/uploading";
import { join, uniform, wavBytes } from "../unit/acoustics/wav-bytes";

let operator: Session;
let session: BenchSession;
let runId: string;
let positionId: string;
const folder = temporaryFolder("recordings");
afterAll(() => rmSync(folder, { recursive: true }));

beforeAll(async () => {
  operator = await signInAs("operator");
  const list = sessionList.parse(await (await operator.fetch("/api/v1/bench/sessions?open=true")).json());
  const sessionId = list.items[0]?.id ?? "";
  session = benchSession.parse(await (await operator.fetch(`/api/v1/bench/sessions/${sessionId}`)).json());
  runId = session.runs.find((run) => run.state !== "discarded")?.id ?? "";
  positionId = session.positions[0]?.id ?? "";
});

/** Sends a file whole. @returns what became of the upload */
async function sent(bytes: Uint8Array) {
  const file = { purpose: "recording", subjectId: session.id, name: "run.wav", bytes: bytes.length } as const;
  const { uploadId, address } = await begin(operator, file);
  await sendByTus(operator, { address, bytes });
  return outcome(operator, uploadId);
}

const ask = (uploadId: string, more: object = {}) =>
  operator.send("POST", `/api/v1/bench/sessions/${session.id}/recordings`, {
    ...{ purpose: "run", uploadId, runId, positionId, calibration: { fullScaleDb } },
    ...more,
  });

/** A recording once the job is through with it. */
async function readOf(uploadId: string, more: object = {}): Promise<BenchRecording> {
  const answer = await ask(uploadId, more);
  expect(answer.status, await answer.clone().text()).toBe(202);
  const { recordingId } = askedRecording.parse(await answer.json());
  return vi.waitFor(
    async () => {
      const view = benchRecording.parse(await (await operator.fetch(`/api/v1/bench/recordings/${recordingId}`)).json());
      if (view.state === "waiting" || view.state === "reading") throw new Error("Not read yet.");
      return view;
    },
    { timeout: 60_000, interval: 200 },
  );
}

function commandLine(file: string, ...args: string[]): Promise<unknown> {
  return new Promise((resolve, reject) => {
    execFile(process.execPath, ["--import", "tsx", "lib/cli/read.ts", "sound", file, ...args], (error, out) =>
      error ? reject(error) : resolve(JSON.parse(out)),
    );
  });
}

describe("a recording sent to the bench", () => {
  it.each(encodings)("is read by a job with the digits of the command line, %s", async (name, encoding) => {
    const bytes = fanWav({ tones: [[169.2, 50]], encoding, seed: Math.floor(Math.random() * 1e9), bangAtS: 4 });
    const { uploadId } = await sent(bytes);
    const rotors = { blades: [7], rpm: [1450] };
    const { report, sha256, state } = await readOf(uploadId, { rotors });
    const file = path.join(folder, `${name}.wav`);
    writeFileSync(file, bytes);
    const told = [`--full-scale=${fullScaleDb}`, "--blades", "7", "--rpm", "1450"];
    expect(state).toBe("read");
    expect(report).toEqual(await commandLine(file, ...told));
    expect(sha256).toMatch(/^[0-9a-f]{64}$/);
    expect(report?.tones[0]?.match).toMatchObject({ kind: "blade-passing", rotor: 1, m1: 1 });
  });

  it("is given to nobody before somebody listened to it and ticked", async () => {
    const bytes = fanWav({ seed: Math.floor(Math.random() * 1e9), seconds: 2 });
    const { id } = await readOf((await sent(bytes)).uploadId);
    const file = () => operator.fetch(`/api/v1/bench/recordings/${id}/file`);
    expect((await file()).status).toBe(409);
    const unticked = await operator.send("PUT", `/api/v1/bench/recordings/${id}/listened`, { noVoices: false });
    expect([unticked.status, (await unticked.json()).fields[0].path]).toEqual([400, "noVoices"]);
    const ticked = await operator.send("PUT", `/api/v1/bench/recordings/${id}/listened`, { noVoices: true });
    expect(ticked.status).toBe(204);
    const given = await file();
    expect(given.headers.get("content-type")).toBe("audio/vnd.wave");
    expect(Buffer.from(await given.arrayBuffer()).equals(Buffer.from(bytes))).toBe(true);
  });

  it("is asked for in a way that can be read, else the field and its reason come back", async () => {
    const { uploadId } = await sent(fanWav({ seconds: 1, seed: Math.floor(Math.random() * 1e9) }));
    for (const [more, field] of [
      [{ channel: 0 }, "channel"],
      [{ channel: 1.5 }, "channel"],
      [{ positionId: runId }, "positionId"],
      [{ backgroundId: runId }, "backgroundId"],
      [{ rotors: { blades: [7, 9], rpm: [900] } }, "rotors.rpm"],
      [{ calibration: { recordingId: runId } }, "calibration"],
    ] as const) {
      const answer = await ask(uploadId, more);
      const body = await answer.json();
      expect([answer.status, body.fields[0]?.path], JSON.stringify(body)).toEqual([400, field]);
      expect(answer.headers.get("content-type")).toContain("application/problem+json");
    }
  });
});

describe("a broken recording", () => {
  const sound = (): Float64Array => {
    const next = uniform(Math.floor(Math.random() * 1e9));
    return Float64Array.from({ length: 96_000 }, () => 0.1 * (next() - 0.5));
  };
  const withNaN = (): Float64Array => sound().fill(NaN, 1000, 1001);
  it.each<[string, () => Uint8Array, string]>([
    ["of one byte", () => Uint8Array.of(Math.floor(Math.random() * 256)), "not taken"],
    ["of words", () => Buffer.from(`a recording ${Math.random()}`), "not taken"],
    ["cut after its head", () => wavBytes({ channels: [sound()] }).slice(0, 44), "wav-truncated"],
    ["cut in the middle", () => wavBytes({ channels: [sound()] }).slice(0, 90_001), "wav-truncated"],
    ["without channels", () => wavBytes({ channels: [sound()], header: { channels: 0 } }), "wav-no-channels"],
    ["without a rate", () => wavBytes({ channels: [sound()], header: { rate: 0 } }), "wav-no-rate"],
    ["of an unknown encoding", () => wavBytes({ channels: [sound()], header: { tag: 85 } }), "wav-encoding"],
    ["of 12 bits", () => wavBytes({ channels: [sound()], header: { bits: 12 } }), "wav-bits"],
    ["with NaN", () => wavBytes({ channels: [withNaN()], encoding: "float", bits: 32 }), "wav-not-finite"],
    ["of half a second", () => wavBytes({ channels: [sound().subarray(0, 24_000)] }), "too-short"],
    ["that is clipped", () => wavBytes({ channels: [sound().map((v) => 40 * v)] }), "clipped"],
    ["with bytes behind it", () => join([wavBytes({ channels: [sound()] }), new Uint8Array(7)]), "read"],
  ])("%s gets a clear word", async (_what, make, expected) => {
    const upload = await sent(make());
    if (expected === "not taken") {
      expect(upload.state).toBe("refused");
      expect(upload.reason).toMatch(/taken are wav/);
      expect((await ask(upload.uploadId)).status).toBe(415);
      return;
    }
    const { state, refusal, report } = await readOf(upload.uploadId);
    if (expected === "read") expect(state).toBe("read");
    else {
      expect({ state, code: refusal?.code, report }).toEqual({ state: "refused", code: expected, report: null });
      expect(refusal?.message).toMatch(/^(The|Encoding|Samples|A) .*\.$/);
    }
  });

  it("of no length is not announced, and one of over 200 MB is too large", async () => {
    const file = { purpose: "recording", subjectId: session.id } as const;
    expect((await announce(operator, { ...file, bytes: 0 })).status).toBe(400);
    expect((await announce(operator, { ...file, bytes: 200_000_001 })).status).toBe(413);
  });

  it("with any head is refused or read, and the server goes on", { timeout: 240_000 }, async () => {
    const next = uniform(20_261_201);
    const heads = Array.from({ length: 8 }, () => {
      const bytes = Uint8Array.from(wavBytes({ channels: [sound()] }));
      for (let k = 0; k < 3; k += 1) bytes[12 + Math.floor(next() * 32)] = Math.floor(next() * 256);
      return bytes;
    });
    const views = await Promise.all(heads.map(async (bytes) => readOf((await sent(bytes)).uploadId)));
    for (const { state, refusal } of views) {
      expect(["read", "refused"]).toContain(state);
      expect(refusal?.code, JSON.stringify(refusal)).not.toBe("failed");
    }
    expect((await operator.fetch("/api/v1/health")).status).toBe(200);
  });
});
