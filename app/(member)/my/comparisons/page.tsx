import type { Metadata } from "next";
import { ComparisonList } from "@/components/saved/comparison-list";
import { LinkButton } from "@/components/ui/button";
import { Section } from "@/components/ui/sheet";
import { EmptyState } from "@/components/ui/states";
import { orPageState, personForPage } from "@/lib/auth/page";
import { readComparisons } from "@/lib/server/saved/comparisons";

export const metadata: Metadata = { title: "Saved comparisons" };

const path = "/my/comparisons";

export default async function MyComparisonsPage() {
  const actor = await personForPage(path);
  const { items } = await orPageState(readComparisons(actor), path);
  return (
    <Section
      id="comparisons"
      title="Saved comparisons"
      level={1}
      note="Figures are read anew each time one is opened: what is corrected since then shows."
    >
      {items.length === 0 ? (
        <EmptyState title="None yet" action={<LinkButton href="/designs">To the index</LinkButton>}>
          Clip two to four designs in the index, lay them over the baseline, and press “Save this comparison” there.
        </EmptyState>
      ) : (
        <ComparisonList items={items} />
      )}
    </Section>
  );
}
