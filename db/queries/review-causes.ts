import type { Handle } from "../client/connect";

/**
 * The review that lets a reading of a closed session be superseded: the newest one that sent back an entry of this
 * session which is on the bench since; for a run of an entry only that entry's own.
 */
export async function latestSendBack(
  db: Handle,
  { sessionId, runId }: { sessionId: string; runId: string | null },
): Promise<{ reviewId: string; entryId: string } | undefined> {
  const { rows }: { rows: { reviewId: string; entryId: string }[] } = await db.raw(
    `select v.id as "reviewId", e.id as "entryId"
     from review v join review_entry x on x.review_id = v.id join entry e on e.id = x.entry_id
     where v.verdict = 'sent_back' and e.state = 'on_the_bench'
       and exists (select 1 from run u where u.session_id = :sessionId and u.entry_id = e.id)
       and (:runId::uuid is null or exists (
         select 1 from run u where u.id = :runId::uuid and (u.entry_id is null or u.entry_id = e.id)))
     order by v.at desc, v.id desc limit 1`,
    { sessionId, runId },
  );
  return rows[0];
}
