import { execFileSync, spawnSync } from "node:child_process";
import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { Readable } from "node:stream";
import { PDFDocument } from "pdf-lib";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { analyseMesh } from "@/lib/science/geometry/analyse";
import { fileOfContent } from "@/db/queries/uploads";
import { toyFinStack } from "@/db/seeds/demo/toy-mesh";
import { adoptEnvironment } from "@/lib/env/env";
import { writeBinaryStl } from "@/lib/science/geometry/stl-write";
import { contentOf, keepContent } from "@/lib/server/uploads/content";
import { kitSvg } from "@/lib/server/kit/kit-drawing";
import { kitPdf } from "@/lib/server/kit/kit-pdf";
import { kitSolidsStl, kitSolidStl } from "@/lib/server/kit/kit-solids";
import { readKit } from "@/lib/server/kit/read-kit";
import { makeBenchWorld } from "../factories/measured-round";
import { readBytes } from "../factories/rotor-mesh";
import { setUpDatabase } from "../setup/database";

const db = setUpDatabase();
const folder = mkdtempSync(join(tmpdir(), "fanfold-kit-"));
const slug = "season-1";
interface Box {
  id: string;
  min_mm: number[];
  max_mm: number[];
}
let boxes: Box[] = [];

beforeAll(async () => {
  await makeBenchWorld(db.owner);
  // Once a season opened, frames and solids stand; what follows them is tried by changing them all the same.
  for (const table of ["keep_out", "frame"]) await db.owner.raw("alter table ?? disable trigger user", [table]);
  boxes = await db
    .owner("keep_out as k")
    .join("season_bench as b", "b.bench_version_id", "k.bench_version_id")
    .join("season as s", "s.id", "b.season_id")
    .where("s.slug", slug)
    .select("k.id", "k.min_mm", "k.max_mm");
});
afterAll(() => rmSync(folder, { recursive: true, force: true }));

const volumeOf = ({ min_mm, max_mm }: Box) => max_mm.reduce((v, high, axis) => v * (high - (min_mm[axis] ?? 0)), 1);

/** admesh (Debian) sums volume in single precision, so that 1 % is its limit. Undefined where it isn't installed. */
function byAdmesh(bytes: Uint8Array): number | undefined {
  if (spawnSync("admesh", ["--version"], { stdio: "ignore" }).error) {
    process.stdout.write("not run: admesh is not installed\n");
    return undefined;
  }
  const path = join(folder, "solid.stl");
  writeFileSync(path, bytes);
  return Number(/Volume *: *(-?[\d.]+)/.exec(execFileSync("admesh", [path], { encoding: "utf8" }))?.[1]);
}

async function expectVolume(bytes: Uint8Array, volumeMm3: number, shells: number): Promise<void> {
  const { mesh, warnings } = await readBytes(bytes);
  const found = analyseMesh(mesh);
  expect([found.watertight, found.shells, warnings]).toEqual([true, shells, []]);
  // Corners of the demo's boxes are whole millimetres, which single precision holds exactly: length × width × height.
  expect(found.volumeMm3).toBeCloseTo(volumeMm3, 6);
  const judged = byAdmesh(bytes);
  if (judged !== undefined) expect(Math.abs(judged / volumeMm3 - 1)).toBeLessThan(0.01);
}

describe("a season's keep-out solids as STL", () => {
  it("have the volume of the bench's boxes, one by one", async () => {
    expect(boxes.length).toBeGreaterThan(1);
    for (const box of boxes) await expectVolume((await kitSolidStl({ slug, id: box.id })).bytes, volumeOf(box), 1);
  });

  it("and all together", async () => {
    const { bytes, name } = await kitSolidsStl({ slug });
    await expectVolume(
      bytes,
      boxes.map(volumeOf).reduce((a, b) => a + b, 0),
      boxes.length,
    );
    expect(name).toBe("season-1-keep-outs.stl");
  });
});

