import type { ExpectedErrorCode } from "@/lib/domain/expected-error";

/** The one table of refusals: code → HTTP status and the title of the problem body. */
export const errorTable: Readonly<Record<ExpectedErrorCode | "unexpected", { status: number; title: string }>> = {
  not_signed_in: { status: 401, title: "Not signed in" },
  forbidden: { status: 403, title: "Not allowed" },
  not_found: { status: 404, title: "Not found" },
  gone: { status: 410, title: "Gone" },
  malformed: { status: 400, title: "Can't be read as sent" },
  moved_on: { status: 409, title: "It has moved on" },
  already_there: { status: 409, title: "Already there" },
  too_large: { status: 413, title: "Too large" },
  wrong_kind: { status: 415, title: "Wrong kind" },
  impossible: { status: 422, title: "Can't be" },
  too_many: { status: 429, title: "Too many requests" },
  unavailable: { status: 503, title: "Not available just now" },
  unexpected: { status: 500, title: "Our fault" },
};
