"use client";

import { useRouter } from "next/navigation";
import { ActForm } from "@/components/ui/act/act-form";
import { useMoveOwnEntry, useSendIn } from "@/lib/client/own-designs";
import type { OwnChoices, OwnEntry } from "@/lib/contracts/own-designs";

/** Sends a revision in to a season that takes entries. */
export function SendInForm(props: { slug: string; letter: string; seasons: OwnChoices["seasons"] }) {
  const { slug, letter, seasons } = props;
  const router = useRouter();
  const work = useSendIn(slug);
  return (
    <ActForm
      label={`Send revision ${letter} in`}
      fields={[
        {
          name: "seasonId",
          label: "Season",
          kind: "choice",
          options: seasons.map(({ seasonId, title }) => ({ value: seasonId, label: title })),
          hint: "What was sent in doesn't change: a change is the next revision.",
        },
      ]}
      work={work}
      more={{ letter }}
      words={`Send in revision ${letter}`}
      busyWords="Sending in …"
      onDone={() => router.refresh()}
    />
  );
}

/** Sends an entry in again, or withdraws it. */
export function OwnMoveForm({ slug, entry, to }: { slug: string; entry: OwnEntry; to: "sent_in" | "withdrawn" }) {
  const router = useRouter();
  const words = to === "sent_in" ? `Send ${entry.letter} in again` : `Withdraw ${entry.letter}`;
  return (
    <ActForm
      label={words}
      fields={[]}
      work={useMoveOwnEntry(slug, entry.entryId)}
      more={{ from: entry.state, to }}
      words={words}
      busyWords="Moving …"
      kind={to === "withdrawn" ? "danger" : "outline"}
      onDone={() => router.refresh()}
    />
  );
}
