import Link from "next/link";
import { Section } from "@/components/ui/sheet";
import { EmptyState } from "@/components/ui/states";
import type { Ledger, LedgerEntry } from "@/lib/contracts/corrections";
import { formatDate } from "@/lib/format/dates";

function EntryLink({ entry }: { entry: LedgerEntry }) {
  const words = entry.name ? `${entry.name} ${entry.letter ?? ""}` : "an entry withdrawn since";
  return entry.slug ? <Link href={`/designs/${entry.slug}?entry=${entry.entryId}`}>{words}</Link> : <>{words}</>;
}

/** What was corrected, why, and which sheets it touched; and questions with their answers. */
export function LedgerView({ ledger }: { ledger: Ledger }) {
  const { corrections, questions } = ledger;
  return (
    <>
      <Section id="made" title="Corrections made">
        {corrections.length === 0 ? (
          <EmptyState title="None so far">
            No published figure has been corrected. That is not proof that all are right: raw readings stand behind
            every figure on its sheet, for whoever wants to check.
          </EmptyState>
        ) : (
          <ul className="grid gap-5">
            {corrections.map((each) => (
              <li key={each.number} id={`correction-${each.number}`}>
                <h3 className="text-ribbon">
                  Correction {each.number}, {formatDate(each.publishedAt)}
                </h3>
                <p>
                  {each.what} {each.why}
                </p>
                {each.entries.length > 0 ? (
                  <p className="small-print">
                    Moved:{" "}
                    {each.entries.map((entry, index) => (
                      <span key={entry.entryId}>
                        {index > 0 ? ", " : ""}
                        <EntryLink entry={entry} />
                      </span>
                    ))}
                  </p>
                ) : null}
              </li>
            ))}
          </ul>
        )}
      </Section>
      <Section id="answered" title="Questions answered">
        {questions.length === 0 ? (
          <EmptyState title="None so far">
            Nobody’s question about a figure has been answered in public yet. One that is stands here with its answer.
          </EmptyState>
        ) : (
          <ul className="grid gap-5">
            {questions.map((each) => (
              <li
                key={`${each.entry.entryId} ${each.answeredAt}`}
                id={`question-${each.entry.entryId}-${Date.parse(each.answeredAt)}`}
              >
                <h3>
                  {each.figure} of <EntryLink entry={each.entry} />
                </h3>
                <p>
                  {each.byHandle} asked: {each.body}
                </p>
                <p>
                  Answered {formatDate(each.answeredAt)}: {each.answer}
                </p>
              </li>
            ))}
          </ul>
        )}
      </Section>
    </>
  );
}
