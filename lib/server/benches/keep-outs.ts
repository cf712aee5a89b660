import { appDb } from "@/db/client/handles";
import type { Handle } from "@/db/client/connect";
import {
  benchVersionUse,
  deleteKeepOut,
  insertKeepOut,
  keepOutHead,
  keepOutsOf,
  type BenchVersionUse,
  type NewKeepOut,
} from "@/db/queries/keep-outs";
import type { BenchKeepOuts, NewKeepOutBox } from "@/lib/contracts/keep-outs";
import type { Actor } from "@/lib/domain/accounts/actor";
import { ExpectedError } from "@/lib/domain/expected-error";
import { listWords } from "@/lib/format/words";
import { note, type Asked } from "../audit/audit";
import { demand } from "../permission";

/** Each is compared with every model on the fit page, so that they stay few. */
const mostSolids = 40;
const subjectKind = "keep_out";

/** Why a bench version's solids stand as they are; null while they can be changed. */
function whyFrozen({ seasons, published }: BenchVersionUse): string | null {
  const uses = [
    ...(seasons.length > 0 ? [`${listWords(seasons)} opened on this bench version`] : []),
    ...(published ? ["figures measured on it are published"] : []),
  ];
  if (uses.length === 0) return null;
  return `What stands around this cooler doesn’t change any more: ${uses.join(", and ")}. Add a new version of the bench; it begins with these solids.`;
}

/** Keep-out solids of a bench version, for the host. @throws ExpectedError not_found */
export async function readKeepOuts(
  actor: Actor,
  { benchVersionId }: { benchVersionId: string },
): Promise<BenchKeepOuts> {
  demand(actor, "bench.manage");
  const use = await benchVersionUse(appDb(), { benchVersionId });
  if (!use) throw new ExpectedError("not_found", "There is no such bench version.");
  return { frozen: whyFrozen(use), items: await keepOutsOf(appDb(), { benchVersionId }) };
}

/** Holds the bench version. @throws ExpectedError not_found, moved_on once something stands on it */
async function demandChangeable(db: Handle, benchVersionId: string, lock: boolean): Promise<void> {
  const use = await benchVersionUse(db, { benchVersionId, lock });
  if (!use) throw new ExpectedError("not_found", "There is no such bench version.");
  const frozen = whyFrozen(use);
  if (frozen !== null) throw new ExpectedError("moved_on", frozen);
}

/**
 * Whether a solid of this name may be added to a bench version; asked before a long reading as within the transaction.
 * @throws ExpectedError not_found, moved_on once something stands on the version, already_there, impossible beyond 40
 */
export async function demandRoom(
  db: Handle,
  { benchVersionId, name, lock = false }: { benchVersionId: string; name: string; lock?: boolean },
): Promise<void> {
  await demandChangeable(db, benchVersionId, lock);
  const there = await keepOutsOf(db, { benchVersionId });
  if (there.some((each) => each.name === name)) {
    throw new ExpectedError("already_there", `There is a solid called ${name} already.`, [
      { path: "name", message: "is another solid’s name on this bench version" },
    ]);
  }
  if (there.length >= mostSolids)
    throw new ExpectedError("impossible", `A bench version has at most ${mostSolids} solids: take one off first.`);
}

/** Adds a solid within the caller's transaction, with its audit row. @throws as {@link demandRoom} */
export async function addSolid(tx: Handle, asked: Asked, solid: NewKeepOut): Promise<{ id: string }> {
  const { benchVersionId, name } = solid;
  await demandRoom(tx, { benchVersionId, name, lock: true });
  const id = await insertKeepOut(tx, solid);
  await note(tx, asked, { action: "keep_out.add", subjectKind, subjectId: id, after: solid });
  return { id };
}

/** Adds a box in cooler coordinates, mm. @throws as {@link demandRoom} */
export async function addKeepOutBox(
  asked: Asked,
  { benchVersionId, box }: { benchVersionId: string; box: NewKeepOutBox },
): Promise<{ id: string }> {
  demand(asked.actor, "bench.manage");
  return appDb().transaction((tx) => addSolid(tx, asked, { benchVersionId, shape: "box", ...box }));
}

/** Takes a solid off its bench version. @throws ExpectedError not_found, moved_on once something stands on the version */
export async function dropKeepOut(asked: Asked, { keepOutId }: { keepOutId: string }): Promise<void> {
  demand(asked.actor, "bench.manage");
  await appDb().transaction(async (tx) => {
    const solid = await keepOutHead(tx, { keepOutId });
    if (!solid) throw new ExpectedError("not_found", "There is no such solid.");
    await demandChangeable(tx, solid.benchVersionId, true);
    await deleteKeepOut(tx, { keepOutId });
    await note(tx, asked, { action: "keep_out.drop", subjectKind, subjectId: keepOutId, before: solid });
  });
}
