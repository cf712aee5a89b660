import { randomInt } from "node:crypto";
import type { Knex } from "knex";
import { inject } from "vitest";
import { connect } from "@/db/client/connect";
import { closeDbs } from "@/db/client/handles";
import { moveRound } from "@/db/queries/moves";
import { setPublishAt } from "@/db/queries/schedule";
import { seedRound } from "@/db/seeds/demo/seed-round";
import { drawWorld } from "@/db/seeds/demo/world";
import { adoptEnvironment } from "@/lib/env/env";
import { createRandom } from "@/lib/science/statistics/random";
import { publishRound } from "@/lib/server/publishing/publish-round";
import { computeSession } from "@/lib/server/results/compute-session";
import { signRound } from "@/lib/server/review/sign-round";

const day = 86_400_000;
const ROUND = 1;

type Row = Record<string, unknown>;

/** Copies rows with some columns changed, and gives the new ids, first to last. */
async function copied(owner: Knex, table: string, rows: readonly Row[], change: Row): Promise<string[]> {
  const made: { id: string }[] = [];
  for (const { id: _id, ...row } of rows) {
    const [one] = await owner(table)
      .insert({ ...row, ...change })
      .returning("id");
    made.push(one);
  }
  return made.map(({ id }) => String(id));
}

/** A bench and a season as the demo's newest, but of its own: on the demo's bench a session is open. */
async function stageBench(owner: Knex) {
  const number = 20_000 + randomInt(70_000);
  const [demo] = await owner("season").where({ slug: "season-4" });
  const [inUse] = await owner("season_bench").where({ season_id: demo.id });
  const unit = await owner("season_baseline").where({ season_id: demo.id }).first();
  const [version] = await owner("bench_version").where({ id: inUse.bench_version_id });
  const benches = await owner("bench").where({ id: version.bench_id });
  const [benchId = ""] = await copied(owner, "bench", benches, { slug: `bench-${number}`, name: `Bench ${number}` });
  const [versionId = ""] = await copied(owner, "bench_version", [version], { bench_id: benchId });
  const places = await owner("microphone_position").where({ bench_version_id: version.id });
  await copied(owner, "microphone_position", places, { bench_version_id: versionId });
  const budgets = await owner("budget_version").where({ id: inUse.budget_version_id });
  const [budgetId = ""] = await copied(owner, "budget_version", budgets, {
    bench_version_id: versionId,
    frozen_at: null,
  });
  const parts = await owner("budget_part").where({ budget_version_id: inUse.budget_version_id });
  await copied(owner, "budget_part", parts, { budget_version_id: budgetId });
  const [seasonId = ""] = await copied(owner, "season", [demo], {
    number,
    slug: `season-${number}`,
    title: `Season ${number}`,
    frozen_at: null,
  });
  const season_id = seasonId;
  await owner("season_bench").insert({ ...inUse, season_id, bench_version_id: versionId, budget_version_id: budgetId });
  await owner("season_baseline").insert({ ...unit, season_id });
  const frames = await owner("season_frame").where({ season_id: demo.id });
  await owner("season_frame").insert(frames.map((frame) => ({ ...frame, season_id })));
  const baselineUnitId = String(unit.baseline_unit_id);
  const positions = await owner("microphone_position").where({ bench_version_id: versionId }).select("id", "name");
  return {
    season: { ...demo, id: seasonId, number },
    baselineUnitId,
    bench: {
      benchId,
      versions: [{ id: versionId, budgetId, positions }],
      frames: new Map<string, string>(),
      protocolVersionIds: [],
      equalNoiseRuleId: String(demo.scoring_rule_version_id),
      baselineUnitIds: [baselineUnitId],
    },
  };
}

/**
 * Sends a draft in to a season of its own, has it measured with figures of the toy model, signed and published, as the
 * demo's rounds are: what a host, operators and a reviewer do in weeks.
 */
export async function publishDraft({ slug, letter }: { slug: string; letter: string }): Promise<void> {
  const { urls } = inject("server");
  adoptEnvironment({ DATABASE_URL: urls.app, PUBLIC_DATABASE_URL: urls.public, MIGRATE_DATABASE_URL: urls.owner });
  const owner = connect(urls.owner);
  try {
    const found = await owner("revision as r")
      .join("design as d", "d.id", "r.design_id")
      .join("design_owner as o", "o.design_id", "d.id")
      .join("person as p", "p.id", "o.person_id")
      .where({ "d.slug": slug, "r.letter": letter })
      .first({ revisionId: "r.id", handle: "p.handle" });
    const people = new Map<string, string>(
      (await owner("person").select("handle", "id")).map(({ handle, id }) => [String(handle), String(id)]),
    );
    const { season, bench, baselineUnitId } = await stageBench(owner);
    // Figures of a fan of the toy's; the traits on the sheet are the draft's.
    const [design] = drawWorld(5, { seasons: 1, roundsPerSeason: 3, entriesPerRound: 1 }).designs;
    const revision = design?.revisions[0];
    if (!design || !revision) throw new Error("the toy world is empty");
    // A month ago at midnight, so that all of it lies behind.
    const opensAt = new Date((Math.floor(Date.now() / day) - 34) * day);
    const made = await seedRound(
      owner,
      createRandom(90),
      bench,
      { people, revisions: new Map([[revision, String(found.revisionId)]]) },
      {
        id: String(season.id),
        number: season.number,
        benchIndex: 0,
        baselineUnitId,
        protocolVersionId: String(season.protocol_version_id),
        opensAt,
      },
      {
        season: 90,
        number: ROUND,
        entries: [{ design: { ...design, owner: found.handle }, revision }],
        ends: "in_review",
      },
    );
    for (const sessionId of made.sessionIds) await computeSession(owner, sessionId);
    const actor = (handle: string, role: "host" | "operator") => ({
      actor: { personId: people.get(handle) ?? "", handle, role },
      requestId: null,
    });
    const host = actor("alderkeeper", "host");
    const { roundId } = made;
    const at = new Date(Date.now() - day);
    await signRound(actor("secondlook", "operator"), { roundId, remark: "", at }, owner);
    await owner.transaction(async (tx) => {
      await setPublishAt(tx, { roundId, publishAt: at });
      await moveRound(tx, { roundId, from: "signed", to: "scheduled", byPerson: host.actor.personId, at });
      await publishRound(tx, host, { roundId, at, draws: 200 });
    });
  } finally {
    await owner.destroy();
    await closeDbs();
  }
}
