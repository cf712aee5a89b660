import { closeDbs, ownerDb } from "@/db/client/handles";
import { demoSize, seedDemo } from "./demo/seed-demo";

/**
 * Fills the migrated, empty database of MIGRATE_DATABASE_URL with the demo and marks it. A process of its own, since it
 * reckons for long stretches, in which a launcher would not hear that it is to stop.
 */
const owner = ownerDb();
try {
  await seedDemo(owner, demoSize, true);
  await owner("demo_seed").insert({ version: 1 }).onConflict("only_one").ignore();
} finally {
  await owner.destroy();
  await closeDbs();
}
