import type { Metadata } from "next";
import Link from "next/link";
import { AddEntriesForm, LendForm, PublishForms, PublishingNow } from "@/components/host/round-forms";
import { HoursPlan } from "@/components/host/hours-plan";
import { RoundEntries, RoundMoves } from "@/components/host/round-parts";
import { Facts } from "@/components/ui/facts";
import { Notice } from "@/components/ui/notice";
import { Section } from "@/components/ui/sheet";
import { orPageState, personForPage } from "@/lib/auth/page";
import { idOrNotFound } from "@/lib/auth/page-id";
import { formatDateTime } from "@/lib/format/dates";
import { isDue } from "@/lib/server/publishing/is-due";
import { readHostRound } from "@/lib/server/seasons/read-round";

export const metadata: Metadata = { title: "Round to host" };

export default async function HostRoundPage({ params }: { params: Promise<{ id: string }> }) {
  const roundId = idOrNotFound((await params).id);
  const path = `/host/rounds/${roundId}`;
  const actor = await personForPage(path);
  const round = await orPageState(readHostRound(actor, { roundId }), path);
  const takes = round.state === "planned" || round.state === "measuring";
  const toPublish = round.state === "signed" || round.state === "scheduled";
  return (
    <>
      <Section
        id="round"
        title={`Season ${round.seasonNumber}, round ${round.number}`}
        level={1}
        note={round.title}
        aside={<Link href={`/host/seasons/${round.seasonId}`}>The season</Link>}
      >
        <Facts
          flow="strip"
          facts={[
            { label: "State", value: round.state.replaceAll("_", " ") },
            { label: "Entries", value: round.entries.length },
            { label: "Signed by", value: round.signedBy ?? "nobody" },
            { label: "Publish at", value: round.publishAt ? formatDateTime(round.publishAt) : "no hour set" },
            { label: "Published", value: round.publishedAt ? formatDateTime(round.publishedAt) : "no" },
          ]}
        />
        {isDue(round) ? <PublishingNow /> : null}
        {round.state === "planned" || round.state === "published" ? null : (
          <p className="mt-2">
            <Link href={`/review/${roundId}`}>Open it for review</Link>
          </p>
        )}
      </Section>
      {toPublish ? (
        <Section id="publish" title="Publish" tone="bar">
          {round.ownsEntry ? (
            <Notice title="Another host publishes this round">
              <p>You own or owned an entry of it.</p>
            </Notice>
          ) : (
            <PublishForms roundId={roundId} />
          )}
        </Section>
      ) : null}
      <Section id="entries" title="Entries of the round">
        <RoundEntries round={round} />
      </Section>
      {takes ? (
        <Section id="add" title="Add entries">
          <HoursPlan now={round.hours} withFree={round.hoursWithFree} />
          {round.free.length > 0 ? (
            <AddEntriesForm
              roundId={roundId}
              free={round.free.map((entry) => ({
                entryId: entry.entryId,
                name: `${entry.designName} ${entry.letter}, ${entry.state.replaceAll("_", " ")}`,
              }))}
            />
          ) : (
            <p>Every accepted entry of the season stands in a round.</p>
          )}
        </Section>
      ) : null}
      {round.state === "published" ? null : (
        <Section id="loan" title="Lend the review to a member">
          <LendForm roundId={roundId} lentTo={round.lentTo} />
        </Section>
      )}
      <Section id="moves" title="What happened">
        <RoundMoves round={round} />
      </Section>
    </>
  );
}
