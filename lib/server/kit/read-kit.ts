import { publicDb } from "@/db/client/handles";
import { shownFrames, shownKeepOuts, shownSeasonLimits } from "@/db/queries/shown/fit";
import { kitSchema, type Kit, type KitFrame, type KitSolid } from "@/lib/contracts/kit";
import { ExpectedError } from "@/lib/domain/expected-error";
import { FRAME_PRESET_NOTE } from "@/lib/science/geometry/frames";

/** Said beside every frame. */
export const framePresetNote = FRAME_PRESET_NOTE;

/**
 * What a model must fit in a season that has opened, from the rows that the fit page compares with: no second copy.
 * @throws ExpectedError not_found before it opens as after a mistake
 */
export async function readKit({ slug }: { slug: string }): Promise<Kit> {
  const db = publicDb();
  const [frames, seasons] = await Promise.all([shownFrames(db), shownSeasonLimits(db)]);
  const season = seasons.find((each) => each.slug === slug);
  if (!season) throw new ExpectedError("not_found", "There is no open season at this address.");
  const { benchVersionId, benchName, benchNumber } = season;
  const solids = benchVersionId === null ? [] : await shownKeepOuts(db, { benchVersionIds: [benchVersionId] });
  return kitSchema.parse({
    season: { slug: season.slug, title: season.title },
    bench: benchName === null || benchNumber === null ? null : { name: benchName, version: benchNumber },
    totalDepthMaxMm: season.totalDepthMaxMm,
    inletStackMaxMm: season.inletStackMaxMm,
    frames: frames.filter((frame) => season.frameKeys.includes(frame.key)).map(({ id: _id, ...frame }) => frame),
    solids: solids.map(({ benchVersionId: _of, ...solid }) => solid),
  });
}

/** One frame of a season's kit. @throws ExpectedError not_found for one that the season doesn't allow */
export async function kitFrameOf(asked: { slug: string; frame: string }): Promise<{ kit: Kit; frame: KitFrame }> {
  const kit = await readKit(asked);
  const frame = kit.frames.find((each) => each.key === asked.frame);
  if (!frame) throw new ExpectedError("not_found", "This season has no such frame.");
  return { kit, frame };
}

/** One solid of a season's kit. @throws ExpectedError not_found for one that isn't around its bench's cooler */
export async function kitSolidOf(asked: { slug: string; id: string }): Promise<{ kit: Kit; solid: KitSolid }> {
  const kit = await readKit(asked);
  const solid = kit.solids.find((each) => each.id === asked.id);
  if (!solid) throw new ExpectedError("not_found", "This season's kit has no such solid.");
  return { kit, solid };
}
