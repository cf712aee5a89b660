import { open } from "node:fs/promises";
import { fileSource } from "@/lib/cli/read/mesh";
import { readModelFile } from "@/lib/science/geometry/model-file";
import { shellReport } from "@/lib/science/geometry/shells";

/** Reads and checks one mesh (or nothing, for the idle size) and prints time after imports and peak memory. */
const [kind, file] = process.argv.slice(2);
const began = performance.now();
let checked: object = {};
if (kind === "ours" && file !== undefined) {
  const handle = await open(file, "r");
  const { mesh } = await readModelFile(fileSource(handle, (await handle.stat()).size));
  const { edges, integrals } = shellReport(mesh, [0, 0, 0]);
  await handle.close();
  const { openEdges, misorientedEdges, shellCount } = edges;
  checked = {
    triangles: mesh.triangles.length / 3,
    openEdges,
    misorientedEdges,
    shellCount,
    volumeMm3: integrals[0]?.volumeMm3,
  };
}
const ms = performance.now() - began;
process.stdout.write(JSON.stringify({ ...checked, ms, peakKb: process.resourceUsage().maxRSS }));
