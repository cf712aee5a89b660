import pino, { type Logger } from "pino";
import { env } from "@/lib/env/env";

let opened: Logger | undefined;

/** The process's log: one JSON line an event, with request ids; never bodies, addresses of mail, or secrets. */
export function log(): Logger {
  opened ??= pino({ level: env().LOG_LEVEL, base: undefined, serializers: { err: describeError } });
  return opened;
}

/**
 * An error for the log. A database's message quotes statements and values, so of those only the state, names and the
 * place in our code are kept.
 */
export function describeError(error: unknown): Record<string, unknown> {
  if (!(error instanceof Error)) return { type: typeof error };
  const frames = (error.stack ?? "").split("\n").filter((line) => line.startsWith("    at "));
  if ("severity" in error && "code" in error) {
    const { code, table, constraint, routine } = error as Error & Record<string, unknown>;
    return { type: "DatabaseError", code, table, constraint, routine, frames };
  }
  const cause = error.cause instanceof Error ? describeError(error.cause) : undefined;
  return { type: error.name, message: error.message, frames, ...(cause && { cause }) };
}
