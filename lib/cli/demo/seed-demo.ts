import { hash } from "@node-rs/argon2";
import type { Handle } from "@/db/client/connect";
import { shiftAt } from "@/db/seeds/demo/bench-story";
import { seedBench } from "@/db/seeds/demo/seed-bench";
import { seedDesigns } from "@/db/seeds/demo/seed-designs";
import { demoPassword, seedPeople } from "@/db/seeds/demo/seed-people";
import { seedRound, type DemoRoundIds } from "@/db/seeds/demo/seed-round";
import { seedSeasons } from "@/db/seeds/demo/seed-seasons";
import { drawWorld, type DemoSize } from "@/db/seeds/demo/world";
import { setPublishAt } from "@/db/queries/schedule";
import { moveRound } from "@/db/queries/moves";
import { seedFiles } from "./seed-files";
import type { Person } from "@/lib/domain/accounts/actor";
import { createRandom } from "@/lib/science/statistics/random";
import { bridgeSession } from "@/lib/server/baselines/settle-session";
import { publishRound } from "@/lib/server/publishing/publish-round";
import { computeSession } from "@/lib/server/results/compute-session";
import { signRound } from "@/lib/server/review/sign-round";
import { chartDemoSession, qualifyDemoBench } from "./seed-control";

const worldSeed = 20_240;
const benchSeed = 7_001;
/** Fewer than a host's standing has, so that the demo is there in seconds; the standing says so. */
const demoDraws = 400;
const day = 86_400_000;
const publishedAfterDays = 10;

export const demoSize: DemoSize = { seasons: 4, roundsPerSeason: 6, entriesPerRound: 16 };

/**
 * Fills an empty, migrated database with the Alder Bench: raw readings from the toy model, and from there on the same
 * computing, signing and publishing as for everybody. The same size gives the same figures. With files, some designs
 * have models in the storage, and jobs wait to read them.
 */
export async function seedDemo(db: Handle, size: DemoSize = demoSize, withFiles = false): Promise<void> {
  const world = drawWorld(worldSeed, size);
  const people = await seedPeople(db, await hash(demoPassword));
  const bench = await seedBench(db);
  const revisions = await seedDesigns(db, world.designs, people, bench.frames);
  if (withFiles) await seedFiles(db, world.designs, revisions, people, bench);
  const seasons = await seedSeasons(db, bench, size.seasons);
  const random = createRandom(benchSeed);
  const reviewer = actorOf(people, "secondlook", "operator");
  const host = actorOf(people, "alderkeeper", "host");
  const qualified = new Set<string>();
  for (const round of world.rounds) {
    const season = seasons[round.season - 1];
    if (!season) throw new Error(`the demo has no season ${round.season}`);
    const isLast = world.rounds.findLast((each) => each.season === round.season) === round;
    const nextUnitId = seasons[round.season]?.baselineUnitId;
    const bridgeUnitId = isLast && nextUnitId !== season.baselineUnitId ? nextUnitId : undefined;
    const operatorId = people.get("benchwright") ?? "";
    const ran = `${season.baselineUnitId} ${season.benchIndex}`;
    if (!qualified.has(ran)) await qualifyDemoBench(db, { bench, season, operatorId, host, second: reviewer });
    qualified.add(ran);
    const where = { season: round.season, round: round.number };
    const shiftOf = (session: number) => shiftAt({ ...where, session });
    const made = await seedRound(db, random, bench, { people, revisions }, season, round, { bridgeUnitId, shiftOf });
    for (const [i, sessionId] of made.sessionIds.entries()) {
      await computeSession(db, sessionId);
      const at = { ...where, session: i + 1 };
      await chartDemoSession(db, { sessionId, where: at, host, second: reviewer });
    }
    if (round.ends !== "published") continue;
    await signAndPublish(db, made, reviewer, host);
    // The day after: the standings of the hour itself were drawn without it.
    const at = new Date(made.measuredAt.getTime() + (publishedAfterDays + 1) * day);
    const lastSession = made.sessionIds.at(-1);
    if (bridgeUnitId && lastSession) {
      await bridgeSession(db, { sessionId: lastSession, toUnitId: bridgeUnitId, at });
    }
  }
}

async function signAndPublish(db: Handle, { roundId, measuredAt }: DemoRoundIds, reviewer: Person, host: Person) {
  const signedAt = new Date(measuredAt.getTime() + 8 * day);
  const publishedAt = new Date(measuredAt.getTime() + publishedAfterDays * day);
  await signRound({ actor: reviewer, requestId: null }, { roundId, remark: "", at: signedAt }, db);
  await db.transaction(async (tx) => {
    await setPublishAt(tx, { roundId, publishAt: publishedAt });
    await moveRound(tx, { roundId, from: "signed", to: "scheduled", byPerson: host.personId, at: signedAt });
    await publishRound(tx, { actor: host, requestId: null }, { roundId, at: publishedAt, draws: demoDraws });
  });
}

function actorOf(people: Map<string, string>, handle: string, role: Person["role"]): Person {
  const personId = people.get(handle);
  if (!personId) throw new Error(`nobody called ${handle} in the demo`);
  return { personId, handle, role };
}
