"use client";

import Link from "next/link";
import { useRouter } from "next/navigation";
import { ActForm } from "@/components/ui/act/act-form";
import { Fold } from "@/components/ui/fold";
import { useSaveSearch } from "@/lib/client/saved";
import type { SavedSearch } from "@/lib/contracts/saved";
import { SearchList } from "./search-list";

export type SaveSearchProps = {
  /** Null for somebody signed out. */
  saved: readonly SavedSearch[] | null;
  /** The index's address as it stands. */
  address: string;
  /** The search in words, as it is called until somebody names it. */
  name: string;
};

/** Under the list: what one has saved, and the search that stands, to be saved under a name. */
export function SaveSearch({ saved, address, name }: SaveSearchProps) {
  const router = useRouter();
  const { mutate, isPending, error } = useSaveSearch();
  if (saved === null) {
    return (
      <p className="screen-only small-print mt-3">
        <Link href={`/sign-in?to=${encodeURIComponent(address)}`}>Sign in</Link> to save this search. Its address alone
        brings it back too.
      </p>
    );
  }
  const known = saved.find((each) => each.address === address);
  return (
    <Fold
      title={saved.length > 0 ? `Saved searches (${saved.length})` : "Save this search"}
      className="screen-only mt-3"
    >
      {known ? (
        <p className="mb-3">This search is saved as “{known.name}”.</p>
      ) : (
        <ActForm
          key={address}
          label="Save this search"
          fields={[{ name: "name", label: "Name of this search", defaultValue: name }]}
          work={{
            isPending,
            error,
            mutate: (values, { onSuccess }) => mutate({ ...values, address }, { onSuccess: () => onSuccess() }),
          }}
          words="Save this search"
          busyWords="Saving …"
          doneWords="Saved."
          onDone={() => router.refresh()}
        />
      )}
      {saved.length > 0 ? <SearchList items={saved.slice(0, 10)} /> : null}
      {saved.length > 10 ? (
        <p className="mt-2">
          <Link href="/my/searches">All {saved.length} saved searches</Link>
        </p>
      ) : null}
    </Fold>
  );
}
