import { BarsTable } from "@/components/ui/bars/bars-table";
import { CautionList } from "@/components/ui/notice";
import { Section } from "@/components/ui/sheet";
import type { Sheet } from "@/lib/contracts/sheet";
import { formatBytes } from "@/lib/format/bytes";
import { formatDate } from "@/lib/format/dates";
import { licenceWords } from "./sheet-words";

const printCautions = [
  "A printed rotor can burst or shed a blade. Run it behind a guard, wear eye protection and stand out of its plane.",
  "Balance it, then raise the speed in steps, each held and listened to. Stop on vibration, rubbing or a new sound.",
  "Another printer, material or layer setting makes another fan: what held here says nothing of your copy.",
  "A cooler under load is hot enough to burn skin. A stopped fan lets a heater overheat: fit an independent thermal cut-out.",
];
/** From this level on the bench a notice about hearing stands here, dB(A) (house rule). */
const noticeDba = 80;

function specimenWords({ specimens }: Sheet): string[] {
  return specimens.map((each) =>
    [
      `Copy ${each.number} as measured: ${each.material}`,
      each.layerHeightMm === null ? null : `${each.layerHeightMm} mm layers`,
      each.nozzleMm === null ? null : `${each.nozzleMm} mm nozzle`,
      each.walls === null ? null : `${each.walls} walls`,
      each.infillPercent === null ? null : `${each.infillPercent} % infill`,
      each.note || null,
    ]
      .filter(Boolean)
      .join(", "),
  );
}

/** How it was printed, what can hurt, and the files under their licence; the table is absent where there are none. */
export function PrintSection({ sheet }: { sheet: Sheet }) {
  const loud = sheet.levelRangeDba.high >= noticeDba;
  const cautions = loud
    ? [...printCautions, "From 80 dB(A) mind your hearing; near 85 dB(A) wear protection and limit the time."]
    : printCautions;
  return (
    <Section id="print" title="Print it" note={`licence ${licenceWords(sheet.revision.licence)}`}>
      <div className="grid gap-6 lg:grid-cols-2">
        <div className="grid content-start gap-2">
          {sheet.revision.printNotes ? <p>{sheet.revision.printNotes}</p> : null}
          {specimenWords(sheet).map((words) => (
            <p key={words}>{words}.</p>
          ))}
          {sheet.revision.changes ? <p>Changed in this revision: {sheet.revision.changes}</p> : null}
        </div>
        <CautionList title="before you print and run it" items={cautions} />
      </div>
      {sheet.files.length > 0 ? (
        <div className="mt-6">
          <p className="mb-3">
            To download is to take on the licence, {licenceWords(sheet.revision.licence)}, and the risk: a figure here
            clears no print of yours. A rotor that bursts or sheds a blade hurts; guard it, stand out of its plane,
            raise the speed in steps.
          </p>
          <BarsTable
            caption="Files of this revision"
            showCaption
            phone="fold"
            columns={[
              { key: "name", head: "File" },
              { key: "role", head: "What it is" },
              { key: "bytes", head: "Size" },
              { key: "sha", head: "SHA-256" },
              { key: "state", head: "State" },
            ]}
            rows={sheet.files.map((file) => ({
              key: file.attachmentId,
              cells: {
                name: {
                  words: file.takenDown ? (
                    file.name
                  ) : (
                    <a href={`/api/v1/files/${file.attachmentId}`} download>
                      {file.name}
                    </a>
                  ),
                },
                role: { words: file.role.replace("_", " ") },
                bytes: { words: formatBytes(file.bytes) },
                sha: { words: <span className="figures break-all">{file.sha256}</span> },
                state: {
                  words: file.takenDown
                    ? `taken down on ${formatDate(file.takenDown.at)}: ${file.takenDown.reason}`
                    : "as received",
                },
              },
            }))}
          />
        </div>
      ) : null}
    </Section>
  );
}
