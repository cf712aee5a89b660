import { readFile } from "node:fs/promises";
import { parseRound } from "@/lib/domain/scoring/parse-round";
import { roundAnswer } from "@/lib/domain/scoring/round-answer";
import { scoreRound } from "@/lib/domain/scoring/score-round";
import { Refusal } from "@/lib/science/refusal";

const BYTES_MAX = 64 * 1024 * 1024;

/**
 * `read -- round FILE.json`: scores a round from a file, by the code that the server scores with.
 * @throws Refusal for anything that isn't such a round, with the path of the field where there is one
 */
export async function readRound(args: string[]): Promise<object> {
  const [file, ...more] = args;
  if (file === undefined || more.length > 0)
    throw new Refusal("usage", "Exactly one file is read: read -- round FILE.json");
  return roundAnswer(scoreRound(parseRound(await readJson(file))));
}

async function readJson(file: string): Promise<unknown> {
  let bytes: Buffer;
  try {
    bytes = await readFile(file);
  } catch {
    throw new Refusal("file-not-read", "The file can't be read.", file);
  }
  if (bytes.length > BYTES_MAX) throw new Refusal("too-large", `A round's file has at most ${BYTES_MAX} bytes.`, file);
  try {
    return JSON.parse(bytes.toString("utf8").replace(/^\uFEFF/, "")) as unknown;
  } catch (error) {
    throw new Refusal(
      "not-json",
      `The file isn't JSON: ${error instanceof Error ? error.message : "unreadable"}`,
      file,
    );
  }
}
