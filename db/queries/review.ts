import type { Handle } from "../client/connect";

export interface SigningRow {
  lentToActor: boolean;
  tookReading: boolean;
  ownedInRound: boolean;
}

/** What the stored rows say of one person and one round; see the domain's rule on signing. */
export async function signingFacts(
  db: Handle,
  { roundId, personId }: { roundId: string; personId: string },
): Promise<SigningRow> {
  const { rows }: { rows: SigningRow[] } = await db.raw(
    `select
       exists (select 1 from review_loan where round_id = :roundId and person_id = :personId) as "lentToActor",
       exists (select 1 from reading d join session s on s.id = d.session_id
         where s.round_id = :roundId and d.taken_by = :personId) as "tookReading",
       exists (select 1 from round_entry re join entry e on e.id = re.entry_id join revision r on r.id = e.revision_id
         join design_owner o on o.design_id = r.design_id
         where re.round_id = :roundId and o.person_id = :personId
           and (o.until_at is null or o.until_at >= re.added_at)) as "ownedInRound"`,
    { roundId, personId },
  );
  return rows[0] ?? { lentToActor: false, tookReading: true, ownedInRound: true };
}

export interface SignedReview {
  id: string;
  signedSha256: string;
  reviewerId: string;
  at: Date;
}

/** The newest signature of a round, if the newest review is one. */
export async function standingSignature(
  db: Handle,
  { roundId }: { roundId: string },
): Promise<SignedReview | undefined> {
  const row = await db("review")
    .where({ round_id: roundId })
    .orderBy([
      { column: "at", order: "desc" },
      { column: "id", order: "desc" },
    ])
    .first<{ id: string; signed_sha256: string | null; reviewer_id: string; at: Date } | undefined>("*");
  if (!row || row.signed_sha256 === null) return undefined;
  return { id: row.id, signedSha256: row.signed_sha256, reviewerId: row.reviewer_id, at: row.at };
}

export async function insertReview(
  db: Handle,
  review: {
    roundId: string;
    reviewerId: string;
    verdict: "signed" | "sent_back";
    note: string;
    signedSha256: string | null;
    entries: readonly { entryId: string; reason: string }[];
    at: Date;
  },
): Promise<string> {
  const [made]: { id: string }[] = await db("review")
    .insert({
      round_id: review.roundId,
      reviewer_id: review.reviewerId,
      verdict: review.verdict,
      note: review.note,
      signed_sha256: review.signedSha256,
      at: review.at,
    })
    .returning("id");
  if (!made) throw new Error("no review came back");
  if (review.entries.length > 0) {
    await db("review_entry").insert(
      review.entries.map(({ entryId, reason }) => ({ review_id: made.id, entry_id: entryId, reason })),
    );
  }
  return made.id;
}

/** Holds of a round's sessions that nobody has lifted. */
export async function openHolds(
  db: Handle,
  { roundId }: { roundId: string },
): Promise<{ id: string; sessionId: string; reason: string }[]> {
  return db("session_hold as h")
    .join("session as s", "s.id", "h.session_id")
    .where("s.round_id", roundId)
    .whereNull("h.lifted_at")
    .select("h.id", "h.session_id as sessionId", "h.reason");
}

/** Sessions of a round that are still open at the bench. */
export async function openSessions(db: Handle, { roundId }: { roundId: string }): Promise<string[]> {
  const rows = await db("session").where({ round_id: roundId }).whereNull("ended_at").select<{ id: string }[]>("id");
  return rows.map((row) => row.id);
}
