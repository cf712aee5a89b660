import type { Metadata } from "next";
import Link from "next/link";
import { EntryMoves } from "@/components/host/entry-move-form";
import { BarsTable } from "@/components/ui/bars/bars-table";
import { Section } from "@/components/ui/sheet";
import { EmptyState } from "@/components/ui/states";
import { orPageState, personForPage } from "@/lib/auth/page";
import { hostEntriesQuery } from "@/lib/contracts/entries";
import { formatDateTime } from "@/lib/format/dates";
import { readHostEntries } from "@/lib/server/seasons/read-entries";
import { readHostSeasons } from "@/lib/server/seasons/seasons";

export const metadata: Metadata = { title: "Entries" };

const path = "/host/entries";
const shown = [
  { state: "sent_in", words: "Sent in" },
  { state: "accepted", words: "Accepted" },
  { state: "printing", words: "Printing" },
  { state: "on_the_bench", words: "On the bench" },
  { state: "in_review", words: "In review" },
  { state: "returned", words: "Returned" },
  { state: "published", words: "Published" },
] as const;

export default async function HostEntriesPage({
  searchParams,
}: {
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}) {
  const actor = await personForPage(path);
  const parsed = hostEntriesQuery.safeParse(await searchParams);
  const { state = "sent_in", after } = parsed.success ? parsed.data : {};
  const [{ items, next }, { items: seasons }] = await orPageState(
    Promise.all([readHostEntries(actor, { state, after }), readHostSeasons(actor)]),
    path,
  );
  const open = seasons.filter((season) => season.openedAt && !season.closedAt);
  return (
    <Section id="entries" title="Entries" level={1}>
      <nav aria-label="State" className="mb-4 flex flex-wrap gap-x-4 gap-y-1">
        {shown.map((each) => (
          <Link
            key={each.state}
            href={`${path}?state=${each.state}`}
            aria-current={each.state === state ? "page" : undefined}
            className={each.state === state ? "font-bold" : undefined}
          >
            {each.words}
          </Link>
        ))}
      </nav>
      {items.length === 0 ? (
        <EmptyState title="None">No entry is in this state.</EmptyState>
      ) : (
        <BarsTable
          caption={`Entries: ${state.replaceAll("_", " ")}`}
          phone="fold"
          columns={[
            { key: "entry", head: "Entry" },
            { key: "season", head: "Season and round" },
            { key: "traits", head: "Declared" },
            { key: "since", head: "Since" },
            { key: "moves", head: "What to do" },
          ]}
          rows={items.map((entry) => ({
            key: entry.entryId,
            cells: {
              entry: { words: `${entry.designName} ${entry.letter}, by ${entry.owners.join(", ")}` },
              season: {
                words: `${entry.seasonNumber}${entry.roundNumber === null ? "" : `, round ${entry.roundNumber}`}`,
              },
              traits: {
                words: `${entry.stages} ${entry.stages === 1 ? "stage" : "stages"}, ${entry.frameKey}, ${entry.material}, ${entry.licence}`,
              },
              since: { words: formatDateTime(entry.stateAt) },
              moves: {
                words: (
                  <EntryMoves
                    key={entry.state}
                    entry={entry}
                    seasons={open.map(({ seasonId, title }) => ({ seasonId, title }))}
                  />
                ),
              },
            },
          }))}
        />
      )}
      {next === null ? null : (
        <p className="mt-4">
          <Link href={`${path}?state=${state}&after=${next}`}>Further entries</Link>
        </p>
      )}
    </Section>
  );
}
