"use client";

import Link from "next/link";
import { useRouter } from "next/navigation";
import { Button } from "@/components/ui/button";
import { useDeleteSearch } from "@/lib/client/saved";
import type { SavedSearch } from "@/lib/contracts/saved";
import { formatDate, machineTime } from "@/lib/format/dates";

/** Saved searches, the newest first: each opens the index as it was asked, and can be deleted. */
export function SearchList({ items }: { items: readonly SavedSearch[] }) {
  return (
    <ul className="mt-3 grid gap-2">
      {items.map((item) => (
        <Saved key={item.id} item={item} />
      ))}
    </ul>
  );
}

function Saved({ item }: { item: SavedSearch }) {
  const router = useRouter();
  const remove = useDeleteSearch(item.id);
  return (
    <li className="flex flex-wrap items-baseline gap-x-4">
      <Link href={item.address}>{item.name}</Link>
      <span className="small-print">
        saved <time dateTime={machineTime(item.createdAt)}>{formatDate(item.createdAt)}</time>
      </span>
      <Button
        kind="quiet"
        small
        busy={remove.isPending}
        busyWords="Deleting …"
        onClick={() => remove.mutate({}, { onSuccess: () => router.refresh() })}
      >
        Delete<span className="sr-only"> the search {item.name}</span>
      </Button>
      {remove.error ? (
        <span role="alert" className="field-error">
          {remove.error.detail}
        </span>
      ) : null}
    </li>
  );
}
