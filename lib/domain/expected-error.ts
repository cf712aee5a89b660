/**
 * The errors that a person can cause and should be told of. The code decides the HTTP status in one table; anything
 * that is not an ExpectedError is our fault and is answered opaquely.
 */
export const expectedErrorCodes = [
  "not_signed_in",
  "forbidden",
  "not_found",
  "gone",
  "malformed",
  "moved_on",
  "already_there",
  "too_large",
  "wrong_kind",
  "impossible",
  "too_many",
  "unavailable",
] as const;

export type ExpectedErrorCode = (typeof expectedErrorCodes)[number];

/** One thing wrong with one field of what was sent: `path` as in `runs[2].levelDba`. */
export interface FieldProblem {
  path: string;
  message: string;
}

/**
 * `detail` says what is wrong, where, and what to do, in words for people. `malformed` is 400, `impossible` is 422 and
 * means a figure that cannot be (ΔT ≤ 0 with the heat on, outside the sensor's range, not a number); `moved_on` is 409.
 */
export class ExpectedError extends Error {
  override readonly name = "ExpectedError";
  constructor(
    readonly code: ExpectedErrorCode,
    readonly detail: string,
    readonly fields: readonly FieldProblem[] = [],
  ) {
    super(detail);
  }
}
