import type { Handle } from "../../client/connect";

export interface LedgerCorrectionRow {
  number: number;
  what: string;
  why: string;
  publishedAt: Date;
  entryId: string | null;
  slug: string | null;
  name: string | null;
  letter: string | null;
}

const ledgerMost = 200;

/** Published corrections, the newest first, a row for each entry that one touched. */
export async function shownLedgerCorrections(db: Handle): Promise<LedgerCorrectionRow[]> {
  return db
    .with(
      "newest",
      (query) => void query.from("shown.correction").orderBy("number", "desc").limit(ledgerMost).select("*"),
    )
    .from("newest as c")
    .leftJoin("shown.correction_publication as p", "p.correction_id", "c.id")
    .leftJoin("shown.entry as e", "e.entry_id", "p.entry_id")
    .orderBy([{ column: "c.number", order: "desc" }, "e.design_slug", "p.entry_id"])
    .select({
      number: "c.number",
      what: "c.what",
      why: "c.why",
      publishedAt: "c.published_at",
      entryId: "p.entry_id",
      slug: "e.design_slug",
      name: "e.design_name",
      letter: "e.revision_letter",
    });
}

export interface LedgerQuestionRow {
  entryId: string;
  slug: string;
  name: string;
  letter: string;
  figure: string;
  body: string;
  answer: string;
  answeredAt: Date;
  byHandle: string;
}

/** Answered questions on public entries, the newest first. */
export async function shownLedgerQuestions(db: Handle): Promise<LedgerQuestionRow[]> {
  return db("shown.question as q")
    .join("shown.entry as e", "e.entry_id", "q.entry_id")
    .orderBy([{ column: "q.answered_at", order: "desc" }, "q.id"])
    .limit(ledgerMost)
    .select({
      entryId: "q.entry_id",
      slug: "e.design_slug",
      name: "e.design_name",
      letter: "e.revision_letter",
      figure: "q.figure",
      body: "q.body",
      answer: "q.answer",
      answeredAt: "q.answered_at",
      byHandle: "q.by_handle",
    });
}
