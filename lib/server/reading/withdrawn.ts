import { publicDb } from "@/db/client/handles";
import { nothingLeftOf } from "@/db/queries/shown/sheet-parts";

const sheetPath = /^\/designs\/([a-z0-9-]{1,80})(?:\/[A-Za-z]{1,3})?\/?$/;

/** Whether a path is the address of a sheet of which a stub is left, so that the answer is 410 and not 200. */
export async function isWithdrawnSheet(path: string): Promise<boolean> {
  const slug = sheetPath.exec(path)?.[1];
  return slug !== undefined && (await nothingLeftOf(publicDb(), { slug }));
}
