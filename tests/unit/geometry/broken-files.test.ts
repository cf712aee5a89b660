import { strToU8 } from "fflate";
import { describe, expect, it, vi } from "vitest";
import { analyseMesh } from "@/lib/science/geometry/analyse";
import { generateRotor } from "@/lib/science/geometry/rotor-generator";
import type { Mesh } from "@/lib/science/geometry/mesh";
import {
  binaryStl,
  boxMesh,
  insideOut,
  meshOf,
  objectXml,
  readBytes,
  refusalOf,
  threeMf,
  threeMfPackage,
  together,
  withoutTriangles,
} from "../../factories/rotor-mesh";

// Every rotor is searched on some hundred thousand lines; a busy machine takes its time.
vi.setConfig({ testTimeout: 180_000 });

const box = boxMesh([0, 0, 0], [40, 50, 60]);
const item = '<item objectid="1"/>';
const facet = "facet normal 0 0 1\nouter loop\nvertex 0 0 0\nvertex 60 0 0\nvertex 0 60 0\nendloop\nendfacet\n";
const text = (body: string) => strToU8(body);

function withNumber(value: number): Uint8Array {
  const bytes = binaryStl(box);
  new DataView(bytes.buffer).setFloat32(84 + 50 * 3 + 12, value, true);
  return bytes;
}

describe("a file that can't be read is refused with its reason", () => {
  it.each<[string, Uint8Array, string]>([
    ["empty", new Uint8Array(0), "empty"],
    ["a header without triangles", binaryStl(meshOf([], [])), "empty"],
    ["cut short", binaryStl(box).subarray(0, 300), "truncated"],
    ["a count of four thousand million", binaryStl(box, "x", 0xffffffff), "truncated"],
    ["a NaN vertex", withNumber(NaN), "not-finite"],
    ["an infinite vertex", withNumber(Infinity), "not-finite"],
    ["prose", text("This is a letter about fans, not a mesh. ".repeat(9)), "unknown-format"],
    ["a few bytes", text("abc"), "unknown-format"],
    ["STEP", text("ISO-10303-21;\nHEADER;\nEND-ISO-10303-21;\n"), "step-not-measured"],
    ["ASCII without facets", text("solid a\nendsolid a\n"), "empty"],
    ["ASCII cut inside a facet", text(`solid a\n${facet}${facet.slice(0, 40)}`), "truncated"],
    ["ASCII with decimal commas", text(`solid a\n${facet.replace("60 0 0", "60,5 0 0")}endsolid`), "not-a-number"],
    ["ASCII with NaN", text(`solid a\n${facet.replace("60 0 0", "nan 0 0")}endsolid`), "not-finite"],
    [
      "ASCII with an endless numeral",
      text(`solid a\n${facet.replace("60 0 0", `${"9".repeat(70_000)} 0 0`)}`),
      "not-a-number",
    ],
    ["a zip that is no 3MF", threeMf("", item).subarray(0, 60), "zip-broken"],
    [
      "3MF with a document type",
      threeMf(objectXml(1, box), item, "millimeter", '<!DOCTYPE m [<!ENTITY a "1">]>'),
      "xml-doctype",
    ],
    ["3MF with an entity", threeMf(objectXml(1, box).replace('x="0"', 'x="&a;"'), item), "xml-broken"],
    ["3MF nested too deeply", threeMf("<a>".repeat(500), item), "xml-too-deep"],
    ["3MF with a vertex that isn't there", threeMf(objectXml(1, box).replace('v1="0"', 'v1="99"'), item), "3mf-index"],
    ["3MF in parsecs", threeMf(objectXml(1, box), item, "parsec"), "3mf-unit"],
    [
      "3MF with a flat transform",
      threeMf(objectXml(1, box), '<item objectid="1" transform="0 0 0 0 0 0 0 0 0 0 0 0"/>'),
      "3mf-transform",
    ],
    [
      "3MF whose objects contain themselves",
      threeMf('<object id="1"><components><component objectid="1"/></components></object>', item),
      "3mf-components",
    ],
    ["3MF that builds what isn't there", threeMf(objectXml(2, box), item), "3mf-object"],
  ])("%s", async (_, bytes, code) => {
    expect(await refusalOf(bytes)).toBe(code);
  });

  it("a zip bomb, and one of components, in bounded memory", async () => {
    const start =
      '<model xmlns="http://schemas.microsoft.com/3dmanufacturing/core/2015/02"><resources><object id="1"><mesh><vertices>';
    const bomb = threeMfPackage(strToU8(start + '<vertex x="0" y="0" z="0"/>'.repeat(600_000)));
    expect(bomb.length).toBeLessThan(100_000);
    expect(await refusalOf(bomb)).toBe("zip-bomb");
    const layers = Array.from(
      { length: 12 },
      (_, i) =>
        `<object id="${i + 2}"><components>${`<component objectid="${i + 1}"/>`.repeat(10)}</components></object>`,
    );
    expect(await refusalOf(threeMf(objectXml(1, box) + layers.join(""), '<item objectid="13"/>'))).toBe(
      "3mf-components",
    );
  });

  it("too many triangles, too many bytes, too slow, cancelled", async () => {
    const bytes = binaryStl(box);
    expect(await refusalOf(bytes, { limits: { trianglesMax: 11 } })).toBe("too-many-triangles");
    expect(await refusalOf(bytes, { limits: { bytesMax: 100 } })).toBe("too-large");
    expect(await refusalOf(bytes, { elapsedMs: () => 1e9 })).toBe("time-limit");
    expect(await refusalOf(bytes, { isCancelled: () => true })).toBe("cancelled");
  });
});

