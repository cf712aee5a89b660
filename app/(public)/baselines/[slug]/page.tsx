import type { Metadata } from "next";
import { cache } from "react";
import { AgreedSection } from "@/components/baselines/agreed-section";
import { ChecksSection } from "@/components/baselines/checks-section";
import { SessionsSection } from "@/components/baselines/sessions-section";
import { UnitTable } from "@/components/baselines/unit-table";
import { Section } from "@/components/ui/sheet";
import { actorFromPage } from "@/lib/auth/actor";
import { orPageState } from "@/lib/auth/page";
import { may } from "@/lib/domain/accounts/policy";
import { readBaseline } from "@/lib/server/reading/read-baselines";

type Props = {
  params: Promise<{ slug: string }>;
  searchParams: Promise<Record<string, string | string[] | undefined>>;
};

const find = cache(async (slug: string) => {
  const actor = await actorFromPage();
  return orPageState(readBaseline({ slug, actor }), `/baselines/${slug}`);
});

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  const { name, description, units } = await find((await params).slug);
  return { title: name, description: `${description} Units: ${units.map((unit) => unit.serial).join(", ")}.` };
}

export default async function BaselinePage({ params, searchParams }: Props) {
  const baseline = await find((await params).slug);
  const { sessions, chart } = await searchParams;
  const actor = await actorFromPage();
  return (
    <>
      <Section
        id="baseline"
        title={baseline.name}
        level={1}
        note={baseline.blades === null ? undefined : `${baseline.blades} blades`}
      >
        {baseline.description ? <p className="mb-4">{baseline.description}</p> : null}
        <UnitTable name={baseline.name} units={baseline.units} />
      </Section>
      <AgreedSection baseline={baseline} />
      <ChecksSection
        baseline={baseline}
        path={`/baselines/${baseline.slug}`}
        chosen={typeof chart === "string" ? chart : undefined}
        all={may(actor, "baseline.manage")}
      />
      <SessionsSection sessions={baseline.sessions} path={`/baselines/${baseline.slug}`} all={sessions === "all"} />
    </>
  );
}
