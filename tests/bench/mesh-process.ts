import { open } from "node:fs/promises";
import { fileSource } from "@/lib/cli/read/mesh";
import type { Mesh } from "@/lib/science/geometry/mesh";
import { readModelFile } from "@/lib/science/geometry/model-file";
import { analyseMesh } from "@/lib/science/geometry/analyse";
import { shellReport } from "@/lib/science/geometry/shells";

/**
 * Reads and checks one mesh ("checked"), looks for rotors and traits in it too ("whole"), or does nothing, for the idle
 * size and time; prints the time after imports, the processor's time of the whole process, and the peak memory.
 */
const [kind, file] = process.argv.slice(2);
const began = performance.now();
let checked: object = {};
if ((kind === "checked" || kind === "whole") && file !== undefined) {
  const handle = await open(file, "r");
  const { mesh } = await readModelFile(fileSource(handle, (await handle.stat()).size));
  await handle.close();
  checked = kind === "whole" ? found(mesh) : check(mesh);
}
const ms = performance.now() - began;
const { user, system } = process.cpuUsage();
const cpuMs = (user + system) / 1000;
process.stdout.write(JSON.stringify({ ...checked, ms, cpuMs, peakKb: process.resourceUsage().maxRSS }));

function check(mesh: Mesh): object {
  const { edges, integrals } = shellReport(mesh, [0, 0, 0]);
  const { openEdges, shellCount } = edges;
  return { triangles: mesh.triangles.length / 3, openEdges, shellCount, volumeMm3: integrals[0]?.volumeMm3 };
}

function found(mesh: Mesh): object {
  const { triangles, openEdges, shells, volumeMm3 } = analyseMesh(mesh);
  return { triangles, openEdges, shellCount: shells, volumeMm3 };
}
