"use client";

import Link from "next/link";
import { useRouter } from "next/navigation";
import { ActForm } from "@/components/ui/act/act-form";
import { Fold } from "@/components/ui/fold";
import { useChangeComparison, useDeleteComparison } from "@/lib/client/saved";
import type { SavedComparison } from "@/lib/contracts/saved";
import { formatDate, machineTime } from "@/lib/format/dates";
import { comparisonFields } from "./comparison-fields";
import { CopyLink } from "./copy-link";

/** What is saved, the newest first: open, share, change, delete. */
export function ComparisonList({ items }: { items: readonly SavedComparison[] }) {
  return (
    <ul className="grid gap-5">
      {items.map((item) => (
        <li key={item.id} className="grid gap-1">
          <Saved item={item} />
        </li>
      ))}
    </ul>
  );
}

function Saved({ item }: { item: SavedComparison }) {
  const router = useRouter();
  const change = useChangeComparison(item.id);
  const remove = useDeleteComparison(item.id);
  return (
    <>
      <h2>
        <Link href={item.address}>{item.name}</Link>
      </h2>
      {item.note ? <p className="whitespace-pre-line">{item.note}</p> : null}
      <p className="small-print">
        Saved <time dateTime={machineTime(item.createdAt)}>{formatDate(item.createdAt)}</time>
        {item.sharedAddress ? ". Shared: anybody who has the link may read it." : ". Yours alone."}
      </p>
      {item.sharedAddress ? <CopyLink path={item.sharedAddress} words="Copy the shared link" /> : null}
      <Fold title={`Change or share “${item.name}”`} name={`change-${item.id}`}>
        <ActForm
          key={item.updatedAt}
          label={`Change ${item.name}`}
          fields={comparisonFields({ ...item, shared: item.sharedAddress !== null })}
          work={change}
          words="Save the change"
          busyWords="Saving …"
          onDone={() => router.refresh()}
        >
          {item.sharedAddress ? (
            <p className="small-print">Taken back, the link opens nothing; shared again, it gets another link.</p>
          ) : null}
        </ActForm>
      </Fold>
      <Fold title={`Delete “${item.name}”`} name={`change-${item.id}`}>
        <p className="mb-3">
          It goes for good{item.sharedAddress ? ", and its shared link with it" : ""}. The entries stay as they are.
        </p>
        <ActForm
          label={`Delete ${item.name}`}
          fields={[]}
          work={remove}
          words="Delete this comparison"
          busyWords="Deleting …"
          kind="danger"
          onDone={() => router.refresh()}
        />
      </Fold>
    </>
  );
}
