import { readdir, readFile } from "node:fs/promises";
import path from "node:path";
import PostalMime from "postal-mime";

/** A message that the stand-in kept, as the demo's mail page shows it. */
export interface KeptMail {
  /** Its file name without the ending. */
  id: string;
  from: string;
  to: string[];
  subject: string;
  /** As the message's Date says, in ISO 8601; undefined when it has none. */
  sentAt: string | undefined;
  /** Plain text; empty when the message has only HTML. */
  text: string;
}

const namePattern = /^[0-9TZ.-]+-[0-9a-f]{6}$/;

/**
 * The newest messages, newest first.
 *
 * @param folder where the stand-in keeps them; a missing folder holds none
 * @param to only messages to this address, compared without case
 */
export async function listKeptMail(folder: string, limit = 50, to?: string): Promise<KeptMail[]> {
  const names = await readdir(folder).catch(() => []);
  const ids = names.flatMap((name) => (name.endsWith(".eml") && !name.startsWith(".") ? [name.slice(0, -4)] : []));
  const found: KeptMail[] = [];
  for (const id of ids.sort().reverse()) {
    if (found.length === limit) break;
    const mail = await readKeptMail(folder, id);
    if (mail && (to === undefined || mail.to.some((each) => each.toLowerCase() === to.toLowerCase()))) found.push(mail);
  }
  return found;
}

/** One message by its id; undefined when there is none of that id. */
export async function readKeptMail(folder: string, id: string): Promise<KeptMail | undefined> {
  if (!namePattern.test(id)) return undefined;
  const bytes = await readFile(path.join(folder, `${id}.eml`)).catch(() => undefined);
  if (bytes === undefined) return undefined;
  const parsed = await PostalMime.parse(bytes);
  return {
    id,
    from: parsed.from?.address ?? "",
    to: (parsed.to ?? []).flatMap((each) => each.address ?? []),
    subject: parsed.subject ?? "",
    sentAt: parsed.date,
    text: parsed.text?.trim() ?? "",
  };
}
