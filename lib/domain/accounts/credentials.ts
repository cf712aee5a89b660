/** House rules, no source: long enough to be guessed seldom, short enough that hashing it costs nobody much. */
export const passwordLengthMin = 12;
export const passwordLengthMax = 200;

/** The database's own rule for a handle, said in the same pattern. */
export const handlePattern = /^[a-z0-9][a-z0-9-]{1,29}$/;

/** Lower case without blanks around, as addresses are compared. */
export function comparableEmail(email: string): string {
  return email.trim().toLowerCase();
}

/**
 * What is wrong with a password that somebody chooses, in words; undefined when it will do. Counted in Unicode code
 * points. It may hold neither the handle nor the part of the address before the @, when those have four letters or more.
 */
export function passwordProblem(password: string, about: { email?: string; handle?: string } = {}): string | undefined {
  const length = [...password].length;
  if (length < passwordLengthMin) return `needs ${passwordLengthMin} characters or more; a few words will do`;
  if (length > passwordLengthMax) return `has more than ${passwordLengthMax} characters`;
  if (new Set(password).size < 5) return "has too few different characters";
  const low = password.toLowerCase();
  const own = [about.handle, about.email?.split("@")[0]].flatMap((each) => each?.toLowerCase() ?? []);
  if (own.some((each) => each.length >= 4 && low.includes(each))) return "holds your handle or address";
  return undefined;
}
