import { Refusal } from "@/lib/science/refusal";

/** A refusal that arises on the command line itself: arguments, files that can't be opened. */
export class ReadError extends Refusal {}

/** One line of JSON for standard error: `{code, message, at?}`. */
export function failureLine(error: unknown): string {
  if (error instanceof Refusal) {
    const { code, message, at } = error;
    return JSON.stringify(at === undefined ? { code, message } : { code, message, at });
  }
  return JSON.stringify({ code: "internal", message: error instanceof Error ? error.message : String(error) });
}

/** Exit status for an error: 2 for bad input, 1 for a fault of ours. */
export function failureStatus(error: unknown): number {
  return error instanceof Refusal ? 2 : 1;
}

/** Why a file can't be read: the system's word without its path, which the caller knows. */
export function unreadableReason(error: unknown): string {
  const code = error instanceof Error && "code" in error ? String(error.code) : "unknown";
  return { ENOENT: "there is no such file", EISDIR: "it is a folder", EACCES: "it may not be read" }[code] ?? code;
}
