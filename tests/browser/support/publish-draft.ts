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
/** Beyond the demo's rounds; a season has each number once. */
const ROUND = 90;

/**
 * Sends a draft in to the demo's newest season, has it measured with figures of the toy model, signed and published, as
 * the demo's own rounds are: what a host, operators and a reviewer do in weeks.
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
    const season = await owner("season").where({ slug: "season-4" }).first();
    const [inUse] = await owner("season_bench").where({ season_id: season.id });
    const version = await owner("bench_version").where({ id: inUse.bench_version_id }).first();
    const unit = await owner("season_baseline").where({ season_id: season.id }).first();
    const bench = {
      benchId: String(version.bench_id),
      versions: [
        {
          id: String(version.id),
          budgetId: String(inUse.budget_version_id),
          positions: await owner("microphone_position").where({ bench_version_id: version.id }).select("id", "name"),
        },
      ],
      frames: new Map<string, string>(),
      protocolVersionIds: [],
      equalNoiseRuleId: String(season.scoring_rule_version_id),
      baselineUnitIds: [String(unit.baseline_unit_id)],
    };
    // Figures of a fan of the toy's; the traits on the sheet are the draft's.
    const [design] = drawWorld(5, { seasons: 1, roundsPerSeason: 3, entriesPerRound: 1 }).designs;
    const revision = design?.revisions[0];
    if (!design || !revision) throw new Error("the toy world is empty");
    const startsDaysIn = 4 + (ROUND - 1) * 24;
    const made = await seedRound(
      owner,
      createRandom(90),
      bench,
      { people, revisions: new Map([[revision, String(found.revisionId)]]) },
      {
        id: String(season.id),
        number: season.number,
        benchIndex: 0,
        baselineUnitId: String(unit.baseline_unit_id),
        protocolVersionId: String(season.protocol_version_id),
        opensAt: new Date(Date.now() - (startsDaysIn + 30) * day),
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
