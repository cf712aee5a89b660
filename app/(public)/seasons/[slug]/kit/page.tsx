import type { Metadata } from "next";
import Link from "next/link";
import { cache } from "react";
import { KitFrames } from "@/components/kit/kit-frames";
import { KitGuide } from "@/components/kit/kit-guide";
import { KitSolids } from "@/components/kit/kit-solids";
import { levelsWords, seasonState } from "@/components/seasons/season-list";
import { SeasonRules } from "@/components/seasons/season-rules";
import { Section } from "@/components/ui/sheet";
import { orPageState } from "@/lib/auth/page";
import { framePresetNote, readKit } from "@/lib/server/kit/read-kit";
import { readSeason } from "@/lib/server/reading/read-seasons";

type Props = { params: Promise<{ slug: string }> };

const find = cache((slug: string) =>
  orPageState(Promise.all([readKit({ slug }), readSeason({ slug })]), `/seasons/${slug}/kit`),
);

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  const [kit] = await find((await params).slug);
  return {
    title: `Kit of ${kit.season.title}`,
    description: `What a fan must fit in ${kit.season.title}: frames with dimensions, limits, and the solids around the cooler as drawings and STL.`,
  };
}

export default async function KitPage({ params }: Props) {
  const [kit, season] = await find((await params).slug);
  return (
    <>
      <Section
        id="kit"
        title={`Kit of ${kit.season.title}`}
        level={1}
        note="what a fan must fit, from the bench’s own rows"
      >
        <p className="docket">
          {seasonState(season)} · {levelsWords(season)} · <Link href={`/seasons/${season.slug}`}>The season</Link>
        </p>
      </Section>
      <KitFrames kit={kit} note={framePresetNote} />
      <KitSolids kit={kit} />
      <KitGuide kit={kit} open={season.closedAt === null} />
      <SeasonRules season={season} />
    </>
  );
}
