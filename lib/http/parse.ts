import type { z } from "zod";
import { ExpectedError, type FieldProblem } from "@/lib/domain/expected-error";

/** `["runs", 2, "levelDba"]` → `runs[2].levelDba`. */
export function fieldPath(path: readonly PropertyKey[]): string {
  return path.reduce<string>(
    (sofar, part) =>
      typeof part === "number" ? `${sofar}[${part}]` : sofar === "" ? String(part) : `${sofar}.${String(part)}`,
    "",
  );
}

/** What is wrong, field by field; an unknown name is a problem of that name. */
export function fieldProblems(error: z.ZodError): FieldProblem[] {
  return error.issues.flatMap((issue) =>
    issue.code === "unrecognized_keys"
      ? issue.keys.map((key) => ({ path: fieldPath([...issue.path, key]), message: "is not known here" }))
      : [{ path: fieldPath(issue.path), message: issue.message }],
  );
}

/**
 * Parses what was sent.
 *
 * @param what "body" or "query", for the words
 * @throws ExpectedError `malformed` with every wrong field
 */
export function parseSent<T extends z.ZodType>(schema: T, value: unknown, what: "body" | "query"): z.output<T> {
  const parsed = schema.safeParse(value);
  if (parsed.success) return parsed.data;
  const fields = fieldProblems(parsed.error);
  const named = fields.map(({ path, message }) => `${path || what}: ${message}`).join("; ");
  throw new ExpectedError("malformed", `The ${what} can't be used: ${named}`, fields);
}

/** An address whose changing parts can't be ids or slugs leads nowhere. */
export function parseParams<T extends z.ZodType>(schema: T, value: unknown): z.output<T> {
  const parsed = schema.safeParse(value);
  if (parsed.success) return parsed.data;
  throw new ExpectedError("not_found", "There is nothing at this address.");
}

/** A query as an object: a name that stands once has a text, one that stands several times a list. */
export function queryObject(params: URLSearchParams): Record<string, string | string[]> {
  return Object.fromEntries(
    [...new Set(params.keys())].map((name) => {
      const all = params.getAll(name);
      return [name, all.length === 1 ? (all[0] ?? "") : all];
    }),
  );
}
