import Link from "next/link";
import { Section } from "@/components/ui/sheet";
import type { Sheet } from "@/lib/contracts/sheet";
import { formatDate } from "@/lib/format/dates";

/** What was corrected, and questions that were answered, on any entry of this design. */
export function QuestionsSection({ sheet }: { sheet: Sheet }) {
  const { corrections, questions, history } = sheet;
  const entryName = (entryId: string): string => {
    const entry = history.find((each) => each.entryId === entryId);
    return entry ? `${entry.seasonTitle}, revision ${entry.letter}` : "an earlier entry";
  };
  return (
    <Section id="questions" title="Questions and corrections">
      {corrections.length === 0 && questions.length === 0 ? (
        <p>
          None so far on this design. Every correction stands in <Link href="/corrections">the ledger</Link> with what
          it moved.
        </p>
      ) : null}
      <ul className="grid gap-4">
        {corrections.map((each) => (
          <li key={`${each.number} ${each.entryId}`}>
            <p>
              <strong className="text-ribbon">
                Correction {each.number}, {formatDate(each.publishedAt)}.
              </strong>{" "}
              {each.what} {each.why} ({entryName(each.entryId)})
            </p>
          </li>
        ))}
        {questions.map((each) => (
          <li key={`${each.answeredAt} ${each.figure}`}>
            <p>
              <strong>
                {each.byHandle} on {each.figure}:
              </strong>{" "}
              {each.body}
            </p>
            <p className="mt-1">
              Answered {formatDate(each.answeredAt)}: {each.answer} ({entryName(each.entryId)})
            </p>
          </li>
        ))}
      </ul>
      {sheet.olderPublications.length > 0 ? (
        <p className="small-print mt-3">
          Earlier publications of this entry:{" "}
          {sheet.olderPublications.map((each) => `${each.number} of ${formatDate(each.publishedAt)}`).join(", ")}.
        </p>
      ) : null}
    </Section>
  );
}
