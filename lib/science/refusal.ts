/**
 * An input that can't be used, with a reason a person can act on. Pure code throws it; the edges turn it into an
 * HTTP problem body, a message on screen or one line on standard error.
 */
export class Refusal extends Error {
  /** Stable kebab-case identifier of the reason. */
  readonly code: string;
  /** Where in the input: a line, a byte offset, a field path. Line and channel numbers count from 1. */
  readonly at: string | number | undefined;

  constructor(code: string, message: string, at?: string | number) {
    super(message);
    this.name = "Refusal";
    this.code = code;
    this.at = at;
  }
}
