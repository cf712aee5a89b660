import { execFile } from "node:child_process";
import { mkdtemp, rm, writeFile } from "node:fs/promises";
import { tmpdir } from "node:os";
import path from "node:path";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { analyseRecording } from "@/lib/science/acoustics/analyse-recording";
import { addTone, noise, wavBytes } from "./wav-bytes";

const bytes = wavBytes({ channels: [addTone(noise(41, 3 * 48000, 0.01), 331, 0.02)] });
let folder = "";

function read(...args: string[]): Promise<{ status: number; out: string; err: string }> {
  return new Promise((resolve) => {
    execFile(process.execPath, ["--import", "tsx", "lib/cli/read.ts", ...args], (error, out, err) => {
      resolve({ status: typeof error?.code === "number" ? error.code : 0, out, err });
    });
  });
}

describe("reading sound on the command line", { timeout: 60_000 }, () => {
  beforeAll(async () => {
    folder = await mkdtemp(path.join(tmpdir(), "fanfold-sound-"));
    await writeFile(path.join(folder, "run.wav"), bytes);
    await writeFile(path.join(folder, "short.wav"), bytes.slice(0, 1000));
  });
  afterAll(() => rm(folder, { recursive: true }));

  it("prints one object with the same digits as the code that the server and the browser run", async () => {
    const args = ["--full-scale", "-10.5", "--blades", "11,7", "--rpm", "1806,1806", "--rotation", "counter"];
    const { status, out, err } = await read("sound", path.join(folder, "run.wav"), ...args);
    const { report } = await analyseRecording(bytes, {
      calibration: { fullScaleDb: -10.5 },
      rotors: { blades: [11, 7], rpm: [1806, 1806], rotation: "counter" },
    });
    expect({ status, err }).toEqual({ status: 0, err: "" });
    expect(JSON.parse(out)).toEqual(JSON.parse(JSON.stringify(report)));
    expect(report.tones[0]?.match).toMatchObject({ kind: "blade-passing", rotor: 1, m1: 1 });
  });

  it.each<[string, string[], string]>([
    ["a truncated file", ["short.wav", "--full-scale", "94"], "wav-truncated"],
    ["a file that isn't there", ["none.wav", "--full-scale", "94"], "file-not-read"],
    ["no calibration", ["run.wav"], "calibration-missing"],
    ["an unknown option", ["run.wav", "--full-scale", "94", "--loud"], "bad-arguments"],
    ["a channel that isn't there", ["run.wav", "--full-scale", "94", "--channel", "2"], "channel-missing"],
    [
      "blades and speeds that don't pair",
      ["run.wav", "--full-scale", "94", "--blades", "7,9", "--rpm", "900"],
      "rpm-invalid",
    ],
  ])("leaves with 2 and one line of JSON for %s", async (_what, [file = "", ...args], code) => {
    const { status, out, err } = await read("sound", path.join(folder, file), ...args);
    expect({ status, out }).toEqual({ status: 2, out: "" });
    expect(err.trimEnd().split("\n")).toHaveLength(1);
    expect(JSON.parse(err)).toMatchObject({ code });
  });
});
