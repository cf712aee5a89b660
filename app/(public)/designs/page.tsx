import type { Metadata } from "next";
import { FindingPage } from "@/components/finding/finding-page";
import { searchName } from "@/components/finding/search-name";
import { SaveSearch } from "@/components/saved/save-search";
import { actorFromPage } from "@/lib/auth/actor";
import { isPerson } from "@/lib/domain/accounts/actor";
import { readSearches } from "@/lib/server/saved/searches";
import { indexAddress, parseIndexQuery } from "@/lib/contracts/index-query";
import { readIndex } from "@/lib/server/reading/read-index";

type Asked = { searchParams: Promise<Record<string, string | string[] | undefined>> };

async function paramsOf({ searchParams }: Asked): Promise<URLSearchParams> {
  const pairs = Object.entries(await searchParams).flatMap(([name, value]) =>
    (Array.isArray(value) ? value : [value]).flatMap((each) => (each === undefined ? [] : [[name, each]])),
  );
  return new URLSearchParams(pairs);
}

export async function generateMetadata(asked: Asked): Promise<Metadata> {
  const query = parseIndexQuery(await paramsOf(asked));
  return {
    title: query.q ? `Designs with “${query.q}”` : "Designs",
    description: "Printed cooling fans by trait, level and cooling, each against the baseline of its own session.",
    alternates: { canonical: indexAddress(query) },
  };
}

export default async function DesignsPage(asked: Asked) {
  const params = await paramsOf(asked);
  const query = parseIndexQuery(params);
  const clips = params
    .getAll("clip")
    .flatMap((list) => list.split(","))
    .slice(0, 8);
  const [read, actor] = await Promise.all([readIndex({ query, clips }), actorFromPage()]);
  const saved = isPerson(actor) ? (await readSearches(actor)).items : null;
  const address = indexAddress({ ...query, page: 1 });
  return (
    <FindingPage
      {...read}
      asked={query}
      open={params.getAll("open").at(-1)}
      saver={<SaveSearch saved={saved} address={address} name={searchName(query, read.seasonTitles)} />}
    />
  );
}
