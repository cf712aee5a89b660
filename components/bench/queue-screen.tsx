"use client";

import Link from "next/link";
import { EmptyState } from "@/components/ui/states";
import { LinkButton } from "@/components/ui/button";
import { Section } from "@/components/ui/sheet";
import { useBenchQueue } from "@/lib/client/bench-prints";
import type { BenchQueue, QueueEntry } from "@/lib/contracts/bench-prints";
import { formatDateTime } from "@/lib/format/dates";
import { EntryToReview, RoundToReview } from "./to-review";
import { StartSession } from "./start-session";

/** What to print, mount and measure next. */
export function QueueScreen({ initial }: { initial: BenchQueue }) {
  const { data: queue } = useBenchQueue(initial);
  const of = (state: string) => queue.entries.filter((entry) => entry.state === state);
  const onBench = of("on_the_bench");
  const sentBack = onBench.filter((entry) => entry.sentBack !== null);
  const toMeasure = onBench.filter((entry) => entry.sentBack === null);
  const toPrint = [...of("accepted"), ...of("printing")];
  return (
    <>
      <Section id="open" title="At the bench now">
        {queue.open.length === 0 ? <p>No session is open.</p> : null}
        <ul className="grid gap-2">
          {queue.open.map((session) => (
            <li key={session.sessionId} className="flex flex-wrap items-baseline gap-x-4 gap-y-1">
              <LinkButton kind="solid" href={`/bench/sessions/${session.sessionId}`}>
                Go on with session {session.number}
              </LinkButton>
              <span>
                {session.benchName}, {session.operatorHandle ?? "an erased account"}, since{" "}
                {formatDateTime(session.beganAt)}
              </span>
            </li>
          ))}
        </ul>
      </Section>
      <Section id="start" title="Start a session" tone="bar">
        <StartSession rounds={queue.rounds} checklist={queue.checklist} />
      </Section>
      {sentBack.length > 0 ? (
        <Section id="sent-back" title="Sent back by the reviewer" note={`${sentBack.length}`}>
          <EntryList entries={sentBack} />
        </Section>
      ) : null}
      <Section id="to-measure" title="To mount and measure" note={`${toMeasure.length}`}>
        {toMeasure.length === 0 ? (
          <EmptyState title="Nothing waits on the bench">Print and spin up the next copy first.</EmptyState>
        ) : (
          <EntryList entries={toMeasure} />
        )}
      </Section>
      <Section
        id="to-print"
        title="To print"
        note={`${toPrint.length}`}
        aside={<Link href="/bench/prints">Job tickets</Link>}
      >
        {toPrint.length === 0 ? <p>Nothing waits for the printer.</p> : <EntryList entries={toPrint} />}
      </Section>
      <Section id="rounds" title="Rounds in work" note={`${of("in_review").length} entries in review`}>
        {queue.rounds.length === 0 ? <p>No round is planned or being measured.</p> : null}
        <ul className="grid gap-3">
          {queue.rounds.map((round) => (
            <li key={round.roundId}>
              <RoundToReview round={round} />
            </li>
          ))}
        </ul>
      </Section>
    </>
  );
}

function EntryList({ entries }: { entries: readonly QueueEntry[] }) {
  return (
    <ul className="grid gap-3">
      {entries.map((entry) => (
        <li key={entry.entryId} className="grid gap-1">
          <span className="flex flex-wrap items-baseline gap-x-3">
            <strong>
              {entry.name} {entry.letter}
            </strong>
            <span className="docket">
              {entry.seasonTitle}
              {entry.round ? `, round ${entry.round.number}` : ", no round yet"} ·{" "}
              {entry.rotors === 1 ? "one rotor" : `${entry.rotors} rotors`} · {entry.state.replaceAll("_", " ")} since{" "}
              {formatDateTime(entry.since)}
            </span>
            {entry.sessionId ? <Link href={`/bench/sessions/${entry.sessionId}`}>Its session</Link> : null}
          </span>
          {entry.sentBack ? <p className="max-w-2xl">“{entry.sentBack}”</p> : null}
          {entry.state === "on_the_bench" && entry.sessionId ? (
            <EntryToReview entryId={entry.entryId} name={`${entry.name} ${entry.letter}`} />
          ) : null}
        </li>
      ))}
    </ul>
  );
}
