import type { Problem } from "@/lib/contracts/base";
import type { ExpectedErrorCode, FieldProblem } from "@/lib/domain/expected-error";
import { errorTable } from "./errors";

export interface ProblemParts {
  code: ExpectedErrorCode | "unexpected";
  detail: string;
  fields?: readonly FieldProblem[];
  requestId: string;
  /** Seconds after which trying again may help; sent as Retry-After. */
  retryAfterSeconds?: number;
}

/** A refusal as RFC 9457 has it. `type` is a stable name; the page behind it explains the codes. */
export function problem({ code, detail, fields = [], requestId, retryAfterSeconds }: ProblemParts): Response {
  const { status, title } = errorTable[code];
  const body: Problem = { type: `/docs/api#${code}`, title, status, detail, code, fields: [...fields], requestId };
  return new Response(JSON.stringify(body), {
    status,
    headers: {
      "content-type": "application/problem+json",
      "cache-control": "private, no-store",
      "x-request-id": requestId,
      ...(retryAfterSeconds !== undefined && { "retry-after": String(Math.ceil(retryAfterSeconds)) }),
      ...(status === 401 && { "www-authenticate": "Cookie" }),
    },
  });
}
