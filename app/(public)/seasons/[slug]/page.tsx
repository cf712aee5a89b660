import type { Metadata } from "next";
import Link from "next/link";
import { notFound } from "next/navigation";
import { cache } from "react";
import { PlainSumSection } from "@/components/seasons/plain-sum-section";
import { levelsWords, seasonLevelUnit, seasonState } from "@/components/seasons/season-list";
import { SeasonRules } from "@/components/seasons/season-rules";
import { StandingSection } from "@/components/seasons/standing-section";
import { Section } from "@/components/ui/sheet";
import { orPageState } from "@/lib/auth/page";
import { standingQuery } from "@/lib/contracts/seasons";
import type { RuleKind } from "@/lib/domain/scoring/rules";
import { readSeason } from "@/lib/server/reading/read-seasons";

type Props = {
  params: Promise<{ slug: string }>;
  searchParams: Promise<Record<string, string | string[] | undefined>>;
};

const find = cache((slug: string, rule: RuleKind | undefined) =>
  orPageState(readSeason({ slug, rule }), `/seasons/${slug}`),
);

async function asked({ params, searchParams }: Props) {
  const { slug } = await params;
  const rule = standingQuery.shape.rule.safeParse((await searchParams).rule);
  if (!rule.success) notFound();
  return find(slug, rule.data);
}

export async function generateMetadata(props: Props): Promise<Metadata> {
  const season = await asked(props);
  const rule =
    season.standing && season.standing.rule.kind !== season.standing.seasonRule ? season.standing.rule : null;
  return {
    title: rule ? `${season.title} under the rule ${rule.label}` : season.title,
    description: `${season.title}: ${season.entries} published entries, levels ${levelsWords(season)}, ranks with 95 % ranges.`,
  };
}

export default async function SeasonPage(props: Props) {
  const season = await asked(props);
  const path = `/seasons/${season.slug}`;
  return (
    <>
      <Section id="season" title={season.title} level={1}>
        {season.summary ? <p>{season.summary}</p> : null}
        <p className="docket mt-2">
          {seasonState(season)} · {season.entries} published entries · {levelsWords(season)}
        </p>
        <p className="mt-2">
          <Link href={`${path}/kit`}>The kit for designers: frames, limits and keep-out solids</Link>
        </p>
        {season.rounds.length > 0 ? (
          <nav aria-label="Rounds" className="mt-3 flex flex-wrap gap-x-4 gap-y-1">
            {season.rounds.map((round) => (
              <Link key={round.number} href={`${path}/rounds/${round.number}`}>
                Round {round.number}
              </Link>
            ))}
          </nav>
        ) : null}
      </Section>
      <StandingSection
        standing={season.standing}
        path={path}
        title="Standing of the season"
        unit={seasonLevelUnit(season)}
        seasonSlug={season.slug}
      />
      <PlainSumSection standing={season.standing} path={path} />
      <SeasonRules season={season} />
    </>
  );
}
