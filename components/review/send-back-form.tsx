"use client";

import { useRouter } from "next/navigation";
import { useState, type FormEvent } from "react";
import { Button } from "@/components/ui/button";
import { Field, TextArea } from "@/components/ui/field";
import { Notice } from "@/components/ui/notice";
import { Slot } from "@/components/ui/slot";
import { useSendBack } from "@/lib/client/review";

type Named = { entryId: string; name: string };

/** Sends entries back to the bench: each ticked one with its own reason. */
export function SendBackForm({ roundId, entries }: { roundId: string; entries: readonly Named[] }) {
  const router = useRouter();
  const work = useSendBack(roundId);
  const [ticked, setTicked] = useState<ReadonlySet<string>>(new Set());
  const [problem, setProblem] = useState<string>();
  const tick = (entryId: string, on: boolean) => {
    setTicked(new Set(on ? [...ticked, entryId] : [...ticked].filter((each) => each !== entryId)));
  };
  const submit = (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    if (work.isPending) return;
    const data = new FormData(event.currentTarget);
    const back = [...ticked].map((entryId) => ({
      entryId,
      reason: String(data.get(`reason ${entryId}`) ?? "").trim(),
    }));
    const note = String(data.get("note") ?? "").trim();
    const missing =
      back.length === 0 ? "Tick the entries that go back." : note === "" ? "Say what is wrong." : undefined;
    const why =
      missing ?? (back.some(({ reason }) => reason === "") ? "Give each ticked entry its reason." : undefined);
    setProblem(why);
    if (why === undefined) work.mutate({ note, entries: back }, { onSuccess: () => router.refresh() });
  };
  const told = problem ?? work.error?.detail;
  return (
    <form aria-label="Send back" onSubmit={submit} noValidate method="post" className="grid max-w-xl gap-3">
      {entries.map(({ entryId, name }) => (
        <div key={entryId} className="grid gap-1">
          <Slot label={`Send back ${name}`} onChange={(event) => tick(entryId, event.currentTarget.checked)} />
          {ticked.has(entryId) ? (
            <Field name={`reason ${entryId}`} label={`Reason for ${name}`} maxLength={1000} />
          ) : null}
        </div>
      ))}
      <TextArea name="note" label="What is wrong" rows={3} maxLength={4000} required />
      {told ? (
        <Notice kind="wrong" title="not done" live="alert">
          <p>{told}</p>
        </Notice>
      ) : null}
      <p>
        <Button type="submit" busy={work.isPending} busyWords="Sending back …">
          Send back
        </Button>
      </p>
    </form>
  );
}
