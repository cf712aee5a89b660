import type { Knex } from "knex";
import { seedBench, type DemoBench } from "@/db/seeds/demo/seed-bench";
import type { Person } from "@/lib/domain/accounts/actor";
import { makePerson } from "./people";

/** A bench with a round to be measured: two entries, accepted; 1100 and 1450 rpm, two mounts, one position. */
export interface BenchRoom {
  bench: DemoBench;
  operator: Person;
  second: Person;
  host: Person;
  designer: Person;
  roundId: string;
  seasonId: string;
  benchVersionId: string;
  baselineUnitId: string;
  positionId: string;
  entries: { entryId: string; revisionId: string; name: string; rotors: number }[];
}

export const speedsRpm = [1100, 1450] as const;

const one = async (db: Knex, table: string, row: Record<string, unknown>): Promise<string> => {
  const [made]: { id: string }[] = await db(table).insert(row).returning("id");
  if (!made) throw new Error(`no row of ${table} came back`);
  return made.id;
};

/** Lays it out as the schema's owner. */
export async function benchRoom(db: Knex): Promise<BenchRoom> {
  const [operator, second, host, designer] = [
    await makePerson(db, "hands", "operator"),
    await makePerson(db, "other", "operator"),
    await makePerson(db, "keeper", "host"),
    await makePerson(db, "maker"),
  ];
  const bench = await seedBench(db);
  const version = bench.versions[0];
  const baselineUnitId = bench.baselineUnitIds[1];
  if (!version || !baselineUnitId) throw new Error("the bench is incomplete");
  const protocolId = await one(db, "protocol", { slug: "short", name: "Short" });
  const protocolVersionId = await one(db, "protocol_version", {
    protocol_id: protocolId,
    number: 1,
    heat_load_w: 150,
    set_speeds: speedsRpm,
    positions: ["on axis"],
    mounts: 2,
  });
  const seasonId = await one(db, "season", {
    number: 9,
    slug: "season-9",
    title: "Season 9",
    protocol_version_id: protocolVersionId,
    scoring_rule_version_id: bench.equalNoiseRuleId,
    levels_dba: [46],
    headline_dba: 46,
    opened_at: new Date("2026-01-05T09:00:00Z"),
  });
  await db("season_bench").insert({
    season_id: seasonId,
    bench_version_id: version.id,
    budget_version_id: version.budgetId,
  });
  await db("season_baseline").insert({ season_id: seasonId, baseline_unit_id: baselineUnitId });
  const roundId = await one(db, "round", { season_id: seasonId, number: 1 });
  const entries = [];
  for (const [name, rotors] of [
    ["Heronwing", 1],
    ["Slow Mill", 2],
  ] as const) {
    const slug = name.toLowerCase().replace(" ", "-");
    const design_id = await one(db, "design", { slug, name, created_by: designer.personId });
    await db("design_owner").insert({ design_id, person_id: designer.personId });
    const revisionId = await one(db, "revision", { design_id, letter: "A", licence: "CC0-1.0" });
    await db("revision_trait").insert({
      revision_id: revisionId,
      stages: rotors,
      frame_id: bench.frames.get("120x25"),
      material: "PETG",
    });
    const entryId = await one(db, "entry", { revision_id: revisionId, season_id: seasonId });
    const move = (from_state: string, to_state: string, by_right: string, by: Person) =>
      db("entry_move").insert({ entry_id: entryId, from_state, to_state, by_right, by_person: by.personId });
    await move("draft", "sent_in", "designer", designer);
    await move("sent_in", "accepted", "host", host);
    await db("round_entry").insert({ round_id: roundId, entry_id: entryId });
    entries.push({ entryId, revisionId, name, rotors });
  }
  const positionId = version.positions[0]?.id ?? "";
  const people = { operator, second, host, designer };
  return { bench, ...people, roundId, seasonId, benchVersionId: version.id, baselineUnitId, positionId, entries };
}
