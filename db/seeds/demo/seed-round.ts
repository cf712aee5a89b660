import type { Knex } from "knex";
import { v7 as uuidv7 } from "uuid";
import type { Random } from "@/lib/science/statistics/random";
import type { DemoBench } from "./seed-bench";
import type { DemoSeason } from "./seed-seasons";
import { seedSession, type DemoSession, type DemoSubject } from "./seed-session";
import type { DemoRevision, DemoRound } from "./world";

export interface DemoRoundIds {
  roundId: string;
  entryIds: string[];
  sessionIds: string[];
  measuredAt: Date;
}

export interface DemoCast {
  people: Map<string, string>;
  revisions: Map<DemoRevision, string>;
}

const day = 86_400_000;
const entriesPerSession = 5;

function id(map: Map<string, string>, key: string): string {
  const found = map.get(key);
  if (!found) throw new Error(`nobody called ${key} in the demo`);
  return found;
}

type Step = [from: string, to: string, right: string, by: string];

/** The moves that bring an entry to the bench, each by somebody who may make it. */
async function moveEntries(db: Knex, entries: readonly { id: string; owner: string }[], steps: Step[], from: Date) {
  for (const [i, [from_state, to_state, by_right, by]] of steps.entries()) {
    const at = new Date(from.getTime() + i * day);
    await db.batchInsert(
      "entry_move",
      entries.map((entry) => ({
        entry_id: entry.id,
        from_state,
        to_state,
        by_right,
        by_person: by === "owner" ? entry.owner : by,
        at,
      })),
      200,
    );
  }
}

/**
 * Brings a round as far as its measurements go: entries sent in, accepted, printed, spun up, measured in sessions of
 * five, and put to review; the last session also runs `bridgeUnitId` where one is given, and `shiftOf` says what had
 * changed at the bench by a session, counted from 1. In a round that is being measured the last session stays open and
 * its entries on the bench.
 */
export async function seedRound(
  db: Knex,
  random: Random,
  bench: DemoBench,
  cast: DemoCast,
  season: DemoSeason,
  round: DemoRound,
  { bridgeUnitId, shiftOf }: { bridgeUnitId?: string; shiftOf?: (session: number) => DemoSession["shift"] } = {},
): Promise<DemoRoundIds> {
  const host = id(cast.people, "alderkeeper");
  const operator = id(cast.people, "benchwright");
  const startsAt = new Date(season.opensAt.getTime() + (4 + (round.number - 1) * 24) * day);
  const measuredAt = new Date(startsAt.getTime() + 8 * day);
  const roundId = uuidv7();
  await db("round").insert({ id: roundId, season_id: season.id, number: round.number, title: `Round ${round.number}` });
  const entries = round.entries.map(({ design, revision }) => ({
    id: uuidv7(),
    owner: id(cast.people, design.owner),
    revision_id: cast.revisions.get(revision) ?? "",
    specimenId: uuidv7(),
    demo: revision,
  }));
  await db.batchInsert(
    "entry",
    entries.map(({ id: entryId, revision_id }) => ({
      id: entryId,
      revision_id,
      season_id: season.id,
      created_at: startsAt,
    })),
    200,
  );
  await db("round_entry").insert(
    entries.map((entry) => ({ round_id: roundId, entry_id: entry.id, added_at: startsAt })),
  );
  const toBench: Step[] = [
    ["draft", "sent_in", "designer", "owner"],
    ["sent_in", "accepted", "host", host],
    ["accepted", "printing", "operator", operator],
  ];
  await moveEntries(db, entries, toBench, startsAt);
  await db("specimen").insert(
    entries.map(({ specimenId, revision_id, demo }) => ({
      id: specimenId,
      revision_id,
      number: round.season,
      material: demo.material,
      colour: "natural",
      layer_height_mm: 0.16,
      nozzle_mm: 0.4,
      infill_percent: 40,
      walls: 4,
      layers_across_axis: true,
      print_time_min: demo.printTimeMin,
      printed_at: new Date(startsAt.getTime() + 3 * day),
      printed_by: operator,
    })),
  );
  await db("specimen_part").insert(
    entries.flatMap(({ specimenId, demo }) =>
      demo.fan.rotors.map((rotor, i) => ({
        specimen_id: specimenId,
        rotor_position: i + 1,
        mass_g: rotor.massG,
        balance_record: "rests anywhere on the knife edge",
        spin_up_speed_rpm: 2160,
        spin_up_record: "60 s at 2 160 rpm behind the guard, in three steps, no rise in vibration",
        spun_up_by: operator,
        spun_up_at: new Date(startsAt.getTime() + 4 * day),
        state: "passed",
      })),
    ),
  );
  await moveEntries(
    db,
    entries,
    [["printing", "on_the_bench", "operator", operator]],
    new Date(startsAt.getTime() + 5 * day),
  );
  const move = (from_state: string, to_state: string, at: Date) =>
    db("round_move").insert({ round_id: roundId, from_state, to_state, by_person: operator, at });
  await move("planned", "measuring", measuredAt);
  const sessionIds: string[] = [];
  const done: typeof entries = [];
  for (let from = 0; from < entries.length; from += entriesPerSession) {
    const here = entries.slice(from, from + entriesPerSession);
    const last = from + entriesPerSession >= entries.length;
    const closed = !(round.ends === "measuring" && last);
    const subjects: DemoSubject[] = here.map((entry) => ({
      fan: entry.demo.fan,
      entryId: entry.id,
      specimenId: entry.specimenId,
    }));
    const beganAt = new Date(measuredAt.getTime() + (from / entriesPerSession) * day);
    sessionIds.push(
      await seedSession(db, random, bench, {
        season,
        roundId,
        operatorId: operator,
        beganAt,
        subjects,
        closed,
        shift: shiftOf?.(1 + from / entriesPerSession),
        bridgeUnitId: last ? bridgeUnitId : undefined,
      }),
    );
    if (closed) done.push(...here);
  }
  const reviewAt = new Date(measuredAt.getTime() + 6 * day);
  if (done.length > 0) await moveEntries(db, done, [["on_the_bench", "in_review", "operator", operator]], reviewAt);
  if (round.ends !== "measuring") await move("measuring", "in_review", reviewAt);
  return { roundId, entryIds: entries.map((entry) => entry.id), sessionIds, measuredAt };
}
