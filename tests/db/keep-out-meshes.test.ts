import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { newBenchVersion } from "@/lib/contracts/bench-admin";
import { newKeepOutMesh } from "@/lib/contracts/keep-outs";
import { adoptEnvironment } from "@/lib/env/env";
import { analyseMesh } from "@/lib/science/geometry/analyse";
import { writeBinaryStl } from "@/lib/science/geometry/stl-write";
import { addBench, addBenchVersion } from "@/lib/server/benches/benches";
import { addKeepOutMesh } from "@/lib/server/benches/keep-out-mesh";
import { dropKeepOut, readKeepOuts } from "@/lib/server/benches/keep-outs";
import { kitSolidStl } from "@/lib/server/kit/kit-solids";
import { asHost, asOperator, makeBenchWorld, type BenchWorld } from "../factories/measured-round";
import { boxMesh, readBytes } from "../factories/rotor-mesh";
import { setUpDatabase } from "../setup/database";

const db = setUpDatabase();
const folder = mkdtempSync(join(tmpdir(), "fanfold-solids-"));
let world: BenchWorld;
let host: ReturnType<typeof asHost>;
let benchVersionId: string;

beforeAll(async () => {
  world = await makeBenchWorld(db.owner);
  host = asHost(world);
  adoptEnvironment({ DATA_DIR: folder });
  const bench = await addBench(host, { slug: "mesh-bench", name: "Mesh bench", description: "" });
  const version = newBenchVersion.parse({
    cooler: "tower",
    heatSource: "block with a thermal cut-out",
    temperatureSensors: "two thermistors",
    microphone: "class 2",
    calibrator: "94 dB",
    changeReason: "A test.",
  });
  ({ id: benchVersionId } = await addBenchVersion(host, { benchId: bench.id, at: new Date(), version }));
});
afterAll(() => rmSync(folder, { recursive: true, force: true }));

const send = (body: Uint8Array<ArrayBuffer>, said: object, by = host, type = "application/octet-stream") =>
  addKeepOutMesh(by, {
    benchVersionId,
    said: newKeepOutMesh.parse(said),
    request: new Request("http://fan.example/", { method: "POST", body, headers: { "content-type": type } }),
  });
/** 4 × 1 × 2 units from the corner −1, −2, −3; whole halves, which single precision holds exactly. */
const block = writeBinaryStl(boxMesh([-1, -2, -3], [4, 1, 2]), "block");

describe("a solid given as a mesh", () => {
  it("is kept in mm by the unit that was said, listed with its reach, and comes in the kit as it was drawn", async () => {
    const { id } = await send(block, { name: "Block", unit: "cm" });
    const { items } = await readKeepOuts(host.actor, { benchVersionId });
    expect(items).toEqual([
      { id, name: "Block", shape: "mesh", note: "", minMm: [-10, -20, -30], maxMm: [30, -10, -10] },
    ]);
    // Its kit is a season's: opened here on this bench version.
    const budget = await db.owner("season_bench").first("budget_version_id");
    const { id: _id, ...season } = await db.owner("season").first();
    const row = { ...season, number: 9, slug: "season-9", opened_at: null, closed_at: null, frozen_at: null };
    const [made] = await db.owner("season").insert(row).returning("id");
    await db.owner("season_bench").insert({ season_id: made.id, bench_version_id: benchVersionId, ...budget });
    await db.owner("season").where({ id: made.id }).update({ opened_at: new Date() });
    const { mesh } = await readBytes((await kitSolidStl({ slug: "season-9", id })).bytes);
    // Closed form: 40 mm × 10 mm × 20 mm.
    expect(analyseMesh(mesh).volumeMm3).toBeCloseTo(40 * 10 * 20, 6);
    await expect(send(block, { name: "Another", unit: "cm" })).rejects.toMatchObject({ code: "moved_on" });
    await db.owner("season").where({ id: made.id }).update({ opened_at: null });
    await dropKeepOut(host, { keepOutId: id });
  });

  it("comes in millimetres too where its size looks like another unit", async () => {
    // A box of 4 mm would be guessed to be in another unit, were it guessed.
    const { id } = await send(block, { name: "Pin", unit: "mm" });
    const { file_id } = await db.owner("keep_out").where({ id }).first("file_id");
    expect(await db.owner("file").where({ id: file_id }).first("kind", "state")).toEqual({
      kind: "stl",
      state: "read",
    });
    await db.owner("season").where({ number: 9 }).update({ opened_at: new Date() });
    const { mesh } = await readBytes((await kitSolidStl({ slug: "season-9", id })).bytes);
    expect(analyseMesh(mesh).boundsMm).toEqual({ min: [-1, -2, -3], max: [3, -1, -1] });
    await db.owner("season").where({ number: 9 }).update({ opened_at: null });
    await dropKeepOut(host, { keepOutId: id });
  });

  it("is refused by field: no unit, one that makes it too large or too small, what is no model, what is broken", async () => {
    const refused = (path: string) => ({ code: "malformed", fields: [{ path, message: expect.any(String) }] });
    expect(newKeepOutMesh.safeParse({ name: "Fins" }).error?.issues.map(({ path }) => path[0])).toEqual(["unit"]);
    await expect(send(block, { name: "Fins", unit: "file" })).rejects.toMatchObject(refused("unit"));
    await expect(send(block, { name: "Fins", unit: "m" })).rejects.toMatchObject(refused("unit"));
    const speck = writeBinaryStl(boxMesh([0, 0, 0], [0.1, 0.1, 0.1]), "speck");
    await expect(send(speck, { name: "Fins", unit: "mm" })).rejects.toMatchObject(refused("unit"));
    const words = new TextEncoder().encode("time,level\n0,41.2\n");
    await expect(send(words, { name: "Fins", unit: "mm" })).rejects.toMatchObject(refused("file"));
    await expect(send(block.slice(0, 200), { name: "Fins", unit: "mm" })).rejects.toMatchObject(refused("file"));
    const type = "application/json";
    await expect(send(block, { name: "Fins", unit: "mm" }, host, type)).rejects.toMatchObject({ code: "wrong_kind" });
    const large = new Uint8Array(32_000_001);
    await expect(send(large, { name: "Fins", unit: "mm" })).rejects.toMatchObject({ code: "too_large" });
    const operator = asOperator(world);
    await expect(send(block, { name: "Fins", unit: "mm" }, operator)).rejects.toMatchObject({ code: "forbidden" });
    expect((await readKeepOuts(host.actor, { benchVersionId })).items).toEqual([]);
  });
});
