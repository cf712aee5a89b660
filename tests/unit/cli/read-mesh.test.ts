import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, describe, expect, it, vi } from "vitest";
import { readMesh } from "@/lib/cli/read/mesh";
import { scaledMesh } from "@/lib/science/geometry/mesh";
import { generateRotor } from "@/lib/science/geometry/rotor-generator";
import { binaryStl, objectXml, threeMf } from "../../factories/rotor-mesh";

vi.setConfig({ testTimeout: 180_000 });

const folder = mkdtempSync(join(tmpdir(), "fanfold-read-"));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

const rotor = generateRotor({
  blades: 7,
  hand: "right",
  helixPitchMm: 110,
  chordMm: 24,
  thicknessMm: 2,
  hubRadiusMm: 20,
  tipRadiusMm: 56,
  hubDepthMm: 20,
  boreRadiusMm: 2.5,
});

function file(name: string, bytes: Uint8Array): string {
  const path = join(folder, name);
  writeFileSync(path, bytes);
  return path;
}

interface Report {
  readonly unit: string;
  readonly rotors: Record<string, unknown>[];
  readonly warnings: { code: string }[];
  readonly fit: { fits: boolean; smallestClearanceMm: number; reasons: string[] } | null;
}

describe("read -- mesh", () => {
  const stl = file("rotor.stl", binaryStl(rotor));

  it("prints the documented object, no more and no less", async () => {
    const found = (await readMesh([stl, "--rpm", "2000", "--frame", "120x25"])) as Report;
    expect(Object.keys(found)).toEqual(
      [
        "kind",
        "format",
        "unit",
        "triangles",
        "shells",
        "watertight",
        "openEdges",
        "misorientedEdges",
        "overlap",
        "volumeMm3",
      ].concat(["areaMm2", "boundsMm", "axis", "rotors", "stages", "fit", "warnings"]),
    );
    expect(Object.keys(found.rotors[0] ?? {})).toEqual(
      [
        "blades",
        "hand",
        "tipDiameterMm",
        "sweptDiameterMm",
        "hubDiameterMm",
        "axialDepthMm",
        "shroud",
        "stations",
        "massG",
      ].concat([
        "staticUnbalanceGmm",
        "coupleUnbalanceGmm2",
        "balanceGrade",
        "tipSpeedMs",
        "hoopMpa",
        "rootMpa",
        "confidence",
      ]),
    );
    // π · 0.112 m · 2000/60 per second.
    expect(found.rotors[0]?.["tipSpeedMs"]).toBeCloseTo((Math.PI * 0.112 * 2000) / 60, 5);
    expect(found.fit?.fits).toBe(true);
    expect(found.warnings.some((warning) => warning.code.includes("unit"))).toBe(false);
  });

  it("leaves the speed's fields and the fit null without a speed and a frame", async () => {
    const found = (await readMesh([stl])) as Report;
    const [first] = found.rotors;
    expect([first?.["balanceGrade"], first?.["tipSpeedMs"], first?.["hoopMpa"], first?.["rootMpa"], found.fit]).toEqual(
      [null, null, null, null, null],
    );
  });

  it("says what is too large for a frame", async () => {
    const { fit } = (await readMesh([stl, "--frame", "92x15"])) as Report;
    expect(fit?.fits).toBe(false);
    expect(fit?.smallestClearanceMm).toBeLessThan(0);
    expect(fit?.reasons).toHaveLength(2);
  });

  it("warns of a unit that looks wrong and converts only when told", async () => {
    const inches = file("inches.stl", binaryStl(scaledMesh(rotor, 1 / 25.4)));
    const guessed = (await readMesh([inches])) as Report;
    expect(guessed.warnings.some((warning) => warning.code.includes("unit"))).toBe(true);
    const told = (await readMesh([inches, "--unit", "in"])) as Report;
    expect(told.rotors[0]?.["tipDiameterMm"]).toBeCloseTo(112, 2);
    expect(told.unit).toBe("in");
  });

  it("takes a 3MF's unit and transforms, and turns a mirrored build the other way", async () => {
    const items = '<item objectid="1" transform="-1 0 0 0 1 0 0 0 1 1 2 3"/>';
    const path = file("mirror.3mf", threeMf(objectXml(1, scaledMesh(rotor, 0.1)), items, "centimeter"));
    const found = (await readMesh([path])) as Report;
    expect(found.rotors.map((r) => [r["blades"], r["hand"]])).toEqual([[7, "left"]]);
    expect(found.rotors[0]?.["tipDiameterMm"]).toBeCloseTo(112, 2);
  });

  it.each([
    [[]],
    [[stl, "--unit", "ft"]],
    [[stl, "--axis", "w"]],
    [[stl, "--rpm", "-1"]],
    [[stl, "--density", "x"]],
    [[stl, "--frame", "77x25"]],
    [[stl, "--nonsense"]],
  ])("refuses the arguments %j", async (args) => {
    await expect(readMesh(args)).rejects.toMatchObject({ code: "bad-arguments" });
  });

  it("refuses a file that isn't there", async () => {
    await expect(readMesh([join(folder, "none.stl")])).rejects.toMatchObject({ code: "file-unreadable" });
  });
});
