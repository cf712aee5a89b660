import { spawnSync } from "node:child_process";
import { rawVariable } from "@/lib/env/env";
import { temporaryFolder } from "./temporary-folder";

/**
 * A data folder for a start of one's own: a copy of the one that `npm test` seeded with the demo, owners and modes
 * kept, or an empty one, which the start then seeds itself.
 */
export function dataFolderOfOnesOwn(name: string): string {
  const folder = temporaryFolder(name);
  const seeded = rawVariable("FANFOLD_SEEDED_FOLDER");
  if (seeded === undefined) return folder;
  const copied = spawnSync("cp", ["-a", `${seeded}/.`, folder], { encoding: "utf8" });
  if (copied.status !== 0) throw new Error(`The seeded folder could not be copied: ${copied.stderr}`);
  return folder;
}
