import { spawnSync } from "node:child_process";
import { createHash } from "node:crypto";
import { accessSync, constants, lstatSync, mkdirSync } from "node:fs";
import path from "node:path";
import type { ServerAccount } from "./account";

export interface DataFolder {
  folder: string;
  /** Why it isn't the usual place; undefined when it is. */
  reason?: string;
}

/** Whether that user may enter the folder, tried and not computed: modes, ACLs and mounts all have their say. */
function canEnter(folder: string, account: ServerAccount): boolean {
  const tried = spawnSync("/bin/sh", ["-c", 'cd "$1"', "sh", folder], {
    uid: account.uid,
    gid: account.gid,
    cwd: "/",
    stdio: "ignore",
  });
  return tried.status === 0;
}

function isWritable(folder: string): boolean {
  try {
    accessSync(folder, constants.W_OK | constants.X_OK);
    return true;
  } catch {
    return false;
  }
}

/** Makes the folder, or takes one that is ours: in a world-writable parent somebody else may have laid it out first. */
function claim(folder: string): void {
  mkdirSync(folder, { recursive: true, mode: 0o711 });
  const found = lstatSync(folder);
  if (!found.isDirectory() || found.uid !== (process.getuid?.() ?? found.uid) || (found.mode & 0o022) !== 0) {
    throw new Error(`${folder} is not a folder of our own that only we can write to; move it away or set DATA_DIR.`);
  }
}

/**
 * Chooses and makes the data folder: `wanted`, or `data/` in the clone, or one under /var/tmp when we can't write there
 * or the database's user can't get there.
 *
 * @param root the clone
 * @param account who the database runs as; undefined means ourselves
 * @param wanted DATA_DIR, which is obeyed or refused but never replaced
 * @throws when `wanted` can't be used or the fallback isn't ours
 */
export function chooseDataFolder(root: string, account: ServerAccount | undefined, wanted?: string): DataFolder {
  if (wanted !== undefined) {
    const folder = path.resolve(root, wanted);
    claim(folder);
    if (account && !canEnter(folder, account)) {
      throw new Error(`DATA_DIR ${folder} can't be entered by the user ${account.name}, which the database runs as.`);
    }
    return { folder };
  }
  const usual = path.join(root, "data");
  const blocked = account && !canEnter(root, account) ? `the user ${account.name} can't enter ${root}` : undefined;
  if (!blocked && isWritable(root)) {
    try {
      claim(usual);
      if (isWritable(usual)) return { folder: usual };
    } catch {
      // Somebody else's data/ (made by root, say) is left alone; ours goes to the fallback.
    }
  }
  const key = createHash("sha256").update(path.resolve(root)).digest("hex").slice(0, 12);
  const folder = `/var/tmp/fanfold-${process.getuid?.() ?? 0}-${key}`;
  claim(folder);
  return { folder, reason: blocked ?? `${usual} is not ours to write to` };
}
