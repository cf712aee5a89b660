import { open } from "node:fs/promises";
import { fileSource } from "@/lib/cli/read/mesh";
import { fanDrawing } from "@/lib/science/geometry/drawing/fan-drawing";
import { readModelFile } from "@/lib/science/geometry/model-file";

/** Reads a model and draws its front and side, in a process of its own; prints the time after imports, both views, ms. */
const handle = await open(process.argv[2] ?? "", "r");
const began = performance.now();
const { mesh } = await readModelFile(fileSource(handle, (await handle.stat()).size));
const { front, side } = fanDrawing(mesh, { axis: { pointMm: [0, 0, 0], direction: [0, 0, 1] }, rotors: [] });
const ms = performance.now() - began;
await handle.close();
const drawn = [...front.outlines, ...side.outlines].reduce((sum, { d }) => sum + d.length, 0);
process.stdout.write(JSON.stringify({ triangles: mesh.triangles.length / 3, drawn, ms }));