describe("a file that can be read in part is read with a warning", () => {
  it.each<[string, Uint8Array, string, number]>([
    ["a count that is too low", binaryStl(box, "x", 3), "count-mismatch", 12],
    ["bytes after the end", Uint8Array.of(...binaryStl(box), 1, 2, 3), "trailing-bytes", 12],
    ["ASCII without endsolid", text(`solid a\n${facet}`), "endsolid-missing", 1],
    ["3MF without build items", threeMf(objectXml(1, box), ""), "3mf-no-build", 12],
  ])("%s", async (_, bytes, code, triangles) => {
    const reading = await readBytes(bytes);
    expect(reading.warnings.map((warning) => warning.code)).toContain(code);
    expect(reading.mesh.triangles.length / 3).toBe(triangles);
  });

  it("ASCII in capitals, with CRLF, on one line, of several solids", async () => {
    for (const body of [
      `SOLID\r\n${facet.toUpperCase().replaceAll("\n", "\r\n")}ENDSOLID\r\n`,
      `solid a ${facet}endsolid a`.replaceAll("\n", " "),
    ]) {
      expect((await readBytes(text(body))).mesh.triangles).toHaveLength(3);
    }
    expect(
      (await readBytes(text(`solid a\n${facet}endsolid a\nsolid facet\n${facet}endsolid`))).mesh.triangles,
    ).toHaveLength(6);
  });

  it("reports progress by triangles", async () => {
    const steps: number[] = [];
    await readBytes(binaryStl(box), { onProgress: (read) => steps.push(read) });
    expect(steps[steps.length - 1]).toBe(12);
  });
});

describe("a faulty mesh is judged, not mended in silence", () => {
  const rotor = generateRotor({
    blades: 5,
    hand: "left",
    helixPitchMm: 90,
    chordMm: 30,
    thicknessMm: 2,
    hubRadiusMm: 20,
    tipRadiusMm: 57,
    hubDepthMm: 20,
  });
  const plain = analyseMesh(rotor);
  const codes = (mesh: Mesh) => analyseMesh(mesh).warnings.map((warning) => warning.code);

  it("saved twice: two shells for each, volume of the union", () => {
    const found = analyseMesh({ ...rotor, triangles: Uint32Array.of(...rotor.triangles, ...rotor.triangles) });
    expect([found.shells, found.overlap, found.watertight]).toEqual([12, true, true]);
    expect(found.volumeMm3).toBeCloseTo(plain.volumeMm3 ?? NaN, 6);
    expect(found.rotors.map((r) => [r.blades, r.hand])).toEqual([[5, "left"]]);
  });

  it("inside out: said, and read as meant", () => {
    const found = analyseMesh(insideOut(rotor));
    expect(found.warnings.map((warning) => warning.code)).toContain("inside-out");
    expect(found.volumeMm3).toBeCloseTo(plain.volumeMm3 ?? NaN, 6);
    expect(found.rotors.map((r) => [r.blades, r.hand])).toEqual([[5, "left"]]);
  });

  it("with holes: no volume, no mass, blades all the same", () => {
    const found = analyseMesh(withoutTriangles(rotor, [3, 400, 1500, 2100]));
    expect([found.watertight, found.volumeMm3, found.massG, found.openEdges]).toEqual([false, null, null, 12]);
    expect(found.rotors.map((r) => [r.blades, r.hand, r.massG])).toEqual([[5, "left", null]]);
    expect(found.faults).toHaveLength(12);
  });

  it("overlapping boxes: the union, within a tenth of a percent", () => {
    // 40·50·60 + 40·30·30 − 20·30·30, by hand.
    const found = analyseMesh(together(box, boxMesh([20, 10, 10], [40, 30, 30])));
    expect(found.overlap).toBe(true);
    expect(Math.abs((found.volumeMm3 ?? NaN) / (120_000 + 36_000 - 18_000) - 1)).toBeLessThan(0.001);
  });

  it("a hollow is taken off, touching boxes are two shells without overlap", () => {
    const hollow = analyseMesh(together(box, insideOut(boxMesh([10, 10, 10], [10, 10, 10]))));
    expect([hollow.overlap, hollow.shells]).toEqual([false, 2]);
    expect(hollow.volumeMm3).toBeCloseTo(119_000, 6);
    const b = boxMesh([40, 0, 0], [40, 50, 60]);
    const touching = analyseMesh(together(box, b));
    expect([touching.overlap, touching.shells]).toEqual([false, 2]);
    expect(touching.volumeMm3).toBeCloseTo(240_000, 6);
  });

  it("no fan: a bracket, a plate, a triangle without area, a heap of triangles", () => {
    const bracket = analyseMesh(together(boxMesh([-30, -20, 0], [60, 40, 4]), boxMesh([26, -20, 4], [4, 40, 40])));
    expect([bracket.rotors, bracket.axis, bracket.stages]).toEqual([[], null, 0]);
    expect(codes(boxMesh([0, 0, 0], [80, 80, 3]))).toContain("no-rotor");
    expect(
      codes(
        together(
          box,
          meshOf(
            [
              [1, 1, 1],
              [2, 2, 2],
            ],
            [[0, 0, 1]],
          ),
        ),
      ),
    ).toContain("zero-area-triangles");
    let seed = 1;
    const random = () => (seed = (16_807 * seed) % 2_147_483_647) / 2_147_483_647;
    const points = Array.from({ length: 15_000 }, () => [100 * random(), 100 * random(), 100 * random()]);
    const soup = meshOf(
      points,
      Array.from({ length: 5000 }, (_, i) => [3 * i, 3 * i + 1, 3 * i + 2]),
    );
    expect(codes(soup)).toContain("too-scattered");
    expect(() => analyseMesh(meshOf([[1, 1, 1]], [[0, 0, 0]]))).toThrow(/one point/);
  });
});
