import { createHash } from "node:crypto";
import { appDb } from "@/db/client/handles";
import { releaseKey, storeAnswer, takeKey } from "@/db/queries/idempotency";
import { ExpectedError } from "@/lib/domain/expected-error";

export interface Answer {
  status: number;
  body: unknown;
}

/**
 * Does a piece of work once for a person's key: a second press gets the first one's answer. A refusal frees the key,
 * since nothing was done.
 *
 * @param what the request in full (method, address, body), so that a key isn't used for another
 * @throws ExpectedError `moved_on` while the first is at work, `already_there` when the key belongs to another request
 */
export async function once(
  { personId, key, what }: { personId: string; key: string; what: string },
  work: () => Promise<Answer>,
): Promise<Answer> {
  const requestSha256 = createHash("sha256").update(what).digest("hex");
  const found = await takeKey(appDb(), { personId, key, requestSha256, staleS: 60 });
  if (found) {
    if (found.requestSha256 !== requestSha256) {
      throw new ExpectedError("already_there", "This Idempotency-Key was used for another request.");
    }
    if (found.status === null) throw new ExpectedError("moved_on", "The same request is being worked on already.");
    return { status: found.status, body: found.body ?? undefined };
  }
  const answer = await work().catch(async (error: unknown) => {
    await releaseKey(appDb(), { personId, key });
    throw error;
  });
  await storeAnswer(appDb(), { personId, key, ...answer });
  return answer;
}
