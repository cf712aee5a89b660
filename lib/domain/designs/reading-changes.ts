/** One figure that two readings of the same file differ in. */
export interface ReadingChange {
  /** Where in the reading, as `rotors[0].blades`. */
  path: string;
  before: unknown;
  after: unknown;
}

/** Relative difference below which two figures count as the same: the last digits of a stored figure tell nothing. */
const same = 1e-9;

/**
 * What differs between two readings of one file, leaf by leaf, in the order of their paths; texts of warnings don't
 * count. Empty when nothing does.
 */
export function readingChanges(before: unknown, after: unknown): ReadingChange[] {
  const [was, is] = [leaves(before), leaves(after)];
  const paths = [...new Set([...was.keys(), ...is.keys()])].sort();
  return paths.flatMap((path) => {
    const change = { path, before: was.get(path), after: is.get(path) };
    return alike(change.before, change.after) ? [] : [change];
  });
}

function alike(a: unknown, b: unknown): boolean {
  if (typeof a !== "number" || typeof b !== "number") return a === b;
  return Math.abs(a - b) <= same * Math.max(Math.abs(a), Math.abs(b));
}

function leaves(value: unknown, path = "", found = new Map<string, unknown>()): Map<string, unknown> {
  if (Array.isArray(value)) value.forEach((each, n) => leaves(each, `${path}[${n}]`, found));
  else if (value !== null && typeof value === "object") {
    for (const [name, each] of Object.entries(value)) {
      if (each !== undefined && !path.startsWith("warnings["))
        leaves(each, path === "" ? name : `${path}.${name}`, found);
      else if (name === "code") found.set(`${path}.code`, each);
    }
  } else found.set(path, value);
  return found;
}
