import type { Mesh } from "@/lib/science/geometry/mesh";
import { Refusal } from "@/lib/science/refusal";
import { hearThread } from "../threads/hear-thread";
import { startMeshThread, type ThreadAnswer } from "./read-mesh";

const WITHIN_MS = 30_000;
/** What stands around a cooler needs few; a larger file is not shown. */
const TRIANGLES_MAX = 200_000;

/**
 * The mesh of a model file in mm, read in a thread of its own and not measured.
 *
 * @param file path of a file of this machine
 * @param mmPerUnit as a person said it; undefined for the unit that the file names by itself
 * @throws Refusal with the reader's reason, "time-limit" after 30 s
 */
export function readMeshAlone(file: string, mmPerUnit: number | undefined): Promise<Mesh> {
  const thread = startMeshThread({
    file,
    limits: { trianglesMax: TRIANGLES_MAX },
    meshAlone: true,
    ...(mmPerUnit !== undefined && { mmPerUnit }),
  });
  return hearThread<ThreadAnswer, Mesh>(
    thread,
    { withinMs: WITHIN_MS, what: "solid" },
    {
      onSaid(answer, { resolve, reject }) {
        if (answer.kind === "mesh") resolve(answer.mesh);
        if (answer.kind === "refused") reject(new Refusal(answer.code, answer.message));
      },
    },
  );
}
