import type { Metadata } from "next";
import Link from "next/link";
import { ReadingsTable } from "@/components/review/readings-table";
import { PointsTable } from "@/components/review/points-table";
import { SpectraList } from "@/components/review/spectra-list";
import { Fold } from "@/components/ui/fold";
import { Section } from "@/components/ui/sheet";
import { orPageState, personForPage } from "@/lib/auth/page";
import { idOrNotFound } from "@/lib/auth/page-id";
import type { ReviewRun } from "@/lib/contracts/review";
import { readEntryForReview } from "@/lib/server/review/read-entry";

export const metadata: Metadata = { title: "Readings of an entry" };

const runWords = (run: ReviewRun) =>
  `Run ${run.ordinal}: ${run.setSpeed} set, mount ${run.mountNumber}, repeat ${run.repeatNumber}, ${run.state}` +
  (run.reason === null ? "" : ` (${run.reason})`);

export default async function ReviewEntryPage({ params }: { params: Promise<{ roundId: string; entryId: string }> }) {
  const given = await params;
  const [roundId, entryId] = [idOrNotFound(given.roundId), idOrNotFound(given.entryId)];
  const path = `/review/${roundId}/${entryId}`;
  const actor = await personForPage(path);
  const { entry, runs, sessionReadings } = await orPageState(readEntryForReview(actor, { roundId, entryId }), path);
  const name = `${entry.designName} ${entry.letter}`;
  const parts = [
    { id: "own", title: `Runs of ${name}`, runs: runs.filter((run) => !run.ofBaseline) },
    { id: "baseline", title: "Runs of the baseline in the same session", runs: runs.filter((run) => run.ofBaseline) },
  ];
  return (
    <>
      <Section
        id="entry"
        level={1}
        title={`Readings of ${name}`}
        aside={<Link href={`/review/${roundId}`}>Back to the round</Link>}
      >
        {entry.snapshot ? <PointsTable snapshot={entry.snapshot} /> : <p>No figures: {entry.whyNone}.</p>}
        {entry.snapshot?.spectra ? (
          <div className="mt-6">
            <SpectraList snapshot={entry.snapshot} />
          </div>
        ) : null}
      </Section>
      {parts.map((part) => (
        <Section key={part.id} id={part.id} title={part.title}>
          {part.runs.map((run) => (
            <Fold key={run.runId} title={runWords(run)}>
              <ReadingsTable caption={runWords(run)} readings={run.readings} />
            </Fold>
          ))}
        </Section>
      ))}
      <Section id="session" title="Readings of the session itself">
        <ReadingsTable caption="Calibrator, background and air" readings={sessionReadings} />
      </Section>
    </>
  );
}
