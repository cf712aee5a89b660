"use client";

import { EmptyState } from "@/components/ui/states";
import { Section } from "@/components/ui/sheet";
import { CautionList } from "@/components/ui/notice";
import { usePrintJobs } from "@/lib/client/bench-prints";
import type { PrintJob } from "@/lib/contracts/bench-prints";
import { PrintTicket } from "./print-ticket";

const cautions = [
  "A printed rotor can burst or shed a blade: spin it up behind the guard, eye protection on, nobody in its plane.",
  "Raise the speed in steps and stop at once on vibration. A copy that was dropped or cracked is written off.",
];

/** Every entry that is to be printed, spun up, or stands on the bench, as a job ticket. */
export function PrintScreen({ initial }: { initial: { items: PrintJob[] } }) {
  const { data } = usePrintJobs(initial);
  const groups = [
    { id: "printing", title: "Being printed", state: "printing" },
    { id: "accepted", title: "To print next", state: "accepted" },
    { id: "on-the-bench", title: "On the bench", state: "on_the_bench" },
  ] as const;
  const shown = groups.filter(({ state }) => data.items.some((job) => job.state === state));
  return (
    <>
      <Section id="cautions" tight>
        <CautionList title="before a rotor turns" items={cautions} />
      </Section>
      {shown.length === 0 ? (
        <Section id="none">
          <EmptyState title="No job tickets">The host has accepted nothing that is still to be printed.</EmptyState>
        </Section>
      ) : null}
      {shown.map(({ id, title, state }) => {
        const jobs = data.items.filter((job) => job.state === state);
        return (
          <Section key={id} id={id} title={title} note={`${jobs.length}`}>
            <div className="grid gap-6">
              {jobs.map((job) => (
                <PrintTicket key={job.entryId} job={job} />
              ))}
            </div>
          </Section>
        );
      })}
    </>
  );
}
