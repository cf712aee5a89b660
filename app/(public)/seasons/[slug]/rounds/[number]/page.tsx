import type { Metadata } from "next";
import Link from "next/link";
import { notFound } from "next/navigation";
import { cache } from "react";
import { PlainSumSection } from "@/components/seasons/plain-sum-section";
import { seasonLevelUnit } from "@/components/seasons/season-list";
import { ScreenView } from "@/components/seasons/screen-view";
import { StandingSection } from "@/components/seasons/standing-section";
import { Section } from "@/components/ui/sheet";
import { orPageState } from "@/lib/auth/page";
import { roundParams, standingQuery } from "@/lib/contracts/seasons";
import type { RuleKind } from "@/lib/domain/scoring/rules";
import { formatDate } from "@/lib/format/dates";
import { readRound } from "@/lib/server/reading/read-seasons";

type Props = {
  params: Promise<{ slug: string; number: string }>;
  searchParams: Promise<Record<string, string | string[] | undefined>>;
};

const find = cache((slug: string, number: number, rule: RuleKind | undefined) =>
  orPageState(readRound({ slug, number, rule }), `/seasons/${slug}/rounds/${number}`),
);

async function asked({ params, searchParams }: Props) {
  const where = roundParams.safeParse(await params);
  const search = await searchParams;
  const rule = standingQuery.shape.rule.safeParse(search.rule);
  if (!where.success || !rule.success) notFound();
  return { round: await find(where.data.slug, where.data.number, rule.data), rule: rule.data, view: search.view };
}

export async function generateMetadata(props: Props): Promise<Metadata> {
  const { round } = await asked(props);
  const [first] = round.standing?.rows ?? [];
  return {
    title: `${round.season.title}, round ${round.number}`,
    description: first ? `First: ${first.name} ${first.letter}, with the rank's 95 % range beside it.` : undefined,
  };
}

export default async function RoundPage(props: Props) {
  const { round, rule, view } = await asked(props);
  const season = `/seasons/${round.season.slug}`;
  const path = `${season}/rounds/${round.number}`;
  if (view === "screen") return <ScreenView round={round} back={rule ? `${path}?rule=${rule}` : path} />;
  const screen = rule ? `${path}?rule=${rule}&view=screen` : `${path}?view=screen`;
  return (
    <>
      <Section id="round" title={`${round.season.title}, round ${round.number}`} level={1}>
        <p className="docket">Published {formatDate(round.publishedAt)}</p>
        <nav aria-label="Around this round" className="mt-3 flex flex-wrap gap-x-4 gap-y-1">
          <Link href={season}>{round.season.title}</Link>
          {round.before === null ? null : <Link href={`${season}/rounds/${round.before}`}>Round {round.before}</Link>}
          {round.after === null ? null : <Link href={`${season}/rounds/${round.after}`}>Round {round.after}</Link>}
          <Link href={screen}>16:9 view for recording</Link>
        </nav>
      </Section>
      <StandingSection
        standing={round.standing}
        path={path}
        title="Standing of the round"
        unit={seasonLevelUnit(round)}
      />
      <PlainSumSection standing={round.standing} path={path} />
    </>
  );
}
