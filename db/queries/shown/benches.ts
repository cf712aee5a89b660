import type { Handle } from "../../client/connect";

/** The microphone's distance from the inlet-side mounting flange, mm, by bench version; unknown ones are left out. */
export async function shownDistances(
  db: Handle,
  { benchVersionIds }: { benchVersionIds: readonly string[] },
): Promise<Map<string, number>> {
  const rows = await db("shown.bench_version")
    .whereIn("id", [...benchVersionIds])
    .select<{ id: string; microphone_distance_mm: number }[]>("id", "microphone_distance_mm");
  return new Map(rows.map((row) => [row.id, row.microphone_distance_mm]));
}
