import type { Knex } from "knex";
import { env, requiredEnv } from "@/lib/env/env";
import { connect } from "./connect";

type Role = "app" | "public";

/** Kept on the global object: the development server loads modules anew at every change and would open pool after pool. */
const kept = globalThis as typeof globalThis & { fanfoldPools?: Map<Role, Knex> };

function pool(role: Role, url: string): Knex {
  kept.fanfoldPools ??= new Map();
  const known = kept.fanfoldPools.get(role);
  if (known) return known;
  const opened = connect(url, { poolMax: env().DATABASE_POOL_MAX, name: `fanfold ${role}` });
  kept.fanfoldPools.set(role, opened);
  return opened;
}

/** The application's own role: reads and writes rows, owns nothing. One pool a process. */
export function appDb(): Knex {
  return pool("app", requiredEnv("DATABASE_URL"));
}

/** The public reader: views of what is published, and nothing else. One pool a process. */
export function publicDb(): Knex {
  return pool("public", requiredEnv("PUBLIC_DATABASE_URL"));
}

/** A pool of the schema's owner, for migrations and the demo's seed alone. The caller closes it. */
export function ownerDb(url: string = requiredEnv("MIGRATE_DATABASE_URL")): Knex {
  return connect(url, { poolMax: 4, name: "fanfold owner" });
}

/** Closes this process's pools, so that it can end. */
export async function closeDbs(): Promise<void> {
  const pools = [...(kept.fanfoldPools?.values() ?? [])];
  kept.fanfoldPools = undefined;
  await Promise.all(pools.map((each) => each.destroy()));
}
