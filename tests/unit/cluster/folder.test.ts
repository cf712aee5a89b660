import { chmodSync, mkdirSync, mkdtempSync, rmSync, statSync } from "node:fs";
import os from "node:os";
import path from "node:path";
import { afterEach, beforeEach, expect, test } from "vitest";
import { serverAccount } from "@/db/cluster/account";
import { chooseDataFolder } from "@/db/cluster/folder";

let parent: string;
beforeEach(() => {
  parent = mkdtempSync(path.join(os.tmpdir(), "fanfold-folder-"));
});
const made: string[] = [];
afterEach(() => {
  for (const each of [parent, ...made.splice(0)]) rmSync(each, { recursive: true, force: true });
});
const account = serverAccount();

test("a clone that can be reached keeps its data in its own folder, which others can't write to", () => {
  chmodSync(parent, 0o755);
  const found = chooseDataFolder(parent, account);
  expect(found).toEqual({ folder: path.join(parent, "data") });
  expect(statSync(found.folder).mode & 0o777).toBe(0o711);
});

test.runIf(account)("under a folder that only root may enter, the data goes where the database's user gets to", () => {
  const clone = path.join(parent, "clone");
  mkdirSync(clone);
  chmodSync(parent, 0o700);
  const found = chooseDataFolder(clone, account);
  made.push(found.folder);
  expect(found.folder).toMatch(/^\/var\/tmp\/fanfold-0-[0-9a-f]{12}$/);
  expect(found.reason).toContain(account?.name ?? "");
  expect(chooseDataFolder(clone, account).folder).toBe(found.folder);
  expect(() => chooseDataFolder(clone, account, path.join(clone, "mine"))).toThrow(/DATA_DIR/);
});

test("a folder that somebody else could write to is refused", () => {
  const open = path.join(parent, "open");
  mkdirSync(open);
  chmodSync(open, 0o777);
  expect(() => chooseDataFolder(parent, undefined, open)).toThrow(/only we can write/);
});
