import { beforeAll } from "vitest";
import { seedDemo } from "@/lib/cli/demo/seed-demo";
import { setUpDatabase } from "@/tests/setup/database";

/** Two seasons on two bench versions and two baseline units; the last one ends in review and on the bench. */
const size = { seasons: 2, roundsPerSeason: 3, entriesPerRound: 6 };

/** A database of the test file's own with a small demo in it. */
export function setUpSmallDemo() {
  const db = setUpDatabase();
  beforeAll(async () => {
    await seedDemo(db.app, size);
  }, 240_000);
  return db;
}
