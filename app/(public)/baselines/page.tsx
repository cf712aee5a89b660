import type { Metadata } from "next";
import Link from "next/link";
import { UnitTable } from "@/components/baselines/unit-table";
import { Section } from "@/components/ui/sheet";
import { EmptyState } from "@/components/ui/states";
import { readBaselines } from "@/lib/server/reading/read-baselines";

export const metadata: Metadata = {
  title: "Baselines",
  description: "The reference fans that every session runs first and last, unit by unit, with what they read.",
};

export default async function BaselinesPage() {
  const { items } = await readBaselines();
  return (
    <>
      <Section id="baselines" title="Baselines" level={1}>
        <p>
          Every session runs a reference fan first and last, and every figure is told against it. A unit that changes or
          wears out is retired; ratios to different units compare only through a session that ran both.
        </p>
      </Section>
      {items.length === 0 ? (
        <Section id="none">
          <EmptyState title="No baseline yet">It stands here once a season that counts it has opened.</EmptyState>
        </Section>
      ) : null}
      {items.map((baseline) => (
        <Section
          key={baseline.slug}
          id={baseline.slug}
          title={<Link href={`/baselines/${baseline.slug}`}>{baseline.name}</Link>}
          note={baseline.blades === null ? undefined : `${baseline.blades} blades`}
        >
          {baseline.description ? <p className="mb-3">{baseline.description}</p> : null}
          <UnitTable name={baseline.name} units={baseline.units} />
        </Section>
      ))}
    </>
  );
}
