import type { Handle } from "../../client/connect";

export interface SharedComparisonRow {
  name: string;
  note: string;
  address: string;
  sharedAt: Date;
  handle: string;
}

/** What a key opens to anybody; undefined for a key that was taken back or never given. */
export async function shownSharedComparison(
  db: Handle,
  { key }: { key: string },
): Promise<SharedComparisonRow | undefined> {
  return db("shown.shared_comparison").where({ share_key: key }).first<SharedComparisonRow | undefined>({
    name: "name",
    note: "note",
    address: "address",
    sharedAt: "shared_at",
    handle: "handle",
  });
}
