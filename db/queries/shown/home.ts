import type { Handle } from "../../client/connect";

/** How many designs, entries and seasons are public. */
export async function shownCounts(db: Handle): Promise<{ designs: number; entries: number; seasons: number }> {
  const row = await db("shown.total")
    .select("designs", "entries", "seasons")
    .first<{ designs: number; entries: number; seasons: number } | undefined>();
  return row ?? { designs: 0, entries: 0, seasons: 0 };
}

export interface LatestCorrection {
  number: number;
  what: string;
  publishedAt: Date;
}

/** Published corrections, the newest first. */
export async function latestCorrections(db: Handle, { limit }: { limit: number }): Promise<LatestCorrection[]> {
  return db("shown.correction")
    .orderBy("number", "desc")
    .limit(limit)
    .select({ number: "number", what: "what", publishedAt: "published_at" });
}
