import { spawnSync } from "node:child_process";
import { chownSync, existsSync, mkdirSync, readFileSync, renameSync, rmSync, writeFileSync } from "node:fs";
import path from "node:path";
import type { ServerAccount } from "./account";
import { findServerBinaries, type ServerBinaries } from "./binaries";

/** What PostgreSQL's programs get of the environment: none of ours, so that no PG* variable or secret reaches them. */
export const serverEnvironment: NodeJS.ProcessEnv = {
  NODE_ENV: "production",
  PATH: "/usr/bin:/bin",
  LC_ALL: "C.UTF-8",
};

export const adminRole = "fanfold_admin";

/** Which version made the cluster in this folder; undefined when there is no cluster yet. */
export function clusterMajor(pgdata: string): number | undefined {
  const file = path.join(pgdata, "PG_VERSION");
  return existsSync(file) ? Number(readFileSync(file, "utf8")) : undefined;
}

/** The programs that fit the folder: its own version, or the newest for a new one. */
export function binariesFor(pgdata: string): ServerBinaries {
  const made = clusterMajor(pgdata);
  const found = findServerBinaries(made);
  if (found) return found;
  const wanted =
    made === undefined
      ? "PostgreSQL is not installed"
      : `${pgdata} was made by PostgreSQL ${made}, which is not installed`;
  throw new Error(`${wanted}. On Debian: apt-get install ${made === undefined ? "postgresql" : `postgresql-${made}`}`);
}

/**
 * Makes an empty cluster that takes passwords only. It is made beside its place and moved there when it is whole, so an
 * interrupted start leaves nothing that looks like a cluster.
 */
export function initialiseCluster(pgdata: string, account: ServerAccount | undefined, adminPassword: string): void {
  const partial = `${pgdata}.partial`;
  rmSync(partial, { recursive: true, force: true });
  mkdirSync(partial, { mode: 0o700 });
  const passwordFile = path.join(path.dirname(pgdata), ".initial-password");
  rmSync(passwordFile, { force: true });
  writeFileSync(passwordFile, `${adminPassword}\n`, { mode: 0o600, flag: "wx" });
  try {
    if (account) {
      chownSync(partial, account.uid, account.gid);
      chownSync(passwordFile, account.uid, account.gid);
    }
    const made = spawnSync(
      path.join(binariesFor(pgdata).folder, "initdb"),
      [
        "-D",
        partial,
        "-U",
        adminRole,
        `--pwfile=${passwordFile}`,
        "--auth=scram-sha-256",
        "-E",
        "UTF8",
        "--locale=C.UTF-8",
      ],
      {
        cwd: partial,
        uid: account?.uid,
        gid: account?.gid,
        encoding: "utf8",
        env: serverEnvironment,
      },
    );
    if (made.status !== 0) throw new Error(`The database's folder could not be made:\n${made.stderr || made.error}`);
    renameSync(partial, pgdata);
  } finally {
    rmSync(passwordFile, { force: true });
    rmSync(partial, { recursive: true, force: true });
  }
}
