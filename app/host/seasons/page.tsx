import type { Metadata } from "next";
import Link from "next/link";
import { BarsTable } from "@/components/ui/bars/bars-table";
import { LinkButton } from "@/components/ui/button";
import { Section } from "@/components/ui/sheet";
import { EmptyState } from "@/components/ui/states";
import { orPageState, personForPage } from "@/lib/auth/page";
import type { HostSeason } from "@/lib/contracts/seasons-admin";
import { RULES } from "@/lib/domain/scoring/rules";
import { formatDate } from "@/lib/format/dates";
import { readHostSeasons } from "@/lib/server/seasons/seasons";

export const metadata: Metadata = { title: "Seasons to host" };

function stateWords(season: HostSeason): string {
  if (season.closedAt) return `closed ${formatDate(season.closedAt)}`;
  if (!season.openedAt) return "not open yet";
  return season.frozenAt ? `open, frozen since ${formatDate(season.frozenAt)}` : "open";
}

export default async function HostSeasonsPage() {
  const actor = await personForPage("/host/seasons");
  const { items } = await orPageState(readHostSeasons(actor), "/host/seasons");
  return (
    <Section
      id="seasons"
      title="Seasons to host"
      level={1}
      aside={<LinkButton href="/host/seasons/new">Make a season</LinkButton>}
    >
      {items.length === 0 ? (
        <EmptyState title="No season yet">
          First set up a <Link href="/host/benches">bench, a protocol and a baseline</Link>.
        </EmptyState>
      ) : (
        <BarsTable
          caption="Seasons"
          phone="fold"
          columns={[
            { key: "season", head: "Season" },
            { key: "state", head: "State" },
            { key: "rule", head: "Rule" },
            { key: "levels", head: "Levels at the bench’s microphone", unit: "dB(A)" },
            { key: "entries", head: "Entries" },
            { key: "rounds", head: "Rounds" },
          ]}
          rows={items.map((season) => ({
            key: season.seasonId,
            cells: {
              season: { words: <Link href={`/host/seasons/${season.seasonId}`}>{season.title}</Link> },
              state: { words: stateWords(season) },
              rule: { words: RULES[season.rule].label },
              levels: { words: season.levelsDba.join(", ") },
              entries: { words: String(season.entries) },
              rounds: { words: String(season.rounds.length) },
            },
          }))}
        />
      )}
    </Section>
  );
}
