"use client";

import { useState } from "react";
import { Slot } from "@/components/ui/slot";
import { StatusLine } from "@/components/ui/status-line";
import { useMailChoices } from "@/lib/client/accounts";
import { mailTopics, type MailChoices, type MailTopic } from "@/lib/contracts/accounts";

const words: Record<MailTopic, string> = {
  entry_state: "An entry of mine moves on",
  questions: "A question about my figures, or an answer to mine",
  corrections: "A correction of a sheet that I own or watch",
  seasons: "A season opens or closes",
  watched: "A design that I watch gets a new sheet",
};

/** What to be told by mail; each slot is kept as soon as it is pressed. */
export function MailChoicesForm({ start }: { start: MailChoices }) {
  const [choices, setChoices] = useState(start);
  const mutation = useMailChoices();
  const choose = (topic: MailTopic, wanted: boolean) => {
    const before = choices;
    const next = { ...choices, [topic]: wanted };
    setChoices(next);
    mutation.mutate(next, { onError: () => setChoices(before) });
  };
  return (
    <fieldset>
      <legend className="sr-only">Tell me by mail when</legend>
      <div className="grid gap-2">
        {mailTopics.map((topic) => (
          <Slot
            key={topic}
            label={words[topic]}
            checked={choices[topic]}
            onChange={(event) => choose(topic, event.currentTarget.checked)}
          />
        ))}
      </div>
      <StatusLine>
        {mutation.isError
          ? mutation.error.detail
          : mutation.isPending
            ? "Keeping …"
            : mutation.isSuccess
              ? "Kept."
              : ""}
      </StatusLine>
    </fieldset>
  );
}
