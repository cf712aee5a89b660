import type { Metadata } from "next";
import { SeasonList } from "@/components/seasons/season-list";
import { Section } from "@/components/ui/sheet";
import { EmptyState } from "@/components/ui/states";
import { readSeasons } from "@/lib/server/reading/read-seasons";

export const metadata: Metadata = {
  title: "Seasons",
  description: "Every season of bench comparisons: rules, declared levels, rounds and standings with rank ranges.",
};

export default async function SeasonsPage() {
  const { items } = await readSeasons();
  return (
    <Section id="seasons" title="Seasons" level={1}>
      <p className="mb-4">
        A season has one rule, one protocol and declared levels, frozen at its first reading. Figures of different
        seasons stand side by side only as ratios to each session’s own baseline.
      </p>
      {items.length === 0 ? (
        <EmptyState title="No season has opened yet">The first one stands here once the host opens it.</EmptyState>
      ) : (
        <SeasonList seasons={items} />
      )}
    </Section>
  );
}
