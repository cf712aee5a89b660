import { publicDb } from "@/db/client/handles";
import { shownFrames, shownKeepOuts, shownSeasonLimits, type ShownKeepOut } from "@/db/queries/shown/fit";
import type { FitKeepOut, FitLimits } from "@/lib/contracts/fit-limits";

type Corner = [number, number, number];
const corner = (values: number[] | null): Corner | undefined => {
  const [x, y, z] = values ?? [];
  return x === undefined || y === undefined || z === undefined ? undefined : [x, y, z];
};

function box({ name, minMm, maxMm }: ShownKeepOut): FitKeepOut[] {
  const [min, max] = [corner(minMm), corner(maxMm)];
  return min && max ? [{ name, minMm: min, maxMm: max }] : [];
}

/** Frames, seasons and keep-out solids that a model can be compared with; the newest season first. */
export async function readFitLimits(): Promise<FitLimits> {
  const db = publicDb();
  const [frames, seasons] = await Promise.all([shownFrames(db), shownSeasonLimits(db)]);
  const benchVersionIds = [...new Set(seasons.flatMap((season) => season.benchVersionId ?? []))];
  const keepOuts = await shownKeepOuts(db, { benchVersionIds });
  return {
    frames: frames.map(({ id: _id, ...frame }) => frame),
    seasons: seasons.map(({ benchVersionId, benchName, benchNumber, ...season }) => {
      const around = keepOuts.filter((solid) => solid.benchVersionId === benchVersionId);
      return {
        ...season,
        benchName: benchName === null || benchNumber === null ? null : `${benchName}, version ${benchNumber}`,
        keepOuts: around.flatMap(box),
        meshKeepOuts: around
          .filter((solid) => solid.shape === "mesh")
          .map(({ id, name }) => ({ name, address: `/api/v1/seasons/${season.slug}/kit/keep-outs/${id}` })),
      };
    }),
  };
}
