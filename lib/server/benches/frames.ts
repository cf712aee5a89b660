import { appDb } from "@/db/client/handles";
import type { Handle } from "@/db/client/connect";
import {
  frameKeyTaken,
  framesWithUse,
  holdFrame,
  insertFrame,
  updateFrame,
  type FrameRow,
  type FrameWithUse,
} from "@/db/queries/host-frames";
import { hostFrames, type FrameFigures, type HostFrame } from "@/lib/contracts/frames-admin";
import type { Actor } from "@/lib/domain/accounts/actor";
import { ExpectedError } from "@/lib/domain/expected-error";
import { formatFrame } from "@/lib/format/frames";
import { countWords, listWords } from "@/lib/format/words";
import { note, type Asked } from "../audit/audit";
import { demand } from "../permission";

const subjectKind = "frame";

/** Why a frame's figures stand as they are; null while they can be changed. */
function whyFrozen({ seasons, sentIn }: FrameWithUse): string | null {
  const uses = [
    ...(seasons.length > 0 ? [`${listWords(seasons)} opened with it`] : []),
    ...(sentIn > 0 ? [`${countWords(sentIn, "revision")} ${sentIn === 1 ? "was" : "were"} sent in for it`] : []),
  ];
  return uses.length === 0 ? null : listWords(uses);
}

function view(frame: FrameWithUse): HostFrame {
  const { id, key, classMm, seasons: _seasons, sentIn: _sentIn, ...figures } = frame;
  const frameClass = String(classMm) as HostFrame["figures"]["frameClass"];
  return { id, key, frozen: whyFrozen(frame), figures: { ...figures, frameClass, word: key.split("-")[1] ?? "" } };
}

/** Every frame with its figures and what stands on them, for the host; the smallest first. */
export async function readHostFrames(actor: Actor): Promise<{ items: HostFrame[] }> {
  demand(actor, "bench.manage");
  return hostFrames.parse({ items: (await framesWithUse(appDb())).map(view) });
}

/** Class by depth in whole millimetres, such as "120x25"; a word tells frames apart that have both alike. */
function rowOf({ frameClass, word, ...figures }: FrameFigures): Omit<FrameRow, "id"> {
  const key = `${frameClass}x${Math.round(figures.depthMm)}${word === "" ? "" : `-${word}`}`;
  return { ...figures, classMm: Number(frameClass), key };
}

async function demandFreeKey(db: Handle, key: string, besides?: string): Promise<void> {
  if (!(await frameKeyTaken(db, { key, ...(besides !== undefined && { besides }) }))) return;
  throw new ExpectedError("already_there", `There is a frame ${formatFrame(key)} already.`, [
    { path: "word", message: "is needed: another frame has this class, depth and word" },
  ]);
}

/** Adds a frame; the fit page has it at once. @throws ExpectedError already_there for a name that another frame has */
export async function addFrame(asked: Asked, figures: FrameFigures): Promise<{ id: string }> {
  demand(asked.actor, "bench.manage");
  return appDb().transaction(async (tx) => {
    const row = rowOf(figures);
    await demandFreeKey(tx, row.key);
    const id = await insertFrame(tx, row);
    await note(tx, asked, { action: "frame.add", subjectKind, subjectId: id, after: row });
    return { id };
  });
}

/**
 * Changes a frame that no opened season and no revision that was sent in uses.
 * @throws ExpectedError not_found, moved_on saying what uses it, already_there for a name that another frame has
 */
export async function changeFrame(
  asked: Asked,
  { frameId, figures }: { frameId: string; figures: FrameFigures },
): Promise<void> {
  demand(asked.actor, "bench.manage");
  await appDb().transaction(async (tx) => {
    const held = await holdFrame(tx, { frameId });
    const [before] = held ? await framesWithUse(tx, { frameId }) : [];
    if (!before) throw new ExpectedError("not_found", "There is no such frame.");
    const frozen = whyFrozen(before);
    if (frozen !== null) {
      throw new ExpectedError(
        "moved_on",
        `The frame ${formatFrame(before.key)} doesn’t change any more: ${frozen}. Add another one beside it, told apart by a word.`,
      );
    }
    const row = rowOf(figures);
    await demandFreeKey(tx, row.key, frameId);
    await updateFrame(tx, { id: frameId, ...row });
    await note(tx, asked, { action: "frame.change", subjectKind, subjectId: frameId, before, after: row });
  });
}
