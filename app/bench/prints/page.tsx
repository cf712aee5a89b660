import type { Metadata } from "next";
import { PrintScreen } from "@/components/bench/print-screen";
import { LinkButton } from "@/components/ui/button";
import { Section } from "@/components/ui/sheet";
import { orPageState, personForPage } from "@/lib/auth/page";
import { readPrintJobs } from "@/lib/server/bench/queue";

export const metadata: Metadata = { title: "Job tickets" };

export default async function PrintsPage() {
  const actor = await personForPage("/bench/prints");
  const jobs = await orPageState(readPrintJobs(actor), "/bench/prints");
  return (
    <>
      <Section
        id="prints"
        title="Job tickets"
        level={1}
        aside={
          <LinkButton small href="/bench">
            Bench
          </LinkButton>
        }
      >
        <p className="max-w-2xl">
          What to print, how each copy was balanced, and how every rotor went through its spin-up. A copy goes to the
          bench once each of its rotors has passed.
        </p>
      </Section>
      <PrintScreen initial={jobs} />
    </>
  );
}
