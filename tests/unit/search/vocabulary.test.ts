import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { Vocabulary } from "@/search/stand-in/vocabulary";

/**
 * Optimal string alignment by its textbook recurrence, over the whole table (Damerau 1964 restricted to swaps of
 * neighbours): slow and plain, to compare the walk with.
 */
function distance(a: string, b: string): number {
  const table = Array.from({ length: a.length + 1 }, (_, i) =>
    Array.from({ length: b.length + 1 }, (_, j) => (i === 0 ? j : j === 0 ? i : 0)),
  );
  const at = (i: number, j: number): number => table[i]?.[j] ?? Infinity;
  for (let i = 1; i <= a.length; i += 1) {
    for (let j = 1; j <= b.length; j += 1) {
      let cost = Math.min(at(i - 1, j) + 1, at(i, j - 1) + 1, at(i - 1, j - 1) + (a[i - 1] === b[j - 1] ? 0 : 1));
      if (i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1]) cost = Math.min(cost, at(i - 2, j - 2) + 1);
      const row = table[i];
      if (row !== undefined) row[j] = cost;
    }
  }
  return at(a.length, b.length);
}

/** Edits by the service's documented rules: an error in the first letter counts double; a prefix is measured by its best beginning. */
function expected(words: string[], typed: string, max: number, isPrefix: boolean): Record<string, number> {
  const found: Record<string, number> = {};
  for (const word of words) {
    const beginnings = isPrefix ? Array.from({ length: word.length + 1 }, (_, i) => word.slice(0, i)) : [word];
    const edits = Math.min(...beginnings.map((each) => distance(each, typed)));
    const typos = word[0] === typed[0] || edits === 0 ? edits : Math.max(2, edits + 1);
    if (typos <= max) found[word] = typos;
  }
  return found;
}

function derived(words: string[], typed: string, max: 0 | 1 | 2, isPrefix: boolean): Record<string, number> {
  const found = new Vocabulary(words).derive({ word: typed, maxTypos: max, isPrefix });
  expect(new Set(found.map((each) => each.word)).size).toBe(found.length);
  return Object.fromEntries(found.map((each) => [each.word, each.typos]));
}

describe("the walk over the vocabulary finds what a comparison with every word finds", () => {
  const word = fc.string({ unit: fc.constantFrom("a", "b", "c"), minLength: 1, maxLength: 7 });

  test("for any vocabulary, word, allowance and prefix or not", () => {
    fc.assert(
      fc.property(
        fc.uniqueArray(word, { maxLength: 40 }),
        word,
        fc.constantFrom(0, 1, 2),
        fc.boolean(),
        (words, typed, max, isPrefix) => {
          expect(derived(words, typed, max as 0 | 1 | 2, isPrefix)).toEqual(expected(words, typed, max, isPrefix));
        },
      ),
      { numRuns: 2000 },
    );
  });

  test("swaps of neighbours are one edit, an error in the first letter is two", () => {
    expect(derived(["prince", "price", "wince"], "pirnce", 1, false)).toEqual({ prince: 1 });
    expect(derived(["prince"], "orince", 1, false)).toEqual({});
    expect(derived(["prince"], "orince", 2, false)).toEqual({ prince: 2 });
  });
});
