import { randomBytes } from "node:crypto";
import { constants, createReadStream, createWriteStream } from "node:fs";
import { copyFile, link, mkdir, open, rename, rm, stat } from "node:fs/promises";
import path from "node:path";
import { Readable } from "node:stream";
import { pipeline } from "node:stream/promises";
import { checkKey, FileMissingError, rangeWithin, type Storage } from "./storage";

/** Keeps files in a folder of this machine. Writes go beside the place and are moved there once they are whole and on disk. */
export function localFolderStorage(folder: string): Storage {
  const fileOf = (key: string) => path.join(folder, "kept", ...checkKey(key).split("/"));
  const partial = async () => {
    await mkdir(path.join(folder, "partial"), { recursive: true, mode: 0o700 });
    return path.join(folder, "partial", randomBytes(12).toString("hex"));
  };
  const head = async (key: string) => {
    const found = await stat(fileOf(key)).catch(missingAsUndefined);
    return found?.isFile() ? { bytes: found.size, modifiedAt: found.mtime } : undefined;
  };
  return {
    head,
    async put(key, body, bytes) {
      const target = fileOf(key);
      const temporary = await partial();
      try {
        const source = body instanceof Uint8Array ? Readable.from([body]) : body;
        await pipeline(source, createWriteStream(temporary, { mode: 0o600, flags: "wx" }));
        await reachDisk(temporary, bytes);
        await mkdir(path.dirname(target), { recursive: true, mode: 0o700 });
        await rename(temporary, target);
      } finally {
        await rm(temporary, { force: true });
      }
    },
    async get(key, range) {
      const found = await head(key);
      if (!found) throw new FileMissingError(key);
      if (!range) return { body: createReadStream(fileOf(key)), bytes: found.bytes };
      const { first, last } = rangeWithin(range, found.bytes);
      return { body: createReadStream(fileOf(key), { start: first, end: last }), bytes: last - first + 1 };
    },
    async delete(key) {
      await rm(fileOf(key), { force: true });
    },
    async copyIfAbsent(from, to) {
      const source = fileOf(from);
      const target = fileOf(to);
      if (!(await head(from))) throw new FileMissingError(from);
      if (await head(to)) return "present";
      const temporary = await partial();
      try {
        await copyFile(source, temporary, constants.COPYFILE_EXCL);
        await mkdir(path.dirname(target), { recursive: true, mode: 0o700 });
        // A link fails where a rename would replace: two that copy at once can't undo each other.
        await link(temporary, target);
        return "copied";
      } catch (error) {
        if (codeOf(error) === "EEXIST") return "present";
        throw error;
      } finally {
        await rm(temporary, { force: true });
      }
    },
    async ready() {
      const temporary = await partial();
      const handle = await open(temporary, "wx", 0o600);
      await handle.close();
      await rm(temporary, { force: true });
    },
  };
}

async function reachDisk(file: string, bytes: number): Promise<void> {
  const handle = await open(file, "r+");
  try {
    const { size } = await handle.stat();
    if (size !== bytes) throw new RangeError(`The file has ${size} bytes instead of the ${bytes} that were announced.`);
    await handle.sync();
  } finally {
    await handle.close();
  }
}

function codeOf(error: unknown): unknown {
  return error instanceof Error && "code" in error ? error.code : undefined;
}

function missingAsUndefined(error: unknown): undefined {
  if (codeOf(error) === "ENOENT" || codeOf(error) === "ENOTDIR") return undefined;
  throw error;
}
