import type { Metadata } from "next";
import Link from "next/link";
import { SeasonForm } from "@/components/host/season-forms";
import { Section } from "@/components/ui/sheet";
import { EmptyState } from "@/components/ui/states";
import { orPageState, personForPage } from "@/lib/auth/page";
import { readBenchSetup } from "@/lib/server/benches/benches";
import { readHostSeasons } from "@/lib/server/seasons/seasons";

export const metadata: Metadata = { title: "Make a season" };

export default async function NewSeasonPage() {
  const path = "/host/seasons/new";
  const actor = await personForPage(path);
  const [setup, { items }] = await orPageState(Promise.all([readBenchSetup(actor), readHostSeasons(actor)]), path);
  const budgets = setup.benches.flatMap((bench) => bench.versions.flatMap((version) => version.budgets));
  const ready =
    budgets.length > 0 &&
    setup.protocols.some((protocol) => protocol.versions.length > 0) &&
    setup.baselines.some((baseline) => baseline.units.length > 0);
  const nextNumber = Math.max(0, ...items.map((season) => season.number)) + 1;
  return (
    <Section
      id="season"
      title="Make a season"
      level={1}
      note="It isn't public before it is opened. Protocol, rule, levels and budget freeze at its first reading."
    >
      {ready ? (
        <SeasonForm setup={setup} nextNumber={nextNumber} />
      ) : (
        <EmptyState title="Something is missing">
          A season needs a bench version with a budget, a protocol version and a baseline unit:{" "}
          <Link href="/host/benches">set them up</Link>.
        </EmptyState>
      )}
    </Section>
  );
}
