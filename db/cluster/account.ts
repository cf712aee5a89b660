import { readFileSync } from "node:fs";

/** The unprivileged system user that the database runs as when we are root, which PostgreSQL refuses to run as. */
export interface ServerAccount {
  name: string;
  uid: number;
  gid: number;
}

/**
 * Who the database server runs as.
 *
 * @returns undefined when we are an ordinary user (then it runs as ourselves)
 * @throws when we are root and the system has neither a `postgres` nor a `nobody` user
 */
export function serverAccount(ownUid = process.getuid?.() ?? -1, passwd = "/etc/passwd"): ServerAccount | undefined {
  if (ownUid !== 0) return undefined;
  const lines = readFileSync(passwd, "utf8").split("\n");
  for (const wanted of ["postgres", "nobody"]) {
    const fields = lines.find((line) => line.startsWith(`${wanted}:`))?.split(":");
    const uid = Number(fields?.[2]);
    const gid = Number(fields?.[3]);
    if (Number.isInteger(uid) && Number.isInteger(gid) && uid > 0) return { name: wanted, uid, gid };
  }
  throw new Error("The database can't run as root, and this system has no user called postgres or nobody.");
}