describe("a keep-out solid that is kept as a mesh", () => {
  it("comes in cooler coordinates as it was kept, beside the boxes", async () => {
    adoptEnvironment({ DATA_DIR: folder });
    const bytes = Buffer.from(writeBinaryStl(toyFinStack(10), "fins"));
    const content = await contentOf(async () => Readable.from([bytes]), bytes.length);
    const { sha256, kind } = content;
    const storageKey = await keepContent(content);
    const receivedFrom = (await db.owner("person").first("id")).id;
    const file = { sha256, kind, storageKey, receivedFrom, bytes: bytes.length };
    const fileId = await fileOfContent(db.owner, file);
    const { bench_version_id } = await db.owner("keep_out").where({ id: boxes[0]?.id }).first();
    const row = { bench_version_id, name: "Fin stack", shape: "mesh", file_id: fileId };
    const [made] = await db.owner("keep_out").insert(row).returning("id");
    // Ten plates of 124 mm × 0.5 mm × 48 mm.
    const fins = 10 * 124 * 0.5 * 48;
    await expectVolume((await kitSolidStl({ slug, id: made.id })).bytes, fins, 10);
    await db
      .owner("file")
      .where({ id: fileId })
      .update({ state: "taken_down", reason: "a test", taken_down_at: new Date() });
    await expect(kitSolidStl({ slug, id: made.id })).rejects.toMatchObject({ code: "gone" });
    await db.owner("keep_out").where({ id: made.id }).delete();
  });
});

describe("a season's drawing", () => {
  it("writes the frame's rows and the season's limits, and follows them when they change", async () => {
    const dimensions = async () => {
      const { text } = await kitSvg({ slug, frame: "120x25" });
      const words = [...text.matchAll(/<text[^>]*>([^<]*)<\/text>/g)].map(([, each = ""]) => each);
      return words.flatMap((each) => /([\d.]+)$/.exec(each)?.[1] ?? []).map(Number);
    };
    const row = await db.owner("frame").where({ key: "120x25" }).first();
    const season = await db.owner("season").where({ slug }).first();
    const expected = () => [
      row.outer_mm,
      row.bore_mm,
      row.hole_diameter_mm,
      row.hole_spacing_mm,
      row.depth_mm,
      row.bore_mm - 2 * row.tolerance_mm,
      season.total_depth_max_mm,
      season.inlet_stack_max_mm,
    ];
    expect(await dimensions()).toEqual(expect.arrayContaining(expected()));
    row.bore_mm = 116.25;
    await db.owner("frame").where({ key: "120x25" }).update({ bore_mm: row.bore_mm });
    const after = await dimensions();
    expect(after).toEqual(expect.arrayContaining(expected()));
    // Each figure on the drawing is one of theirs.
    expect(new Set(after)).toEqual(new Set(expected()));
  });

  it("is one page of A4 as PDF (ISO 216: 210 mm × 297 mm), the same bytes for the same rows", async () => {
    const { bytes } = await kitPdf({ slug, frame: "120x38" });
    const pdf = await PDFDocument.load(bytes);
    expect(pdf.getPageCount()).toBe(1);
    const { width, height } = pdf.getPage(0).getSize();
    expect([(width * 25.4) / 72, (height * 25.4) / 72].map(Math.round)).toEqual([297, 210]);
    expect(Buffer.from((await kitPdf({ slug, frame: "120x38" })).bytes).equals(Buffer.from(bytes))).toBe(true);
  });
});

describe("a kit", () => {
  it("is nobody's before its season opens, and has only the season's frames", async () => {
    const { id: _id, ...season } = await db.owner("season").where({ slug }).first();
    await db
      .owner("season")
      .insert({ ...season, number: 77, slug: "season-77", opened_at: null, closed_at: null, frozen_at: null });
    await expect(readKit({ slug: "season-77" })).rejects.toMatchObject({ code: "not_found" });
    await expect(kitSolidsStl({ slug: "season-77" })).rejects.toMatchObject({ code: "not_found" });
    await expect(kitSvg({ slug, frame: "80x25" })).rejects.toMatchObject({ code: "not_found" });
    await expect(kitSolidStl({ slug, id: "00000000-0000-7000-8000-000000000000" })).rejects.toMatchObject({
      code: "not_found",
    });
  });
});
