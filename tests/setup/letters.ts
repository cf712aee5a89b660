import { afterAll, beforeAll, vi } from "vitest";
import { adoptEnvironment } from "@/lib/env/env";
import { listKeptMail, type KeptMail } from "@/lib/services/mail/kept";
import { mailer } from "@/lib/services/mail/from-env";
import { startMailStandIn } from "@/lib/services/mail/stand-in";
import { rmSync } from "node:fs";
import { temporaryFolder } from "./temporary-folder";

export interface Letters {
  /** The newest letter to an address whose subject holds these words; waits until it is there. */
  newest(to: string, subject: string): Promise<KeptMail>;
  /** How many letters an address has by now. */
  count(to: string): Promise<number>;
}

/** A mail server of the test file's own that keeps what is sent. */
export function setUpLetters(): Letters {
  const folder = temporaryFolder("letters");
  let close: (() => Promise<void>) | undefined;
  beforeAll(async () => {
    const standIn = await startMailStandIn(folder);
    close = standIn.close;
    adoptEnvironment({ SMTP_URL: standIn.url });
  });
  afterAll(async () => {
    mailer().close();
    await close?.();
    rmSync(folder, { recursive: true, force: true });
  });
  return {
    newest: (to, subject) =>
      vi.waitFor(async () => {
        const found = (await listKeptMail(folder, 50, to)).find((letter) => letter.subject.includes(subject));
        if (!found) throw new Error(`No letter "${subject}" for ${to} yet.`);
        return found;
      }, 20_000),
    count: async (to) => (await listKeptMail(folder, 50, to)).length,
  };
}

/** The token in a letter's link. */
export function tokenOf(letter: KeptMail): string {
  const token = /\?token=([A-Za-z0-9_-]+)/.exec(letter.text)?.[1];
  if (token === undefined) throw new Error(`The letter "${letter.subject}" has no link.`);
  return token;
}
