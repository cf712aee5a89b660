import { randomBytes } from "node:crypto";
import { appDb, publicDb } from "@/db/client/handles";
import {
  comparisonRow,
  comparisonRows,
  countSaved,
  deleteSaved,
  insertComparison,
  updateComparison,
  type SavedComparisonRow,
} from "@/db/queries/saved";
import { shownSharedComparison } from "@/db/queries/shown/shared-comparison";
import {
  savedMost,
  type ComparisonChange,
  type NewComparison,
  type SavedComparison,
  type SharedComparison,
} from "@/lib/contracts/saved";
import type { Actor } from "@/lib/domain/accounts/actor";
import { ExpectedError } from "@/lib/domain/expected-error";
import { demand } from "../permission";
import { findEntries } from "../reading/find-entries";

/** 16 bytes of the system's own randomness: a link that nobody finds by trying. */
const newKey = () => randomBytes(16).toString("base64url");
const none = () => new ExpectedError("not_found", "You saved no such comparison.");

function view({ shareKey, createdAt, updatedAt, ...row }: SavedComparisonRow): SavedComparison {
  return {
    ...row,
    sharedAddress: shareKey === null ? null : `/compare/shared/${shareKey}`,
    createdAt: createdAt.toISOString(),
    updatedAt: updatedAt.toISOString(),
  };
}

/** One's own saved comparisons, the newest first. */
export async function readComparisons(actor: Actor): Promise<{ items: SavedComparison[] }> {
  demand(actor, "comparison.own");
  return { items: (await comparisonRows(appDb(), { personId: actor.personId })).map(view) };
}

/** @throws ExpectedError not_found for another's as for none */
export async function readComparison(actor: Actor, { id }: { id: string }): Promise<SavedComparison> {
  demand(actor, "comparison.own");
  const row = await comparisonRow(appDb(), { personId: actor.personId, id });
  if (!row) throw none();
  return view(row);
}

/** @throws ExpectedError malformed where the address names nothing public, too_many beyond what one person keeps */
export async function saveComparison(actor: Actor, input: NewComparison): Promise<SavedComparison> {
  demand(actor, "comparison.own");
  const { shared, ...values } = input;
  const named = (new URLSearchParams(input.address.split("?")[1]).get("entries") ?? "").split(",");
  const { entries } = await findEntries({ named });
  if (entries.length === 0) {
    throw new ExpectedError("malformed", "None of the entries of this comparison is public.", [
      { path: "address", message: "names nothing that is public" },
    ]);
  }
  await demandRoom("saved_comparison", actor.personId);
  const shareKey = shared ? newKey() : null;
  return view(await insertComparison(appDb(), { ...values, personId: actor.personId, shareKey }));
}

/** Refuses one more than a person keeps. */
export async function demandRoom(table: "saved_comparison" | "saved_search", personId: string): Promise<void> {
  if ((await countSaved(appDb(), { table, personId })) < savedMost) return;
  throw new ExpectedError("too_many", `You keep ${savedMost} of them, and no more fit: delete one first.`);
}

/** Writes name, note and whether it is shared. Shared again after it was not, it gets a new link. */
export async function changeComparison(
  actor: Actor,
  { id }: { id: string },
  { shared, ...values }: ComparisonChange,
): Promise<SavedComparison> {
  demand(actor, "comparison.own");
  const { personId } = actor;
  return appDb().transaction(async (tx) => {
    const row = await comparisonRow(tx, { personId, id });
    if (!row) throw none();
    await updateComparison(tx, { ...values, personId, id, shareKey: shared ? (row.shareKey ?? newKey()) : null });
    const changed = await comparisonRow(tx, { personId, id });
    if (!changed) throw none();
    return view(changed);
  });
}

export async function deleteComparison(actor: Actor, { id }: { id: string }): Promise<void> {
  demand(actor, "comparison.own");
  if (!(await deleteSaved(appDb(), { table: "saved_comparison", personId: actor.personId, id }))) throw none();
}

/** What a share link opens, for anybody. @throws ExpectedError not_found for a key taken back as for none */
export async function readSharedComparison({ key }: { key: string }): Promise<SharedComparison> {
  const row = await shownSharedComparison(publicDb(), { key });
  if (!row) throw new ExpectedError("not_found", "Nothing is shared under this address, or not any more.");
  const { handle, sharedAt, ...rest } = row;
  return { ...rest, by: handle, sharedAt: sharedAt.toISOString() };
}
