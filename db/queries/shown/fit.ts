import type { Handle } from "../../client/connect";

export interface ShownFrame {
  id: string;
  key: string;
  sizeMm: number;
  depthMm: number;
  boreMm: number;
  holeSpacingMm: number;
  holeMm: number;
  toleranceMm: number;
}

/** Every frame preset, the smallest first. */
export async function shownFrames(db: Handle): Promise<ShownFrame[]> {
  return db("shown.frame").orderBy(["outer_mm", "depth_mm", "key"]).select({
    id: "id",
    key: "key",
    sizeMm: "outer_mm",
    depthMm: "depth_mm",
    boreMm: "bore_mm",
    holeSpacingMm: "hole_spacing_mm",
    holeMm: "hole_diameter_mm",
    toleranceMm: "tolerance_mm",
  });
}

export interface ShownSeasonLimits {
  slug: string;
  title: string;
  totalDepthMaxMm: number | null;
  inletStackMaxMm: number | null;
  frameKeys: string[];
  benchVersionId: string | null;
  benchName: string | null;
  benchNumber: number | null;
}

/** What each season that has opened allows, with the bench version that it uses at the latest; the newest first. */
export async function shownSeasonLimits(db: Handle): Promise<ShownSeasonLimits[]> {
  const { rows }: { rows: ShownSeasonLimits[] } = await db.raw(
    `select s.slug, s.title, s.total_depth_max_mm as "totalDepthMaxMm", s.inlet_stack_max_mm as "inletStackMaxMm",
       array(select f.key from shown.season_frame f where f.season_id = s.id order by f.outer_mm, f.depth_mm) as "frameKeys",
       b.bench_version_id as "benchVersionId", v.bench_name as "benchName", v.number as "benchNumber"
     from shown.season s
     left join lateral (
       select bench_version_id from shown.season_bench sb where sb.season_id = s.id order by sb.from_at desc limit 1
     ) b on true
     left join shown.bench_version v on v.id = b.bench_version_id
     order by s.number desc`,
  );
  return rows;
}

export interface ShownKeepOut {
  id: string;
  benchVersionId: string;
  name: string;
  shape: "box" | "mesh";
  minMm: number[] | null;
  maxMm: number[] | null;
  note: string;
}

/** Keep-out solids of bench versions in cooler coordinates, mm; a mesh has no corners. */
export async function shownKeepOuts(
  db: Handle,
  { benchVersionIds }: { benchVersionIds: readonly string[] },
): Promise<ShownKeepOut[]> {
  return db("shown.keep_out")
    .whereIn("bench_version_id", [...benchVersionIds])
    .orderBy("name")
    .select({
      id: "id",
      benchVersionId: "bench_version_id",
      name: "name",
      shape: "shape",
      minMm: "min_mm",
      maxMm: "max_mm",
      note: "note",
    });
}

/** Where the model file of a keep-out mesh is kept; undefined for a box, and for a file that was taken down. */
export async function shownKeepOutFile(
  db: Handle,
  { keepOutId }: { keepOutId: string },
): Promise<{ storageKey: string; bytes: number } | undefined> {
  return db("shown.keep_out_file")
    .where({ keep_out_id: keepOutId })
    .first({ storageKey: "storage_key", bytes: "bytes" });
}
