import { appDb } from "@/db/client/handles";
import { publishedSnapshots } from "@/db/queries/host-seasons";
import { snapshotSchema, type SnapshotPoint } from "@/lib/contracts/publication";
import type { LevelsTrial } from "@/lib/contracts/seasons-admin";
import type { Actor } from "@/lib/domain/accounts/actor";
import { levelsReached, type ReachPoint } from "@/lib/domain/scoring/levels-reached";
import { demand } from "../permission";

const pointSchema = snapshotSchema.pick({ points: true, baselinePoints: true }).loose();

/** How many of the entries that are public now a choice of levels would leave unranked, before a season opens by it. */
export async function tryLevels(actor: Actor, { levels }: { levels: readonly number[] }): Promise<LevelsTrial> {
  demand(actor, "season.manage");
  const rows = await publishedSnapshots(appDb());
  const reach = rows.map(({ snapshot }) => {
    const { points, baselinePoints } = pointSchema.parse(snapshot);
    return levelsReached(points.map(reachPoint), baselinePoints.map(reachPoint), levels);
  });
  const count = (i: number, what: string) => reach.filter((each) => each[i] === what).length;
  return {
    entries: rows.length,
    unranked: reach.filter((each) => each.some((one) => one !== "reached")).length,
    byLevel: levels.map((levelDba, i) => ({
      levelDba,
      entryNotReached: count(i, "entry-not-reached"),
      baselineNotReached: count(i, "baseline-not-reached"),
    })),
  };
}

function reachPoint(point: SnapshotPoint): ReachPoint {
  return {
    setSpeedRpm: point.setSpeed,
    levelDba: point.level.value,
    correctionDb: point.level.correctionDb,
    upperBound: point.level.upperBound,
    deltaTK: point.deltaT.value,
    powerW: point.powerW,
  };
}
