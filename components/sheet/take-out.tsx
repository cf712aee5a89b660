import { Section } from "@/components/ui/sheet";
import { buttonClass } from "@/components/ui/button-class";
import type { Sheet } from "@/lib/contracts/sheet";
import { formatDate } from "@/lib/format/dates";
import { listWords } from "@/lib/format/words";
import { PrintButton } from "./print-button";
import { sheetNumber } from "./sheet-words";

/** A citation that names the very figures: number, revision, publication, method and the hash of what was frozen. */
export function citation(sheet: Sheet): string {
  const by = listWords(sheet.designers.length > 0 ? sheet.designers : ["former member"]);
  return (
    `${by}: ${sheet.name}, revision ${sheet.letter}. ${sheetNumber(sheet.number)}, ${sheet.season.title}, round ` +
    `${sheet.round}, ${sheet.bench.name} version ${sheet.bench.version}. Published ${formatDate(sheet.publishedAt)}, ` +
    `publication ${sheet.publication.number}, method ${sheet.methodVersion}. SHA-256 ${sheet.publication.sha256}.`
  );
}

/** Cite, print, and the same figures for programs and spreadsheets. */
export function TakeOut({ sheet }: { sheet: Sheet }) {
  const api = `/api/v1/sheets/${sheet.slug}`;
  const query = `?entry=${sheet.entryId}`;
  return (
    <Section id="take-out" title="Cite it, take it with you">
      <p className="docket max-w-3xl break-words">{citation(sheet)}</p>
      <div className="mt-4 flex flex-wrap gap-3">
        <PrintButton />
        <a className={buttonClass()} href={`${api}${query}`}>
          Sheet as JSON
        </a>
        <a className={buttonClass()} href={`${api}/readings${query}`}>
          Readings as JSON
        </a>
        <a className={buttonClass()} href={`${api}/readings.csv${query}`} download>
          Readings as CSV
        </a>
      </div>
    </Section>
  );
}
