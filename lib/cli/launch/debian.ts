import { existsSync, readFileSync, writeFileSync } from "node:fs";
import { childEnvironment } from "@/lib/env/env";
import { findServerBinaries } from "@/db/cluster/binaries";
import { runChild } from "./children";
import type { Lifetime } from "./lifetime";

const environment = (): Record<string, string> =>
  childEnvironment({ DEBIAN_FRONTEND: "noninteractive", LC_ALL: "C.UTF-8" });

/** Whether packages can be installed here: Debian's client is there and we are root. */
export function mayInstall(): boolean {
  return existsSync("/usr/bin/apt-get") && process.getuid?.() === 0;
}

/** Installs packages with Debian's client. @throws when it fails */
export async function installPackages(life: Lifetime, names: string[]): Promise<void> {
  const apt = (args: string[]) =>
    runChild(life, undefined, {
      name: `apt-get ${args[0]}`,
      command: "/usr/bin/apt-get",
      args: ["-q", "-y", "-o", "Dpkg::Use-Pty=0", "-o", "Dpkg::Options::=--force-confold", ...args],
      cwd: "/",
      env: environment(),
    });
  console.log(`Installing from Debian: ${names.join(", ")} …`);
  await apt(["update"]);
  await apt(["install", "--no-install-recommends", ...names]);
}

/**
 * Sees to it that PostgreSQL's server programs are there. Debian's package also makes and starts a server of the
 * machine's own; that is switched off while we install it, since nobody asked for one.
 *
 * @throws with what to type when it can't be installed by us
 */
export async function ensurePostgres(life: Lifetime): Promise<void> {
  if (findServerBinaries()) return;
  if (!mayInstall()) {
    throw new Error(
      "PostgreSQL is not installed, and only root can install it. As root: apt-get install postgresql\n" +
        "Or set DATABASE_URL, MIGRATE_DATABASE_URL and PUBLIC_DATABASE_URL to a server that you have.",
    );
  }
  await installPackages(life, ["postgresql-common"]);
  const settings = "/etc/postgresql-common/createcluster.conf";
  const before = existsSync(settings) ? readFileSync(settings, "utf8") : "";
  writeFileSync(settings, `${before}\ncreate_main_cluster = false\n`);
  try {
    await installPackages(life, ["postgresql"]);
  } finally {
    writeFileSync(settings, before);
  }
  if (!findServerBinaries())
    throw new Error("PostgreSQL was installed, but its programs are not under /usr/lib/postgresql.");
}
