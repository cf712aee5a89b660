import { describe, expect, it } from "vitest";
import { parseRound } from "@/lib/domain/scoring/parse-round";
import { Refusal } from "@/lib/science/refusal";
import { measuredCurve } from "../../factories/measured-point";

type Json = Record<string, unknown>;

const round = (): Json => ({
  sessions: [
    {
      id: "s1",
      baseline: { unit: "B-01", points: measuredCurve([30, 35], [40, 34]) },
      entries: [{ id: "heronwing", points: measuredCurve([30, 35], [36, 30]) }],
    },
  ],
  rule: { kind: "equal-noise", levelsDba: [32, 34], headlineDba: 32 },
  grade: "engineering",
  seed: 1,
  draws: 100,
});

/** The round with one place changed: `["sessions", 0, "id"]`; undefined takes it out. */
function changed(path: readonly (string | number)[], value: unknown): Json {
  const copy = structuredClone(round());
  let place = copy as Record<string | number, unknown>;
  for (const key of path.slice(0, -1)) place = place[key] as Record<string | number, unknown>;
  const last = path[path.length - 1] ?? "";
  if (value === undefined) delete place[last];
  else place[last] = value;
  return copy;
}

function refusal(json: unknown): { code: string; at: string | number | undefined } {
  try {
    parseRound(json);
  } catch (error) {
    if (error instanceof Refusal) return { code: error.code, at: error.at };
    throw error;
  }
  throw new Error("wasn't refused");
}

const POINT = ["sessions", 0, "entries", 0, "points", 1] as const;
const POINT_PATH = "sessions[0].entries[0].points[1]";

describe("a round from JSON", () => {
  it("is taken as it is, fields that nobody knows let by", () => {
    const json = changed(["title"], "Round 3");
    expect(parseRound(json)).toEqual(round());
  });

  it.each([
    ["deltaTK", 0, "out-of-range"],
    ["deltaTK", -3, "out-of-range"],
    ["deltaTK", "30", "not-a-number"],
    ["deltaTK", null, "not-a-number"],
    ["deltaTK", undefined, "missing"],
    ["levelReadDba", Number.NaN, "not-a-number"],
    ["levelReadDba", Number.POSITIVE_INFINITY, "not-a-number"],
    ["uLevelOwnDb", -0.1, "out-of-range"],
    ["powerW", 0, "out-of-range"],
    ["dof", 0, "out-of-range"],
    ["mount", 1.5, "not-whole"],
    ["setSpeedRpm", 0, "out-of-range"],
  ])("refuses a point's %s of %s with its path", (field, value, code) => {
    expect(refusal(changed([...POINT, field], value))).toEqual({ code, at: `${POINT_PATH}.${field}` });
  });

  it.each([
    [["sessions"], undefined, "missing", "sessions"],
    [["sessions"], [], "empty", "sessions"],
    [["sessions"], {}, "not-a-list", "sessions"],
    [["sessions", 0], null, "not-an-object", "sessions[0]"],
    [["sessions", 0, "id"], "", "not-a-text", "sessions[0].id"],
    [["sessions", 0, "baseline"], undefined, "missing", "sessions[0].baseline"],
    [["sessions", 0, "baseline", "points"], [], "empty", "sessions[0].baseline.points"],
    [["rule"], undefined, "missing", "rule"],
    [["rule", "kind"], "loudest", "not-a-choice", "rule.kind"],
    [["rule", "levelsDba"], [], "empty", "rule.levelsDba"],
    [["rule", "levelsDba"], [32, 32], "twice", "rule.levelsDba[1]"],
    [["rule", "levelsDba", 1], "34", "not-a-number", "rule.levelsDba[1]"],
    [["rule", "headlineDba"], 33, "headline-not-declared", "rule.headlineDba"],
    [["rule"], { kind: "speed-neutral", levelsDba: [] }, "missing", "rule.m"],
    [["grade"], "best", "not-a-choice", "grade"],
    [["seed"], 1.5, "not-whole", "seed"],
    [["seed"], -1, "out-of-range", "seed"],
    [["draws"], 0, "out-of-range", "draws"],
    [["draws"], undefined, "missing", "draws"],
  ] as const)("refuses %j as %j with code %s", (path, value, code, at) => {
    expect(refusal(changed(path, value))).toEqual({ code, at });
  });

  it("refuses an entry that is there twice", () => {
    const entry = { id: "heronwing", points: measuredCurve([30, 35], [36, 30]) };
    const json = changed(["sessions", 0, "entries"], [entry, entry]);
    expect(refusal(json)).toEqual({ code: "twice", at: "sessions[0].entries[1].id" });
  });

  it.each([null, [], 3, "round"])("refuses %j, which is no object", (json) => {
    expect(refusal(json)).toEqual({ code: "not-an-object", at: undefined });
  });
});
