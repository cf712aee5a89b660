import { execFileSync, spawnSync } from "node:child_process";
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { gunzipSync } from "node:zlib";
import { afterAll, describe, expect, it, vi } from "vitest";
import { analyseMesh } from "@/lib/science/geometry/analyse";
import { edgeReport } from "@/lib/science/geometry/edges";
import { generateRotor } from "@/lib/science/geometry/rotor-generator";
import { binaryStl, readBytes, withoutTriangles } from "../../factories/rotor-mesh";
import { openScadRotors } from "./openscad-rotors";

// Rotors made by OpenSCAD and judged by admesh (both from Debian), where they are installed.
vi.setConfig({ testTimeout: 600_000 });

const folder = mkdtempSync(join(tmpdir(), "fanfold-mesh-"));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

const installed = (program: string) => spawnSync(program, ["--version"], { stdio: "ignore" }).error === undefined;
const notRun = (what: string): void => void process.stdout.write(`not run: ${what} is not installed\n`);

/** Bytes of a rotor: made now by OpenSCAD, or as OpenSCAD made it when it was recorded. */
function meshBytes(name: string, program: string): Uint8Array {
  const recorded = join(import.meta.dirname, `${name}.stl.gz`);
  if (!installed("openscad")) {
    notRun("OpenSCAD (the recorded mesh is read)");
    return gunzipSync(readFileSync(recorded));
  }
  const [source, target] = [join(folder, `${name}.scad`), join(folder, `${name}.stl`)];
  writeFileSync(source, program);
  execFileSync("openscad", ["-q", "-o", target, source], { stdio: "ignore" });
  return readFileSync(target);
}

/** What admesh says in its "Original" column, and the volume (single precision: 1 % is its limit). */
function admesh(path: string): { openEdges: number; volumeMm3: number } {
  const out = execFileSync("admesh", [path], { encoding: "utf8" });
  const original = (edges: number) => Number(new RegExp(`Facets with ${edges} disconnected edges? *: *(\\d+)`, "i").exec(out)?.[1] ?? 0);
  const volumeMm3 = Number(/Volume *: *(-?[\d.]+)/.exec(out)?.[1]);
  return { openEdges: original(1) + 2 * original(2) + 3 * original(3), volumeMm3 };
}

describe("rotors made by another tool", () => {
  it.each(openScadRotors)("$name: $expected.blades blades, $expected.hand, as drawn", async ({ name, program, expected }) => {
    const bytes = meshBytes(name, program);
    const found = analyseMesh((await readBytes(bytes)).mesh);
    expect(found.rotors.map((r) => [r.blades, r.hand, r.shroud])).toEqual([[expected.blades, expected.hand, expected.shroud]]);
    const [rotor] = found.rotors;
    expect(Math.abs((rotor?.hubDiameterMm ?? NaN) - expected.hubDiameterMm)).toBeLessThan(0.2);
    expect(Math.abs((rotor?.tipDiameterMm ?? NaN) - expected.tipDiameterMm)).toBeLessThan(0.3);
    expect(found.watertight).toBe(true);
    if (!installed("admesh")) return notRun("admesh");
    const path = join(folder, `${name}-checked.stl`);
    writeFileSync(path, bytes);
    const judged = admesh(path);
    expect(judged.openEdges).toBe(found.openEdges);
    expect(Math.abs((found.volumeMm3 ?? NaN) / judged.volumeMm3 - 1)).toBeLessThan(0.01);
  });
});

describe("open edges", () => {
  const rotor = generateRotor({ blades: 6, hand: "right", helixPitchMm: 100, chordMm: 26, thicknessMm: 2, hubRadiusMm: 20, tipRadiusMm: 58, hubDepthMm: 20 });

  it.each([[[]], [[7]], [[7, 8, 9]], [[100, 500, 900, 901, 1400, 2000]]])("of a rotor without triangles %j agree with admesh", async (missing) => {
    if (!installed("admesh")) return notRun("admesh");
    const path = join(folder, `holes-${missing.length}.stl`);
    const bytes = binaryStl(withoutTriangles(rotor, missing));
    writeFileSync(path, bytes);
    expect(edgeReport((await readBytes(bytes)).mesh).openEdges).toBe(admesh(path).openEdges);
  });
});
