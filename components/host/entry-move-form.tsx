"use client";

import type { ActField } from "@/components/ui/act/act-values";
import { useMoveEntry } from "@/lib/client/host";
import type { HostEntry } from "@/lib/contracts/entries";
import type { EntryState } from "@/lib/domain/designs/entry-moves";
import { Fold } from "@/components/ui/fold";
import { HostForm } from "./host-form";

const acts: Partial<Record<EntryState, string>> = {
  accepted: "Accept",
  returned: "Return",
  declined: "Decline",
  withdrawn: "Withdraw",
  on_the_bench: "Measure again",
  carried_over: "Carry over",
};

export type OtherSeason = { seasonId: string; title: string };

/** The moves that a host may make with an entry now, each folded away with what it asks for. */
export function EntryMoves({ entry, seasons }: { entry: HostEntry; seasons: readonly OtherSeason[] }) {
  return (
    <div className="grid gap-1">
      {entry.moves.map((to) => (
        <MoveForm key={to} entry={entry} to={to} seasons={seasons.filter((each) => each.seasonId !== entry.seasonId)} />
      ))}
    </div>
  );
}

function MoveForm({ entry, to, seasons }: { entry: HostEntry; to: EntryState; seasons: readonly OtherSeason[] }) {
  const work = useMoveEntry(entry.entryId);
  const name = `${entry.designName} ${entry.letter}`;
  const word = acts[to] ?? to;
  const form = (
    <HostForm
      label={`${word} ${name}`}
      fields={fieldsOf(to, seasons)}
      work={work}
      more={{ from: entry.state, to }}
      words={`${word} ${name}`}
      busyWords="Moving …"
      kind={to === "declined" || to === "withdrawn" ? "danger" : "outline"}
    />
  );
  return to === "accepted" ? form : <Fold title={`${word} …`}>{form}</Fold>;
}

function fieldsOf(to: EntryState, seasons: readonly OtherSeason[]): ActField[] {
  if (to === "accepted") return [];
  if (to === "carried_over") {
    return [
      {
        name: "seasonId",
        label: "To season",
        kind: "choice",
        options: seasons.map(({ seasonId, title }) => ({ value: seasonId, label: title })),
        hint: "A new entry that points back; its designer sends it in.",
      },
    ];
  }
  const hint = to === "withdrawn" ? "Stands in public on the stub." : "The designer reads it.";
  return [{ name: "reason", label: "Reason", kind: "area", hint, optional: to === "on_the_bench" }];
}
