import type { Knex } from "knex";
import { seedBench, type DemoBench } from "@/db/seeds/demo/seed-bench";
import { seedDesigns } from "@/db/seeds/demo/seed-designs";
import { seedPeople } from "@/db/seeds/demo/seed-people";
import { seedRound, type DemoCast, type DemoRoundIds } from "@/db/seeds/demo/seed-round";
import { seedSeasons, type DemoSeason } from "@/db/seeds/demo/seed-seasons";
import { drawWorld, type DemoEntry } from "@/db/seeds/demo/world";
import type { Person, Role } from "@/lib/domain/accounts/actor";
import { createRandom } from "@/lib/science/statistics/random";
import { computeSession } from "@/lib/server/results/compute-session";

/** A bench with one open season and entries to measure; people by handle, as the demo has them. */
export interface BenchWorld {
  owner: Knex;
  bench: DemoBench;
  cast: DemoCast;
  season: DemoSeason;
  entries: DemoEntry[];
}

export async function makeBenchWorld(owner: Knex): Promise<BenchWorld> {
  const world = drawWorld(11, { seasons: 1, roundsPerSeason: 2, entriesPerRound: 2 });
  const people = await seedPeople(owner, "no password opens this account");
  const bench = await seedBench(owner);
  const revisions = await seedDesigns(owner, world.designs, people, bench.frames);
  const [season] = await seedSeasons(owner, bench, 1);
  if (!season) throw new Error("no season was made");
  return {
    owner,
    bench,
    cast: { people, revisions },
    season,
    entries: world.rounds.flatMap((round) => round.entries),
  };
}

/** A round of two entries, measured in one session by `benchwright`: in review, or its session still open. */
export async function measureRound(
  world: BenchWorld,
  { number, ends = "in_review" }: { number: number; ends?: "in_review" | "measuring" },
): Promise<DemoRoundIds & { sessionId: string }> {
  const entries = world.entries.slice(2 * number - 2, 2 * number);
  const random = createRandom(400 + number);
  const round = { season: 1, number, entries, ends };
  const made = await seedRound(world.owner, random, world.bench, world.cast, world.season, round);
  const [sessionId] = made.sessionIds;
  if (sessionId === undefined) throw new Error("no session was made");
  await computeSession(world.owner, sessionId);
  return { ...made, sessionId };
}

/** Somebody of the world, asking. */
export function asks(world: BenchWorld, handle: string, role: Role = "member"): { actor: Person; requestId: null } {
  const personId = world.cast.people.get(handle);
  if (personId === undefined) throw new Error(`nobody is called ${handle}`);
  return { actor: { personId, handle, role }, requestId: null };
}

export const asHost = (world: BenchWorld) => asks(world, "alderkeeper", "host");
export const asOperator = (world: BenchWorld) => asks(world, "benchwright", "operator");
export const asReviewer = (world: BenchWorld) => asks(world, "secondlook", "operator");
/** Owns the design of one of a round's entries. */
export const asOwnerOf = (world: BenchWorld, number: number, role: Role = "member") =>
  asks(world, world.entries[2 * number - 2]?.design.owner ?? "", role);
