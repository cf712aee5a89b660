import { execFile } from "node:child_process";
import { mkdtemp, rm, writeFile } from "node:fs/promises";
import { tmpdir } from "node:os";
import path from "node:path";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import type { BenchAnswer, BenchRequest } from "@/lib/client/bench-reader/messages";
import { workBenchRequest } from "@/lib/client/bench-reader/work";
import { calibratorWav, encodings, fanWav } from "../../factories/recordings";

let folder = "";
beforeAll(async () => {
  folder = await mkdtemp(path.join(tmpdir(), "fanfold-digits-"));
});
afterAll(() => rm(folder, { recursive: true }));

/** Seven blades at 1450 rpm: m·B·n/60 (kinematics). */
const tones = [
  [169.1666667, 50],
  [338.3333333, 44],
] as const;
const rotors = { blades: [7], rpm: [1450] };
const calibrator = calibratorWav();
const background = fanWav({ noiseDb: 30, seed: 3, encoding: { encoding: "int", bits: 24 } });

async function commandLine(...args: string[]): Promise<unknown> {
  const out = await new Promise<string>((resolve, reject) => {
    execFile(process.execPath, ["--import", "tsx", "lib/cli/read.ts", ...args], (error, text) =>
      error ? reject(error) : resolve(text),
    );
  });
  return JSON.parse(out);
}

const put = async (name: string, bytes: Uint8Array): Promise<string> => {
  const file = path.join(folder, name);
  await writeFile(file, bytes);
  return file;
};

/** What the web worker does with a file, its answers as they cross to the page. */
async function inBrowser(bytes: Uint8Array, request: Partial<BenchRequest>): Promise<BenchAnswer[]> {
  const said: BenchAnswer[] = [];
  const file = new Blob([Uint8Array.from(bytes)]);
  await workBenchRequest({ job: 1, file, ...request } as BenchRequest, (answer) => said.push(structuredClone(answer)));
  return said;
}
const last = (said: BenchAnswer[]) => said.at(-1);

async function resultOf(bytes: Uint8Array, order: (BenchRequest & { kind: "recording" })["order"]) {
  const answer = last(await inBrowser(bytes, { kind: "recording", order }));
  if (answer?.kind !== "recording") throw new Error(JSON.stringify(answer));
  // What is given to later recordings goes through the server's JSON.
  return JSON.parse(JSON.stringify(answer.result)) as typeof answer.result;
}

describe("the browser's reader of recordings", { timeout: 120_000 }, () => {
  it.each([...encodings, ["stereo", { encoding: "int", bits: 16 }] as const])(
    "gives the digits of the command line, with a calibrator and a background read before: %s",
    async (name, encoding) => {
      const stereo = name === "stereo";
      const bytes = fanWav({ tones, encoding, stereo, bangAtS: 5 });
      const first = await resultOf(calibrator, { purpose: "calibration", channel: null, levelDb: 94, against: null });
      const read = first.given.calibrator;
      if (!read) throw new Error("no calibration");
      const calibration = { read };
      const quiet = await resultOf(background, { purpose: "background", channel: null, calibration });
      const { report } = await resultOf(bytes, {
        ...{ purpose: "run", channel: 1, calibration, background: quiet.given.background },
        ...{ grade: "survey", rotors },
      });
      const [run, cal, back] = [
        await put(`${name}.wav`, bytes),
        await put("cal.wav", calibrator),
        await put("back.wav", background),
      ];
      const told = ["--channel", "1", "--grade", "survey", "--blades", "7", "--rpm", "1450"];
      const calArgs = ["--cal", cal, "--cal-level", "94"];
      expect(report).toEqual(await commandLine("sound", run, ...calArgs, "--background", back, ...told));
      expect(report.disturbed).toEqual([{ fromS: 5, toS: 6 }]);
      expect(report.background?.marginDb).toBeGreaterThan(10);
      // Sines of 50 and 44 dB, by construction; noise of 40 dB over 24 kHz adds under 0.05 dB to a line's band.
      expect(report.tones.slice(0, 2).map(({ levelDb }) => Math.round(levelDb * 10) / 10)).toEqual([50, 44]);
    },
  );

  it("answers what can't be read with code, reason and place, and a chosen channel that isn't there", async () => {
    const order = { purpose: "run", channel: 3, calibration: { fullScaleDb: 120 }, background: null } as const;
    const whole = { ...order, grade: "engineering", rotors: null } as const;
    const refusal = async (bytes: Uint8Array) => last(await inBrowser(bytes, { kind: "recording", order: whole }));
    expect(await refusal(fanWav({ seconds: 2 }))).toMatchObject({ kind: "refused", code: "channel-missing" });
    expect(await refusal(new Uint8Array(0))).toMatchObject({ kind: "refused", code: "empty-file" });
    expect(await refusal(calibrator.slice(0, 30))).toMatchObject({ kind: "refused", code: "wav-truncated" });
  });
});

describe("the browser's reader of logs", { timeout: 120_000 }, () => {
  it("gives the report of the command line", async () => {
    const rows = Array.from({ length: 720 }, (_, i) => {
      const rise = 40 * (1 - Math.exp((-i * 5) / 300)) + 0.02 * Math.sin(i * 1.7);
      return `${i * 5};${(22 + rise).toFixed(3)};22.00`;
    });
    const csv = Buffer.from(`time (s);heater (°C);ambient (°C)\n${rows.join("\n")}\nbroken;row;here\n`);
    const limits = { epsilonK: 0.1, ambientDriftMaxK: 0.2, levelAverageS: 10 };
    const answer = last(await inBrowser(csv, { kind: "log", order: { kind: "temperature", choice: {}, ...limits } }));
    if (answer?.kind !== "log") throw new Error(JSON.stringify(answer));
    const { chosen, preview, unusable, reading, ...report } = JSON.parse(JSON.stringify(answer.found));
    expect({ kind: "log", ...report }).toEqual(await commandLine("log", await put("log.csv", csv)));
    expect({ chosen: chosen.sensor, rows: preview.length, unusable }).toEqual({
      ...{ chosen: "heater (°C)", rows: 8, unusable: null },
    });
    expect(reading.value).toBe(report.temperature.deltaTK);
  });
});
