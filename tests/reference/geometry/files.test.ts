import { createHash } from "node:crypto";
import { describe, expect, it, vi } from "vitest";
import { analyseMesh } from "@/lib/science/geometry/analyse";
import { sniffModel } from "@/lib/science/geometry/model-file";
import { memorySource } from "@/lib/science/geometry/reading";
import { binaryStlBytes } from "@/lib/science/geometry/stl-binary";
import { guessUnit, mmPerUnit } from "@/lib/science/geometry/units";
import { readBytes, refusalOf } from "../../factories/rotor-mesh";
import { nums, vector } from "../support/vectors";

// Every rotor is searched on some hundred thousand lines; a busy machine takes its time.
vi.setConfig({ testTimeout: 180_000 });

const entry = (id: string) => vector(id);

describe("file formats agree with their published descriptions", () => {
  it(entry("T9-01").title, () => {
    const { inputs, expected } = entry("T9-01");
    expect(nums(inputs["triangles"]).map(binaryStlBytes)).toEqual(expected["bytes"]);
  });

  it.each(["T9-02", "T9-03", "T9-04"].map((id) => [entry(id).title, id]))("%s", async (_, id) => {
    const { inputs, expected } = entry(id);
    const { base64, text } = inputs;
    const bytes = typeof base64 === "string" ? Buffer.from(base64, "base64") : Buffer.from(String(text));
    expect(bytes.length).toBe(expected["bytes"]);
    expect(createHash("sha256").update(bytes).digest("hex")).toBe(expected["sha256"]);
    const reading = await readBytes(new Uint8Array(bytes));
    expect(reading.format).toBe(`stl-${String(expected["kind"])}`);
    const found = analyseMesh(reading.mesh);
    expect(found.triangles).toBe(expected["triangles"]);
    expect(found.volumeMm3).toBeCloseTo(Number(expected["volume"]), 3);
    expect(found.watertight).toBe(true);
  });

  it(entry("T9-05").title, () => {
    const { inputs, expected } = entry("T9-05");
    const names: Record<string, string> = { mm: "mm", in: "inch", m: "m", unknown: "unknown", "cm?": "unknown (cm?)" };
    const extents = nums(inputs["max_extent"]);
    const guesses = extents.map(guessUnit);
    expect(guesses.map((guess) => names[guess])).toEqual(expected["guess"]);
    const accepted = guesses.map((guess, i) =>
      guess === "mm" || guess === "in" || guess === "m" ? (extents[i] ?? NaN) * mmPerUnit[guess] : null,
    );
    (expected["extent_mm_if_accepted"] as (number | null)[]).forEach((wanted, i) => {
      if (wanted === null) expect(accepted[i]).toBeNull();
      else expect(Math.abs((accepted[i] ?? NaN) - wanted)).toBeLessThan(1e-6);
    });
  });

  it(entry("T9-06").title, async () => {
    const { inputs } = entry("T9-06");
    const [step = "", zip = "", solid = "", empty = ""] = inputs["first_bytes_hex"] as string[];
    const bytes = (hex: string) => new Uint8Array(Buffer.from(hex, "hex"));
    expect((await sniffModel(memorySource(bytes(step)))).format).toBe("step");
    expect((await sniffModel(memorySource(bytes(zip)))).format).toBe("3mf");
    expect((await sniffModel(memorySource(bytes(solid)))).format).toBe("stl-ascii");
    expect(await refusalOf(bytes(empty))).toBe("empty");
    // A zip is a 3MF only if its relationships say so; STEP is recognised and kept, not measured.
    expect(await refusalOf(bytes(zip))).toBe("zip-broken");
    expect(await refusalOf(bytes(step))).toBe("step-not-measured");
  });
});
