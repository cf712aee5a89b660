import type { Handle } from "../../client/connect";

export interface SeasonBenchRow {
  name: string;
  version: number;
  cooler: string;
  heatSource: string;
  temperatureSensors: string;
  microphone: string;
  calibrator: string;
  microphoneDistanceMm: number;
  from: Date;
  reason: string;
}

/** Bench versions that count in an open season, in the order in which they came. */
export async function shownSeasonBenches(db: Handle, { seasonId }: { seasonId: string }): Promise<SeasonBenchRow[]> {
  return db("shown.season_bench as s")
    .join("shown.bench_version as v", "v.id", "s.bench_version_id")
    .where("s.season_id", seasonId)
    .orderBy("s.from_at")
    .select({
      name: "v.bench_name",
      version: "v.number",
      cooler: "v.cooler",
      heatSource: "v.heat_source",
      temperatureSensors: "v.temperature_sensors",
      microphone: "v.microphone",
      calibrator: "v.calibrator",
      microphoneDistanceMm: "v.microphone_distance_mm",
      from: "s.from_at",
      reason: db.raw("coalesce(nullif(s.reason, ''), v.change_reason)"),
    });
}

export interface SeasonBaselineRow {
  slug: string;
  name: string;
  serial: string;
  from: Date;
}

/** Baseline units that count in an open season; the first is the one its ratios are to. */
export async function shownSeasonBaselines(
  db: Handle,
  { seasonId }: { seasonId: string },
): Promise<SeasonBaselineRow[]> {
  return db("shown.season_baseline as s")
    .join("shown.baseline_unit as u", "u.id", "s.baseline_unit_id")
    .join("shown.baseline as b", "b.id", "u.baseline_id")
    .where("s.season_id", seasonId)
    .orderBy(["s.from_at", "u.serial"])
    .select({ slug: "b.slug", name: "b.name", serial: "u.serial", from: "s.from_at" });
}

export interface SeasonFrameRow {
  key: string;
  outerMm: number;
  boreMm: number;
  depthMm: number;
}

export async function shownSeasonFrames(db: Handle, { seasonId }: { seasonId: string }): Promise<SeasonFrameRow[]> {
  return db("shown.season_frame")
    .where({ season_id: seasonId })
    .orderBy("key")
    .select({ key: "key", outerMm: "outer_mm", boreMm: "bore_mm", depthMm: "depth_mm" });
}
