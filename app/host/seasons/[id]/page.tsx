import type { Metadata } from "next";
import Link from "next/link";
import { MoveSeasonForm, PlanRoundForm, SeasonForm } from "@/components/host/season-forms";
import { BarsTable } from "@/components/ui/bars/bars-table";
import { Notice } from "@/components/ui/notice";
import { Section } from "@/components/ui/sheet";
import { orPageState, personForPage } from "@/lib/auth/page";
import { idOrNotFound } from "@/lib/auth/page-id";
import { formatDateTime } from "@/lib/format/dates";
import { readBenchSetup } from "@/lib/server/benches/benches";
import { readHostSeason } from "@/lib/server/seasons/seasons";

export const metadata: Metadata = { title: "Season to host" };

export default async function HostSeasonPage({ params }: { params: Promise<{ id: string }> }) {
  const seasonId = idOrNotFound((await params).id);
  const path = `/host/seasons/${seasonId}`;
  const actor = await personForPage(path);
  const [season, setup] = await orPageState(
    Promise.all([readHostSeason(actor, { seasonId }), readBenchSetup(actor)]),
    path,
  );
  const open = season.openedAt !== null && season.closedAt === null;
  return (
    <>
      <Section
        id="season"
        title={season.title}
        level={1}
        aside={season.openedAt ? <Link href={`/seasons/${season.slug}`}>Public page</Link> : null}
      >
        {season.openedAt === null ? <MoveSeasonForm seasonId={seasonId} to="opened" /> : null}
        {open ? <MoveSeasonForm seasonId={seasonId} to="closed" /> : null}
        {season.frozenAt ? (
          <Notice className="mt-4">
            <p>
              Its first reading was taken {formatDateTime(season.frozenAt)}: protocol, rule, levels, bench and budget
              stand.
            </p>
          </Notice>
        ) : null}
      </Section>
      <Section id="rounds" title="Rounds">
        {season.rounds.length > 0 ? (
          <BarsTable
            caption="Rounds of the season"
            phone="fold"
            columns={[
              { key: "round", head: "Round" },
              { key: "state", head: "State" },
              { key: "entries", head: "Entries" },
            ]}
            rows={season.rounds.map((round) => ({
              key: round.roundId,
              cells: {
                round: {
                  words: (
                    <Link href={`/host/rounds/${round.roundId}`}>
                      {round.number}: {round.title}
                    </Link>
                  ),
                },
                state: { words: round.state.replaceAll("_", " ") },
                entries: { words: String(round.entries) },
              },
            }))}
          />
        ) : (
          <p>None yet.</p>
        )}
        {open ? (
          <div className="mt-6">
            <PlanRoundForm seasonId={seasonId} />
          </div>
        ) : null}
      </Section>
      <Section id="change" title="Change the season">
        <SeasonForm setup={setup} season={season} nextNumber={season.number} />
      </Section>
    </>
  );
}
