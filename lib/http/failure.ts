import { ExpectedError } from "@/lib/domain/expected-error";
import { log } from "@/lib/server/log";
import { TooManyError } from "@/lib/server/throttle/limit";
import { fromDatabaseError } from "./database-errors";
import { problem } from "./problem";

/** Answers a failure: what a person can cause in words, all else opaquely, with the request's id to ask about it. */
export function answerFailure(error: unknown, request: { method: string; path: string; requestId: string }): Response {
  const { requestId } = request;
  const expected = error instanceof ExpectedError ? error : fromDatabaseError(error);
  if (expected) {
    log().info({ ...request, code: expected.code }, "refused");
    const retryAfterSeconds = expected instanceof TooManyError ? expected.retryAfterS : undefined;
    return problem({
      code: expected.code,
      detail: expected.detail,
      fields: expected.fields,
      requestId,
      ...(retryAfterSeconds !== undefined && { retryAfterSeconds }),
    });
  }
  log().error({ ...request, err: error }, "failed");
  const detail = `Something went wrong on our side. If it happens again, tell the host this number: ${requestId}.`;
  return problem({ code: "unexpected", detail, requestId });
}
