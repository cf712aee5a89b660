import { createReadStream } from "node:fs";
import { parseArgs } from "node:util";
import { analyseRecording, type SoundOptions } from "@/lib/science/acoustics/analyse-recording";
import type { RotorSet } from "@/lib/science/acoustics/fan-tones";
import type { ByteSource } from "@/lib/science/acoustics/recording";
import type { SoundReport } from "@/lib/science/acoustics/sound-report";
import { ReadError, unreadableReason } from "./fail";

const OPTIONS = {
  cal: { type: "string" },
  "cal-level": { type: "string" },
  "full-scale": { type: "string" },
  channel: { type: "string" },
  background: { type: "string" },
  grade: { type: "string" },
  blades: { type: "string" },
  rpm: { type: "string" },
  rotation: { type: "string" },
  struts: { type: "string" },
} as const;

type Values = Partial<Record<keyof typeof OPTIONS, string>>;

/**
 * `sound FILE.wav (--cal FILE.wav --cal-level 94 | --full-scale L) [--channel N] [--background FILE.wav]
 * [--grade engineering|survey] [--blades 11,7 --rpm 1806,1806 --rotation counter|co --struts 4]`.
 * @throws Refusal for bad arguments, files that can't be read and recordings that can't be used
 */
export async function readSound(args: string[]): Promise<SoundReport> {
  const { file, values } = parse(args);
  const options: SoundOptions = { calibration: calibrationOf(values) };
  if (values.channel !== undefined) options.channel = numberOf(values.channel, "channel");
  if (values.background !== undefined) options.background = fileSource(values.background);
  if (values.grade !== undefined) options.grade = oneOf(values.grade, ["engineering", "survey"] as const, "grade");
  const rotors = rotorsOf(values);
  if (rotors !== undefined) options.rotors = rotors;
  return (await analyseRecording(fileSource(file), options)).report;
}

function parse(args: string[]): { file: string; values: Values } {
  try {
    const { positionals, values } = parseArgs({ args: joinNegative(args), options: OPTIONS, allowPositionals: true });
    const [file, ...more] = positionals;
    if (file === undefined || more.length > 0) throw new ReadError("bad-arguments", "One recording is read at a time.");
    return { file, values };
  } catch (error) {
    if (error instanceof ReadError) throw error;
    throw new ReadError("bad-arguments", error instanceof Error ? error.message : "The arguments can't be read.");
  }
}

/** A level may be negative, and `--full-scale -10` would look like two options. */
function joinNegative(args: string[]): string[] {
  const joined: string[] = [];
  for (const arg of args) {
    const last = joined.at(-1);
    if (/^-[\d.]/.test(arg) && last !== undefined && /^--[a-z-]+$/.test(last))
      joined[joined.length - 1] = `${last}=${arg}`;
    else joined.push(arg);
  }
  return joined;
}

function calibrationOf(values: Values): SoundOptions["calibration"] {
  const { cal, "cal-level": level, "full-scale": fullScale } = values;
  if (fullScale !== undefined) {
    if (cal !== undefined || level !== undefined) {
      throw new ReadError("bad-arguments", "Give a calibration recording or a full-scale level, not both.");
    }
    return { fullScaleDb: numberOf(fullScale, "full-scale") };
  }
  if (cal === undefined || level === undefined) {
    throw new ReadError("calibration-missing", "A level needs --cal FILE.wav with --cal-level, or --full-scale.");
  }
  return { recording: fileSource(cal), levelDb: numberOf(level, "cal-level") };
}

function rotorsOf(values: Values): RotorSet | undefined {
  const { blades, rpm, rotation, struts } = values;
  if (blades === undefined && rpm === undefined) {
    if (rotation === undefined && struts === undefined) return undefined;
    throw new ReadError("bad-arguments", "Rotation and struts need --blades and --rpm beside them.");
  }
  if (blades === undefined || rpm === undefined) {
    throw new ReadError("bad-arguments", "Blades and rpm are given together.", blades === undefined ? "blades" : "rpm");
  }
  const set: RotorSet = { blades: numbersOf(blades, "blades"), rpm: numbersOf(rpm, "rpm") };
  if (rotation !== undefined) set.rotation = oneOf(rotation, ["counter", "co"] as const, "rotation");
  if (struts !== undefined) set.struts = numberOf(struts, "struts");
  return set;
}

function numberOf(text: string, name: string): number {
  const value = text.trim() === "" ? NaN : Number(text);
  if (!Number.isFinite(value)) throw new ReadError("bad-arguments", `--${name} is a number, not "${text}".`, name);
  return value;
}

const numbersOf = (text: string, name: string) => text.split(",").map((part) => numberOf(part, name));

function oneOf<T extends string>(text: string, choices: readonly T[], name: string): T {
  const choice = choices.find((candidate) => candidate === text);
  if (choice === undefined) throw new ReadError("bad-arguments", `--${name} is ${choices.join(" or ")}.`, name);
  return choice;
}

/** The file in pieces, each time from its start; memory doesn't grow with it. */
function fileSource(file: string): ByteSource {
  return async function* pieces(): AsyncGenerator<Uint8Array> {
    try {
      for await (const chunk of createReadStream(file, { highWaterMark: 1 << 20 })) {
        if (chunk instanceof Uint8Array) yield chunk;
      }
    } catch (error) {
      throw new ReadError("file-not-read", `The file can't be read: ${unreadableReason(error)}.`, file);
    }
  };
}
