import type { RoundState } from "@/lib/domain/seasons/round-moves";
import type { Handle } from "../client/connect";

/** Rounds that are scheduled and whose hour has come, the earliest first. */
export async function dueRounds(db: Handle, { now }: { now: Date }): Promise<string[]> {
  const rows = await db("round")
    .where({ state: "scheduled" })
    .where("publish_at", "<=", now)
    .orderBy(["publish_at", "id"])
    .select<{ id: string }[]>("id");
  return rows.map((row) => row.id);
}

export async function setPublishAt(
  db: Handle,
  { roundId, publishAt }: { roundId: string; publishAt: Date | null },
): Promise<void> {
  await db("round").where({ id: roundId }).update({ publish_at: publishAt });
}

/** Holds a round's row until the transaction ends. @returns its state; undefined when there is none */
export async function lockRound(db: Handle, { roundId }: { roundId: string }): Promise<RoundState | undefined> {
  const row = await db("round").where({ id: roundId }).forUpdate().first<{ state: RoundState } | undefined>("state");
  return row?.state;
}
