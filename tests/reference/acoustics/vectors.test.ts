import { describe, expect, it } from "vitest";
import vectors from "../values/acoustics.json";
import { expectClose } from "../support/vectors";
import { Inputs, type Handlers } from "./handler";
import { levelHandlers } from "./level-handlers";
import { signalHandlers } from "./signal-handlers";
import { toneHandlers } from "./tone-handlers";
import { useHandlers } from "./use-handlers";

interface Entry {
  id: string;
  topic: string;
  source: string;
  fromMemory: boolean;
  inputs: Record<string, unknown>;
  expected: unknown;
  tolerance: number;
}

const entries = vectors as unknown as Entry[];
const handlers: Handlers = { ...levelHandlers, ...signalHandlers, ...toneHandlers, ...useHandlers };

/** Operations of the check values that the product doesn't have, each with its reason. */
const LEFT_OUT: Record<string, string> = {
  fritschCarlson1980: "contrast only: the house interpolates as scipy does, and this is another algorithm",
  dBFS: "the product never states a bare dBFS: levels are rms re full scale plus a calibration",
  quantiserSnr: "a textbook figure that no result of the product rests on",
};

/** Parts of a check value that restate its source rather than a result; they are checked for consistency below. */
const RESTATED = ["published_N", "published_Nmin", "published_Nmax"];

function comparable(expected: unknown): unknown {
  if (typeof expected !== "object" || expected === null || Array.isArray(expected)) return expected;
  return Object.fromEntries(Object.entries(expected).filter(([key]) => !RESTATED.includes(key)));
}

const opOf = (entry: Entry) => String(entry.inputs.fn);
const run = entries.filter((entry) => LEFT_OUT[opOf(entry)] === undefined);

describe("handbook of acoustics: every check value", { timeout: 60_000 }, () => {
  it.each(run.map((entry) => [`${entry.id} (${entry.source}${entry.fromMemory ? "; value from memory" : ""})`, entry]))(
    "%s",
    (_title, entry) => {
      const handler = handlers[opOf(entry as Entry)];
      if (handler === undefined) throw new Error("no handler");
      const { inputs, expected, tolerance } = entry as Entry;
      expectClose(handler(new Inputs(inputs)), comparable(expected), { abs: tolerance });
    },
  );

  it("leaves out only what is listed with a reason", () => {
    const missing = entries.map(opOf).filter((op) => handlers[op] === undefined);
    expect([...new Set(missing)].sort()).toEqual(Object.keys(LEFT_OUT).sort());
    expect(run.length).toBeGreaterThanOrEqual(255);
  });

  it("reads stationary loudness within the published acceptance (ISO 532-1:2017 Annex B.3, clause 5.1; the input of B.2 is not among the check values)", () => {
    const published = entries.filter((entry) => JSON.stringify(entry.expected).includes("published_N"));
    expect(published.map(({ id }) => id)).toEqual(["ZW-B3-2", "ZW-B3-3", "ZW-B3-4", "ZW-B3-5"]);
    for (const { inputs, expected } of published) {
      const limits = expected as { published_Nmin: number; published_Nmax: number };
      const { N_sone: sone } = useHandlers.zwickerStationary?.(new Inputs(inputs)) as { N_sone: number };
      expect(sone).toBeGreaterThanOrEqual(limits.published_Nmin);
      expect(sone).toBeLessThanOrEqual(limits.published_Nmax);
    }
  });
});
