import type { Metadata } from "next";
import { SearchList } from "@/components/saved/search-list";
import { LinkButton } from "@/components/ui/button";
import { Section } from "@/components/ui/sheet";
import { EmptyState } from "@/components/ui/states";
import { orPageState, personForPage } from "@/lib/auth/page";
import { readSearches } from "@/lib/server/saved/searches";

export const metadata: Metadata = { title: "Saved searches" };

const path = "/my/searches";

export default async function MySearchesPage() {
  const actor = await personForPage(path);
  const { items } = await orPageState(readSearches(actor), path);
  return (
    <Section
      id="searches"
      title="Saved searches"
      level={1}
      note="Each asks the index anew: what was published since is in it."
    >
      {items.length === 0 ? (
        <EmptyState title="None yet" action={<LinkButton href="/designs">To the index</LinkButton>}>
          Choose in the sentence of the index what you look for, and press “Save this search” under the list.
        </EmptyState>
      ) : (
        <SearchList items={items} />
      )}
    </Section>
  );
}
