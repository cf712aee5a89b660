import { existsSync, readdirSync } from "node:fs";
import path from "node:path";

/** A PostgreSQL server's programs and their major version. */
export interface ServerBinaries {
  major: number;
  folder: string;
}

/**
 * Finds PostgreSQL's server programs in Debian's versioned folders (they are not on the PATH).
 *
 * @param major the version a data folder was made by; undefined takes the newest
 * @param root where the versions lie
 * @returns undefined when none, or not that one, is installed
 */
export function findServerBinaries(major?: number, root = "/usr/lib/postgresql"): ServerBinaries | undefined {
  if (!existsSync(root)) return undefined;
  const found = readdirSync(root)
    .map((name) => ({ major: Number(name), folder: path.join(root, name, "bin") }))
    .filter((each) => Number.isInteger(each.major) && existsSync(path.join(each.folder, "initdb")))
    .sort((a, b) => b.major - a.major);
  return major === undefined ? found[0] : found.find((each) => each.major === major);
}
