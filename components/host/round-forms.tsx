"use client";

import { useRouter } from "next/navigation";
import { useEffect, useState, useSyncExternalStore } from "react";
import { Button } from "@/components/ui/button";
import { Slot, SlotGroup } from "@/components/ui/slot";
import { StatusLine } from "@/components/ui/status-line";
import { useAddRoundEntries, useEndLoan, useLend, usePublish, useTakeOut } from "@/lib/client/host";
import { HostForm } from "./host-form";

export function LendForm({ roundId, lentTo }: { roundId: string; lentTo: string | null }) {
  const router = useRouter();
  const work = useLend(roundId);
  const end = useEndLoan(roundId);
  return (
    <div className="grid gap-4">
      {lentTo === null ? null : (
        <p className="flex flex-wrap items-center gap-3">
          Lent to {lentTo}.
          <Button
            small
            busy={end.isPending}
            busyWords="Ending …"
            onClick={() => end.mutate(undefined, { onSuccess: () => router.refresh() })}
          >
            End the loan
          </Button>
        </p>
      )}
      <HostForm
        label="Lend the review"
        fields={[{ name: "handle", label: "Handle of the member" }]}
        work={work}
        words="Lend the review"
        busyWords="Lending …"
      />
    </div>
  );
}

export function TakeOutForm({ roundId, entryId, name }: { roundId: string; entryId: string; name: string }) {
  return (
    <HostForm
      label={`Take ${name} out`}
      fields={[{ name: "reason", label: "Reason", hint: "A signed round goes back to review." }]}
      work={useTakeOut(roundId, entryId)}
      words={`Take ${name} out`}
      busyWords="Taking out …"
      kind="danger"
    />
  );
}

export function AddEntriesForm(props: { roundId: string; free: readonly { entryId: string; name: string }[] }) {
  const { roundId, free } = props;
  const [ticked, setTicked] = useState<readonly string[]>([]);
  return (
    <HostForm
      label="Add entries"
      fields={[]}
      work={useAddRoundEntries(roundId)}
      more={{ entryIds: ticked.filter((id) => free.some((each) => each.entryId === id)) }}
      words="Add to the round"
      busyWords="Adding …"
      onDone={() => setTicked([])}
    >
      <SlotGroup legend="Entries that stand in no round" flow="column" hideLegend>
        {free.map(({ entryId, name }) => (
          <Slot
            key={entryId}
            label={name}
            checked={ticked.includes(entryId)}
            onChange={(event) =>
              setTicked(event.currentTarget.checked ? [...ticked, entryId] : ticked.filter((id) => id !== entryId))
            }
          />
        ))}
      </SlotGroup>
    </HostForm>
  );
}

const never = () => () => undefined;

/** Sets the hour in the zone of whoever types it, which is named, or publishes now. */
export function PublishForms({ roundId }: { roundId: string }) {
  // The zone is the browser's own; the server can't know it.
  const zone = useSyncExternalStore(
    never,
    () => Intl.DateTimeFormat().resolvedOptions().timeZone,
    () => "",
  );
  return (
    <div className="grid gap-6">
      <HostForm
        label="Publish at"
        fields={[
          {
            name: "publishAt",
            label: "Date and time",
            kind: "time",
            hint: `In your own time zone${zone === "" ? "" : `, ${zone}`}.`,
          },
        ]}
        work={usePublish(roundId)}
        words="Publish at"
        busyWords="Setting the hour …"
      />
      <HostForm
        label="Publish now"
        fields={[]}
        work={usePublish(roundId)}
        more={{ publishAt: null }}
        words="Publish now"
        busyWords="Handing over …"
      />
    </div>
  );
}

const everyMs = 3_000;

/** While the worker publishes, asks the page again until the state says so. */
export function PublishingNow() {
  const router = useRouter();
  useEffect(() => {
    const timer = setInterval(() => router.refresh(), everyMs);
    return () => clearInterval(timer);
  }, [router]);
  return (
    <StatusLine>The worker is publishing: figures are frozen and standings drawn. You can leave this page.</StatusLine>
  );
}
