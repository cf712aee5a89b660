import type { Metadata } from "next";
import { LedgerView } from "@/components/method/ledger";
import { Section } from "@/components/ui/sheet";
import { readCorrections } from "@/lib/server/reading/read-corrections";

export const metadata: Metadata = {
  title: "Corrections",
  description: "The ledger: what was wrong, what it is now, what it moved; and questions about figures with answers.",
  alternates: { types: { "application/atom+xml": "/corrections/feed.xml" } },
};

export default async function CorrectionsPage() {
  return (
    <>
      <Section
        id="corrections"
        title="Corrections"
        level={1}
        aside={<a href="/corrections/feed.xml">Follow it as a feed (Atom)</a>}
      >
        <p>
          A raw reading is never changed: a correction supersedes it, shows its whole effect over all entries, rounds
          and seasons before a second person signs it, and the old figures stay readable.
        </p>
      </Section>
      <LedgerView ledger={await readCorrections()} />
    </>
  );
}
