"use client";

import { useRouter } from "next/navigation";
import { useState, useTransition } from "react";
import { Button } from "@/components/ui/button";
import { Fold } from "@/components/ui/fold";
import { Slot, SlotGroup } from "@/components/ui/slot";

export type ColumnsFormProps = {
  options: readonly { key: string; label: string }[];
  shown: readonly string[];
  /** The column sorted by, which always stands. */
  sortedBy: string | undefined;
  /** The rest of the address, to be kept. */
  kept: readonly (readonly [string, string])[];
};

/** Which columns the list shows, as slots; asked for at once where scripts run, else by the button. */
export function ColumnsForm({ options, shown, sortedBy, kept }: ColumnsFormProps) {
  const router = useRouter();
  const [pending, start] = useTransition();
  const [draft, setDraft] = useState<{ over: readonly string[]; keys: readonly string[] }>();
  const chosen = draft?.over === shown ? draft.keys : shown;

  const flip = (key: string) => {
    const wanted = chosen.includes(key) ? chosen.filter((each) => each !== key) : [...chosen, key];
    const keys = options.map((option) => option.key).filter((each) => wanted.includes(each));
    if (keys.length === 0) return;
    setDraft({ over: shown, keys });
    const query = new URLSearchParams([...kept.map(([name, value]) => [name, value]), ["columns", keys.join(",")]]);
    start(() => router.push(`/designs?${query.toString().replaceAll("%2C", ",")}`, { scroll: false }));
  };

  return (
    <Fold title="Columns" className="screen-only mt-3">
      <form action="/designs" method="get" aria-label="Columns of the list" aria-busy={pending}>
        {kept.map(([name, value]) => (
          <input key={`${name} ${value}`} type="hidden" name={name} value={value} />
        ))}
        <SlotGroup legend="Columns of the list" hideLegend>
          {options.map(({ key, label }) => (
            <Slot
              key={key}
              name="columns"
              value={key}
              label={key === sortedBy ? `${label} (sorted by)` : label}
              disabled={key === sortedBy}
              checked={chosen.includes(key)}
              onChange={() => flip(key)}
            />
          ))}
        </SlotGroup>
        <noscript>
          <Button type="submit" small className="mt-2">
            Show these columns
          </Button>
        </noscript>
      </form>
    </Fold>
  );
}
