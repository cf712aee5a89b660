import { buttonClass } from "@/components/ui/button-class";
import { studyAddress, type StudyQuestion, type StudyTable } from "@/lib/contracts/study-question";

const words: Readonly<Record<StudyTable, string>> = {
  effects: "Effects as CSV",
  pairs: "Pairs as CSV",
  distribution: "Spread as CSV",
  entries: "The entries behind it as CSV",
};

/** The table of a section, as it stands, for a spreadsheet. */
export function DownloadLink({ question, table }: { question: StudyQuestion; table: StudyTable }) {
  const href = studyAddress(question, "/api/v1/traits/csv", [["table", table]]);
  return (
    <a className={buttonClass("outline", true, "screen-only")} href={href} download>
      {words[table]}
    </a>
  );
}
