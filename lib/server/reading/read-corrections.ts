import { publicDb } from "@/db/client/handles";
import { shownLedgerCorrections, shownLedgerQuestions, type LedgerCorrectionRow } from "@/db/queries/shown/ledger";
import type { Correction, Ledger } from "@/lib/contracts/corrections";
import { groupBy } from "@/lib/domain/group-by";

function correctionOf(rows: readonly LedgerCorrectionRow[]): Correction[] {
  const [first] = rows;
  if (!first) return [];
  return [
    {
      number: first.number,
      what: first.what,
      why: first.why,
      publishedAt: first.publishedAt.toISOString(),
      entries: rows.flatMap(({ entryId, slug, name, letter }) =>
        entryId === null ? [] : [{ entryId, slug, name, letter }],
      ),
    },
  ];
}

/** The ledger: corrections published and questions answered, the newest first; both empty where there are none. */
export async function readCorrections(): Promise<Ledger> {
  const db = publicDb();
  const [corrections, questions] = await Promise.all([shownLedgerCorrections(db), shownLedgerQuestions(db)]);
  return {
    corrections: [...groupBy(corrections, (row) => String(row.number)).values()].flatMap(correctionOf),
    questions: questions.map(({ entryId, slug, name, letter, answeredAt, ...question }) => ({
      ...question,
      answeredAt: answeredAt.toISOString(),
      entry: { entryId, slug, name, letter },
    })),
  };
}
