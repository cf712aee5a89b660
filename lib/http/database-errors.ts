import { ExpectedError, type ExpectedErrorCode } from "@/lib/domain/expected-error";

/** What the PostgreSQL driver puts on its errors; values of rows stand in some of the rest, so nothing else is read. */
interface DatabaseError extends Error {
  code: string;
  severity: string;
  routine?: string;
  constraint?: string;
  table?: string;
}

export function isDatabaseError(error: unknown): error is DatabaseError {
  return error instanceof Error && "severity" in error && "code" in error && typeof error.code === "string";
}

/** SQLSTATE (PostgreSQL 15, appendix A) → code and words for people. */
const table: Readonly<Record<string, { code: ExpectedErrorCode; detail: string }>> = {
  "23505": { code: "already_there", detail: "There is one like it already." },
  "23P01": { code: "already_there", detail: "It overlaps one that is there already." },
  "23503": { code: "moved_on", detail: "Something that this points at isn't there, or is still in use." },
  "23001": { code: "moved_on", detail: "That can't be changed any more." },
  "23514": { code: "malformed", detail: "A value lies outside what can be kept." },
  "23502": { code: "malformed", detail: "A value that is needed is missing." },
  "22P02": { code: "malformed", detail: "A value can't be read as what it should be." },
  "22003": { code: "malformed", detail: "A number is too large to be kept." },
  "22021": { code: "malformed", detail: "The text has characters that can't be kept." },
  "22P05": { code: "malformed", detail: "The text has characters that can't be kept." },
  "40001": {
    code: "moved_on",
    detail: "Somebody else changed it at the same time. Load it again and repeat the step.",
  },
  "40P01": {
    code: "moved_on",
    detail: "Somebody else changed it at the same time. Load it again and repeat the step.",
  },
  "55P03": { code: "moved_on", detail: "Somebody else is changing it right now. Try again in a moment." },
  "42501": { code: "forbidden", detail: "That isn't allowed." },
  "53300": { code: "unavailable", detail: "The database has no connection free. Try again in a moment." },
  "57P01": { code: "unavailable", detail: "The database is restarting. Try again in a moment." },
  "57P03": { code: "unavailable", detail: "The database is starting. Try again in a moment." },
};

/** Our own triggers word their refusals for people; PostgreSQL's own messages may quote values and stay inside. */
const raisedByUs = (error: DatabaseError) => error.routine === "exec_stmt_raise";

/**
 * The refusal that a database error stands for; undefined when it is our fault. A missing right of the application's
 * database role (42501 that no trigger of ours raised) is our fault as well.
 */
export function fromDatabaseError(error: unknown): ExpectedError | undefined {
  if (!isDatabaseError(error)) return undefined;
  const found = table[error.code];
  if (!found) return undefined;
  if (!raisedByUs(error)) return error.code === "42501" ? undefined : new ExpectedError(found.code, found.detail);
  // knex puts the statement before the server's words and joins them by " - ".
  const words = error.message.slice(error.message.lastIndexOf(" - ") + 1).replace(/^- /, "");
  return new ExpectedError(found.code, words === "" ? found.detail : sentence(words));
}

function sentence(words: string): string {
  return `${words.charAt(0).toUpperCase()}${words.slice(1)}${/[.!?]$/.test(words) ? "" : "."}`;
}
