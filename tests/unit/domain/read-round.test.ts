import { mkdtemp, rm, writeFile } from "node:fs/promises";
import { tmpdir } from "node:os";
import path from "node:path";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { readRound } from "@/lib/cli/read/round";
import { onePointEntries, roundInput } from "../../factories/round-input";

let folder = "";
beforeAll(async () => {
  folder = await mkdtemp(path.join(tmpdir(), "round-"));
});
afterAll(() => rm(folder, { recursive: true }));

async function file(name: string, text: string): Promise<string> {
  const where = path.join(folder, name);
  await writeFile(where, text);
  return where;
}

describe("read -- round", () => {
  it("answers what the file's round scores, also with a byte order mark", async () => {
    const input = roundInput(onePointEntries({ A: [36, 34], B: [33, 40] }));
    const answer = await readRound([await file("round.json", `\uFEFF${JSON.stringify(input)}`)]);
    expect(answer).toMatchObject({
      kind: "round",
      entries: [
        { id: "A", score: 70 },
        { id: "B", score: 73 },
      ],
    });
    // All of it is JSON: nothing that isn't a number is lost on the way out.
    expect(JSON.parse(JSON.stringify(answer))).toEqual(answer);
  });

  it("refuses what isn't there, isn't JSON or isn't one file", async () => {
    await expect(readRound([path.join(folder, "none.json")])).rejects.toMatchObject({ code: "file-not-read" });
    await expect(readRound([await file("bad.json", "{")])).rejects.toMatchObject({ code: "not-json" });
    await expect(readRound([])).rejects.toMatchObject({ code: "usage" });
  });
});
