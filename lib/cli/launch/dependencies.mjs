// Plain JavaScript on Node alone: it is what brings the packages.
import { spawn } from "node:child_process";
import { createHash } from "node:crypto";
import { existsSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import path from "node:path";

/**
 * Installs the packages of the lock file when they are missing or others than it says.
 *
 * @param {string} root the clone
 * @returns {Promise<void>} rejects when npm fails or the process is told to stop
 */
export async function ensureDependencies(root) {
  const lock = readFileSync(path.join(root, "package-lock.json"));
  const wanted = `${createHash("sha256").update(lock).digest("hex")} node-${process.versions.modules} ${process.arch}`;
  const marker = path.join(root, "node_modules/.fanfold-installed");
  if (existsSync(marker) && readFileSync(marker, "utf8").trim() === wanted) return;
  if (!matchesLock(JSON.parse(lock.toString("utf8")), path.join(root, "node_modules/.package-lock.json"))) {
    console.log("Installing the packages of the lock file …");
    rmSync(marker, { force: true });
    await run(root, "npm", ["ci", "--include=dev", "--no-audit", "--no-fund", "--loglevel=error"]);
  }
  writeMarker(marker, wanted);
}

/** Somebody else's folder that holds the right packages is used as it is: then there is no marker, only the comparison. */
function writeMarker(marker, content) {
  try {
    writeFileSync(marker, `${content}\n`);
  } catch {
    // Not ours to write to.
  }
}

/** Whether npm's own record of what it installed says the same versions as the lock file. */
function matchesLock(lock, recordFile) {
  if (!existsSync(recordFile)) return false;
  const installed = JSON.parse(readFileSync(recordFile, "utf8")).packages ?? {};
  return Object.entries(lock.packages ?? {}).every(([name, wanted]) => {
    if (name === "" || wanted.link) return true;
    const found = installed[name];
    if (!found) return wanted.optional === true;
    return found.version === wanted.version && found.integrity === wanted.integrity;
  });
}

/** Runs a command to its end; a signal to this process ends it too. */
function run(cwd, command, args) {
  return new Promise((resolve, reject) => {
    const child = spawn(command, args, { cwd, stdio: ["ignore", "inherit", "inherit"], detached: true });
    const signals = ["SIGINT", "SIGTERM", "SIGHUP"];
    let stopped = false;
    const stop = () => {
      stopped = true;
      try {
        process.kill(-child.pid, "SIGTERM");
      } catch {
        // It has ended meanwhile.
      }
    };
    for (const name of signals) process.on(name, stop);
    const settle = (act) => {
      for (const name of signals) process.off(name, stop);
      act();
    };
    child.once("error", (error) => settle(() => reject(error)));
    child.once("exit", (code) =>
      settle(() => {
        if (code === 0 && !stopped) resolve();
        else reject(new Error(stopped ? "Stopped while installing." : `${command} ${args[0]} failed (exit ${code}).`));
      }),
    );
  });
}
