import type { Metadata } from "next";
import { QueueScreen } from "@/components/bench/queue-screen";
import { LinkButton } from "@/components/ui/button";
import { Section } from "@/components/ui/sheet";
import { orPageState, personForPage } from "@/lib/auth/page";
import { readQueue } from "@/lib/server/bench/queue";

export const metadata: Metadata = { title: "Bench" };

export default async function BenchPage() {
  const actor = await personForPage("/bench");
  const queue = await orPageState(readQueue(actor), "/bench");
  return (
    <>
      <Section
        id="bench"
        title="Bench"
        level={1}
        aside={
          <LinkButton small href="/bench/prints">
            Job tickets
          </LinkButton>
        }
      >
        <p className="max-w-2xl">
          What to print, mount and measure next. A session runs the baseline first and last; every reading is kept as it
          is typed.
        </p>
      </Section>
      <QueueScreen initial={queue} />
    </>
  );
}
