import type { Handle } from "@/db/client/connect";
import { drawWorld } from "@/db/seeds/demo/world";
import { createRandom } from "@/lib/science/statistics/random";
import { addDesigners, readFieldBench } from "./bench";
import { insertRows } from "./insert-rows";
import { seasonRows, tables, type Written } from "./season-rows";

const fieldSeed = 91_000;
const entriesPerRound = 100;
const roundsPerSeason = 4;
const day = 86_400_000;
const firstSeasonAt = Date.UTC(2025, 0, 5, 9);

/**
 * States are set by moves, publications follow a review and the index hears of every row: filled-in rows were never
 * measured, so for their transaction these triggers rest.
 */
const restingTriggers = [
  ["round", "state_at_birth"],
  ["entry", "state_at_birth"],
  ["publication", "publication_allowed"],
  ["published_entry", "search_dirty"],
  ["design_owner", "search_dirty"],
] as const;

/**
 * Adds that many invented, published entries to a database that holds the demo, as its owner: seasons of four hundred,
 * a season a transaction. The same database and number give the same rows. They have snapshots and ranks but no
 * readings, so they can't be recomputed: their sessions are named in filled_session. The search index is left to be filled anew.
 */
export async function fillField(
  owner: Handle,
  { entries, onProgress }: { entries: number; onProgress?: (done: number) => void },
): Promise<void> {
  if (entries <= 0) return;
  const bench = await readFieldBench(owner);
  bench.designers = await addDesigners(owner, entries);
  const seasonCount = Math.ceil(entries / (entriesPerRound * roundsPerSeason));
  // The world's last season ends unpublished, so one more is drawn than is written.
  const world = drawWorld(fieldSeed + bench.lastSeason, { seasons: seasonCount + 1, roundsPerSeason, entriesPerRound });
  const random = createRandom(fieldSeed + bench.lastSeason);
  const written: Written = { designs: new Map(), revisions: new Map() };
  let left = entries;
  for (let season = 1; season <= seasonCount; season += 1) {
    const rounds = world.rounds
      .filter((round) => round.season === season)
      .map((round) => {
        const taken = round.entries.slice(0, left);
        left -= taken.length;
        return { number: round.number, entries: taken };
      })
      .filter((round) => round.entries.length > 0);
    const number = bench.lastSeason + season;
    const opensAt = new Date(firstSeasonAt + number * 2 * day);
    const rows = seasonRows(random, bench, written, { number, opensAt, rounds });
    await owner.transaction(async (tx) => {
      for (const [table, trigger] of restingTriggers)
        await tx.raw("alter table ?? disable trigger ??", [table, trigger]);
      for (const table of tables) await insertRows(tx, table, rows[table] ?? []);
      for (const [table, trigger] of restingTriggers)
        await tx.raw("alter table ?? enable trigger ??", [table, trigger]);
    });
    onProgress?.(entries - left);
  }
  await owner.raw("analyze");
}
