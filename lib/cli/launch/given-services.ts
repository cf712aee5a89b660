import { connect } from "@/db/client/connect";
import { pendingMigrations } from "@/db/client/migrator";
import type { Environment } from "@/lib/env/schema";
import { migrateEverything } from "../migrate";
import { holdsDemo } from "./demo-seed";
import { isLoopback } from "./loopback";

const needed = ["PUBLIC_DATABASE_URL", "MEILI_HOST", "SMTP_URL", "NEXTAUTH_SECRET", "NEXTAUTH_URL"] as const;

/**
 * Readies the services that the settings name: with DATABASE_URL set nothing of ours is started and nothing is seeded.
 *
 * @returns whether the database holds the demo, which then keeps to loopback
 * @throws when a setting is missing, the schema is old and may not be migrated, or the demo would be shown to a network
 */
export async function readyGivenServices(settings: Environment, databaseUrl: string): Promise<{ demo: boolean }> {
  const missing = needed.filter((name) => settings[name] === undefined);
  if (missing.length > 0) {
    throw new Error(`DATABASE_URL is set, so no stand-in is started. Please set as well: ${missing.join(", ")}`);
  }
  if (settings.MIGRATE_DATABASE_URL !== undefined) {
    const applied = await migrateEverything(settings.MIGRATE_DATABASE_URL);
    if (applied.length > 0) console.log(`Migrated: ${applied.join(", ")}`);
  }
  const handle = connect(databaseUrl, { poolMax: 1, name: "fanfold start" });
  try {
    const pending = await pendingMigrations(handle);
    if (pending.length > 0) {
      throw new Error(
        `The database lacks ${pending.length} migrations (${pending[0]} is the first). ` +
          "Set MIGRATE_DATABASE_URL to the owner's address, or run npm run migrate with it.",
      );
    }
    const demo = await holdsDemo(handle);
    if (demo && !isLoopback(settings.HOST)) {
      throw new Error(
        `This database holds the demo's accounts, whose password is public: HOST=${settings.HOST} is refused.`,
      );
    }
    return { demo };
  } finally {
    await handle.destroy();
  }
}
