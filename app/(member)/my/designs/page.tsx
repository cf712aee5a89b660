import type { Metadata } from "next";
import Link from "next/link";
import { BarsTable } from "@/components/ui/bars/bars-table";
import { LinkButton } from "@/components/ui/button";
import { Section } from "@/components/ui/sheet";
import { EmptyState } from "@/components/ui/states";
import { orPageState, personForPage } from "@/lib/auth/page";
import { readOwnDesigns } from "@/lib/server/designs/own-designs";

export const metadata: Metadata = { title: "My designs" };

const path = "/my/designs";

export default async function MyDesignsPage() {
  const actor = await personForPage(path);
  const { items } = await orPageState(readOwnDesigns(actor), path);
  return (
    <Section
      id="designs"
      title="My designs"
      level={1}
      aside={<LinkButton href="/my/designs/new">Make a design</LinkButton>}
    >
      {items.length === 0 ? (
        <EmptyState title="None yet">Make a design, give it a revision, and send that in to an open season.</EmptyState>
      ) : (
        <BarsTable
          caption="My designs"
          phone="fold"
          columns={[
            { key: "name", head: "Design" },
            { key: "revisions", head: "Revisions" },
            { key: "entries", head: "Entries" },
          ]}
          rows={items.map((design) => ({
            key: design.designId,
            cells: {
              name: { words: <Link href={`${path}/${design.slug}`}>{design.name}</Link> },
              revisions: { words: design.revisions.map((each) => each.letter).join(", ") || "none yet" },
              entries: {
                words:
                  design.entries
                    .map(
                      (entry) => `${entry.letter} in season ${entry.seasonNumber}: ${entry.state.replaceAll("_", " ")}`,
                    )
                    .join("; ") || "none yet",
              },
            },
          }))}
        />
      )}
    </Section>
  );
}
