import { appDb } from "@/db/client/handles";
import { countRequest } from "@/db/queries/throttle";
import { ExpectedError } from "@/lib/domain/expected-error";

/** At most `max` in any `windowS` seconds, by who asks. */
export interface Limit {
  name: string;
  max: number;
  windowS: number;
}

export class TooManyError extends ExpectedError {
  constructor(readonly retryAfterS: number) {
    super("too_many", `That was too often. Try again in ${inWords(retryAfterS)}.`);
  }
}

/**
 * Counts a request against a limit, for all processes together. The window slides: what is left of the window before
 * counts in proportion.
 *
 * @param who what is counted: a person's id, an address, a hashed account
 * @throws TooManyError
 */
export async function takeFromLimit(limit: Limit, who: string): Promise<void> {
  const key = `${limit.name}:${who}`;
  const { count, countBefore, elapsedS } = await countRequest(appDb(), { key, windowS: limit.windowS });
  const left = Math.max(0, 1 - elapsedS / limit.windowS);
  if (count + countBefore * left > limit.max) throw new TooManyError(Math.max(1, limit.windowS - elapsedS));
}

function inWords(seconds: number): string {
  if (seconds < 90) return `${Math.ceil(seconds)} seconds`;
  return seconds < 5400 ? `${Math.ceil(seconds / 60)} minutes` : `${Math.ceil(seconds / 3600)} hours`;
}
