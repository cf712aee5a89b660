import { BarsTable } from "@/components/ui/bars/bars-table";
import type { OwnDesign } from "@/lib/contracts/own-designs";
import { formatDateTime } from "@/lib/format/dates";
import { OwnMoveForm } from "./entry-forms";

/** Where each entry stands and what was said with it; figures come with the publication. */
export function OwnEntries({ design }: { design: OwnDesign }) {
  if (design.entries.length === 0) return <p>Nothing was sent in yet.</p>;
  return (
    <BarsTable
      caption="Entries"
      phone="fold"
      columns={[
        { key: "entry", head: "Entry" },
        { key: "state", head: "State" },
        { key: "since", head: "Since" },
        { key: "said", head: "What was said" },
        { key: "acts", head: "What to do" },
      ]}
      rows={design.entries.map((entry) => ({
        key: entry.entryId,
        cells: {
          entry: { words: `Revision ${entry.letter}, ${entry.seasonTitle}` },
          state: { words: entry.state.replaceAll("_", " ") },
          since: { words: formatDateTime(entry.stateAt) },
          said: entry.reason === null ? { figure: { value: null, why: "nothing was said" } } : { words: entry.reason },
          acts: {
            words: (
              <div className="grid gap-2">
                {entry.moves.map((to) => (
                  <OwnMoveForm key={to + entry.state} slug={design.slug} entry={entry} to={to} />
                ))}
              </div>
            ),
          },
        },
      }))}
    />
  );
}
