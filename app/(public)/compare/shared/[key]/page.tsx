import type { Metadata } from "next";
import Link from "next/link";
import { notFound } from "next/navigation";
import { cache } from "react";
import { ComparePage } from "@/components/compare/compare-page";
import { LinkButton } from "@/components/ui/button";
import { Section } from "@/components/ui/sheet";
import { GoneState } from "@/components/ui/states";
import { orPageState } from "@/lib/auth/page";
import { shareKeyParams } from "@/lib/contracts/saved";
import { formatDate } from "@/lib/format/dates";
import { readSharedPage } from "@/lib/server/saved/shared-page";

type Asked = {
  params: Promise<{ key: string }>;
  searchParams: Promise<{ level?: string | string[]; dt?: string | string[] }>;
};

const readAsked = cache((key: string, level: string | undefined, deltaT: string | undefined) =>
  orPageState(readSharedPage({ key, levelText: level, deltaTText: deltaT }), `/compare/shared/${key}`),
);

async function read({ params, searchParams }: Asked) {
  const asked = shareKeyParams.safeParse(await params);
  if (!asked.success) notFound();
  const { level, dt } = await searchParams;
  const one = (value: string | string[] | undefined) => (typeof value === "string" ? value : undefined);
  return readAsked(asked.data.key, one(level), one(dt));
}

export async function generateMetadata(asked: Asked): Promise<Metadata> {
  const { shared } = await read(asked);
  // Whoever has the link may read it; a search engine is told of it by nobody.
  return { title: shared.name, robots: { index: false, follow: false } };
}

/** A comparison that somebody shares: its name, note and figures, to read. */
export default async function SharedPage(asked: Asked) {
  const { shared, sheet, levelDba, deltaTK, missing } = await read(asked);
  const said = `Shared by ${shared.by} on ${formatDate(shared.sharedAt)}`;
  if (!sheet) {
    return (
      <Section id="compare" title={shared.name} level={1} note={said}>
        <GoneState
          title="None of its entries is public any more"
          action={<LinkButton href="/designs">To the index</LinkButton>}
        >
          {shared.note}
        </GoneState>
      </Section>
    );
  }
  return (
    <ComparePage
      heads={sheet.entries}
      traits={sheet.traits}
      laid={sheet.laid}
      comparability={sheet.comparability}
      askedLevelDba={levelDba}
      askedDeltaTK={deltaTK}
      missing={missing}
      tooMany={0}
      title={shared.name}
      saver={
        <p className="screen-only mt-3">
          <Link href={shared.address}>Open it as a comparison of your own</Link>, to change its picks or save it.
        </p>
      }
      intro={
        <>
          <p className="small-print">{said}. Figures are read anew each time.</p>
          {shared.note ? <p className="my-2 whitespace-pre-line">{shared.note}</p> : null}
        </>
      }
    />
  );
}
