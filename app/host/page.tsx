import type { Metadata } from "next";
import Link from "next/link";
import { Section } from "@/components/ui/sheet";
import { orPageState, personForPage } from "@/lib/auth/page";
import { readHostEntries } from "@/lib/server/seasons/read-entries";
import { readHostSeasons } from "@/lib/server/seasons/seasons";

export const metadata: Metadata = { title: "Host" };

export default async function HostPage() {
  const actor = await personForPage("/host");
  const [{ items: seasons }, { items: entries, next }] = await orPageState(
    Promise.all([readHostSeasons(actor), readHostEntries(actor, { state: "sent_in", limit: 200 })]),
    "/host",
  );
  const open = seasons.filter((season) => season.openedAt && !season.closedAt);
  const rounds = open.flatMap((season) =>
    season.rounds.filter((round) => round.state !== "published").map((round) => ({ ...round, season: season.number })),
  );
  return (
    <>
      <Section id="host" title="Host" level={1}>
        <ul className="list-[square] space-y-1 pl-5">
          <li>
            <Link href="/host/entries">Entries</Link>: {entries.length}
            {next === null ? "" : " and more"} sent in, waiting for you
          </li>
          <li>
            <Link href="/host/seasons">Seasons</Link>: {open.length} open
          </li>
          <li>
            <Link href="/review">Review</Link>
          </li>
          <li>
            <Link href="/host/benches">Benches, protocols and baselines</Link>
          </li>
          <li>
            <Link href="/host/frames">Frames</Link>
          </li>
          <li>
            <Link href="/host/people">People</Link>
          </li>
          <li>
            <Link href="/host/audit">Audit log</Link>
          </li>
        </ul>
      </Section>
      <Section id="rounds" title="Rounds before their hour">
        {rounds.length === 0 ? <p>None. Plan one in an open season.</p> : null}
        <ul className="list-[square] space-y-1 pl-5">
          {rounds.map((round) => (
            <li key={round.roundId}>
              <Link href={`/host/rounds/${round.roundId}`}>
                Season {round.season}, round {round.number}
              </Link>
              : {round.state.replaceAll("_", " ")}, {round.entries} entries
            </li>
          ))}
        </ul>
      </Section>
    </>
  );
}
