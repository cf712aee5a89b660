import path from "node:path";
import { env } from "@/lib/env/env";
import { listKeptMail, type KeptMail } from "@/lib/services/mail/kept";
import { ExpectedError } from "@/lib/domain/expected-error";

/**
 * The letters that the loopback demo sent, newest first: its stand-in delivers none.
 *
 * @param to only letters to this address
 * @throws ExpectedError `not_found` everywhere but in the demo
 */
export async function readDemoMail(to?: string): Promise<KeptMail[]> {
  const { FANFOLD_DEMO, DATA_DIR } = env();
  if (!FANFOLD_DEMO || DATA_DIR === undefined) {
    throw new ExpectedError("not_found", "There is nothing at this address.");
  }
  return listKeptMail(path.join(DATA_DIR, "mail"), 50, to);
}

/** Whether the loopback demo is served, for the notes that pages carry then. */
export function isDemo(): boolean {
  return env().FANFOLD_DEMO;
}
