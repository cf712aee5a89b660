"use client";

import { useRouter } from "next/navigation";
import { useTransition } from "react";
import { Button } from "@/components/ui/button";
import { Select } from "@/components/ui/field";
import type { SortChoice } from "./sort-choices";

export type SortFormProps = {
  choices: readonly SortChoice[];
  now: string;
  /** The rest of the address, to be kept. */
  kept: readonly (readonly [string, string])[];
};

/** What the list is sorted by, for where no heads stand or they are out of sight; asked for at once where scripts run. */
export function SortForm({ choices, now, kept }: SortFormProps) {
  const router = useRouter();
  const [pending, start] = useTransition();
  const sortBy = (sort: string) => {
    const query = new URLSearchParams([...kept.map(([name, value]) => [name, value]), ["sort", sort]]);
    start(() => router.push(`/designs?${query.toString().replaceAll("%2C", ",")}`, { scroll: false }));
  };
  return (
    <form action="/designs" method="get" className="min-w-0" aria-label="Order of the list" aria-busy={pending}>
      {kept.map(([name, value]) => (
        <input key={`${name} ${value}`} type="hidden" name={name} value={value} />
      ))}
      <Select
        key={now}
        id="index-sort"
        name="sort"
        label="Sort by"
        defaultValue={now}
        options={choices}
        onChange={(event) => sortBy(event.target.value)}
      />
      <noscript>
        <Button type="submit" small className="mt-2">
          Sort
        </Button>
      </noscript>
    </form>
  );
}
