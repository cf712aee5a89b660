import type { Metadata } from "next";
import Link from "next/link";
import { BarsTable } from "@/components/ui/bars/bars-table";
import { Section } from "@/components/ui/sheet";
import { EmptyState } from "@/components/ui/states";
import { orPageState, personForPage } from "@/lib/auth/page";
import { formatDateTime } from "@/lib/format/dates";
import { readReviewList } from "@/lib/server/review/review-access";

export const metadata: Metadata = { title: "Review" };

export default async function ReviewPage() {
  const actor = await personForPage("/review");
  const { items } = await orPageState(readReviewList(actor), "/review");
  return (
    <Section id="review" title="Review" level={1} note="Rounds before their hour.">
      {items.length === 0 ? (
        <EmptyState title="Nothing waits for review">
          A round stands here once it is being measured; a member sees those that the host lent to them.
        </EmptyState>
      ) : (
        <BarsTable
          caption="Rounds before their hour"
          phone="fold"
          columns={[
            { key: "round", head: "Round" },
            { key: "state", head: "State" },
            { key: "entries", head: "Entries" },
            { key: "hour", head: "Publish at" },
          ]}
          rows={items.map((item) => ({
            key: item.roundId,
            cells: {
              round: {
                words: item.closedWhy ? (
                  `Season ${item.seasonNumber}, round ${item.number}: ${item.closedWhy}`
                ) : (
                  <Link href={`/review/${item.roundId}`}>
                    Season {item.seasonNumber}, round {item.number}
                  </Link>
                ),
              },
              state: { words: `${item.state.replaceAll("_", " ")}${item.lent ? ", lent to you" : ""}` },
              entries: { words: String(item.entries) },
              hour: item.publishAt
                ? { words: formatDateTime(item.publishAt) }
                : { figure: { value: null, why: "no hour is set" } },
            },
          }))}
        />
      )}
    </Section>
  );
}
