import { chmodSync, mkdtempSync } from "node:fs";
import os from "node:os";
import path from "node:path";

/** A folder under the system's temporary one that the database's user can pass through. Whoever asks deletes it. */
export function temporaryFolder(name: string): string {
  const folder = mkdtempSync(path.join(os.tmpdir(), `fanfold-${name}-`));
  chmodSync(folder, 0o711);
  return folder;
}
