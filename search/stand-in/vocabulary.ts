/** A word of the vocabulary that a typed word stands for, and the edits between them. */
export type Derivation = { word: string; typos: number; isExact: boolean };
export type WordQuery = { word: string; maxTypos: 0 | 1 | 2; isPrefix: boolean };

/**
 * The words of an index in order, with the length of the prefix that each shares with the one before. A look-up
 * walks the list as a trie: one row of the edit-distance table a letter, kept as long as the prefix is shared,
 * and a whole subtree is passed over as soon as its row is out of reach.
 */
export class Vocabulary {
  readonly words: readonly string[];
  private readonly shared: Uint16Array;

  constructor(words: Iterable<string>) {
    this.words = [...words].sort();
    this.shared = new Uint16Array(this.words.length);
    for (let i = 1; i < this.words.length; i += 1) {
      this.shared[i] = sharedPrefix(this.words[i - 1] as string, this.words[i] as string);
    }
  }

  /**
   * Every vocabulary word within reach of a typed word. Edits are insertions, deletions, substitutions and swaps
   * of neighbours, each one; an error in the first letter counts double. A prefix query measures against the best
   * beginning of the vocabulary word.
   */
  derive(query: WordQuery): Derivation[] {
    const { word, maxTypos, isPrefix } = query;
    const found: Derivation[] = [];
    const first = word[0] ?? "";
    if (maxTypos === 0) {
      this.walk(this.lowerBound(word), word, 0, isPrefix, (each, typos) => found.push(make(each, typos, word)));
      return found;
    }
    this.walk(
      this.lowerBound(first),
      word,
      maxTypos,
      isPrefix,
      (each, typos) => found.push(make(each, typos, word)),
      first,
    );
    if (maxTypos === 2) {
      this.walk(0, word, 1, isPrefix, (each) => {
        if (!each.startsWith(first)) found.push(make(each, 2, word));
      });
    }
    return found;
  }

  private walk(
    from: number,
    query: string,
    max: number,
    isPrefix: boolean,
    visit: (word: string, typos: number) => void,
    mustStartWith = max === 0 ? query : "",
  ): void {
    const width = query.length + 1;
    const rows: Uint8Array[] = [Uint8Array.from({ length: width }, (_, column) => column)];
    const bestAt: number[] = [width - 1];
    let depth = 0;
    let deadAt = Infinity;
    for (let i = from; i < this.words.length; i += 1) {
      const word = this.words[i] as string;
      if (mustStartWith !== "" && !word.startsWith(mustStartWith)) break;
      const kept = i === from ? 0 : (this.shared[i] as number);
      if (kept >= deadAt) continue;
      depth = Math.min(depth, kept);
      deadAt = Infinity;
      while (depth < word.length) {
        const row = (rows[depth + 1] ??= new Uint8Array(width));
        const least = nextRow(rows, depth, row, word, query);
        depth += 1;
        const last = row[width - 1] as number;
        bestAt[depth] = isPrefix ? Math.min(bestAt[depth - 1] as number, last) : last;
        if (least > max && (bestAt[depth] as number) > max) {
          deadAt = depth;
          break;
        }
      }
      if (deadAt === Infinity && (bestAt[depth] as number) <= max) visit(word, bestAt[depth] as number);
    }
  }

  private lowerBound(text: string): number {
    let low = 0;
    let high = this.words.length;
    while (low < high) {
      const middle = (low + high) >> 1;
      if ((this.words[middle] as string) < text) low = middle + 1;
      else high = middle;
    }
    return low;
  }
}

/** Fills the row of the table for one more letter (`word[depth]`); returns the smallest entry that later rows build on. */
function nextRow(rows: Uint8Array[], depth: number, row: Uint8Array, word: string, query: string): number {
  const above = rows[depth] as Uint8Array;
  const twoAbove = depth > 0 ? rows[depth - 1] : undefined;
  const letter = word.charCodeAt(depth);
  const before = depth > 0 ? word.charCodeAt(depth - 1) : -1;
  row[0] = depth + 1;
  let least = depth + 1;
  for (let column = 1; column < row.length; column += 1) {
    const typed = query.charCodeAt(column - 1);
    let cost = (above[column - 1] as number) + (typed === letter ? 0 : 1);
    cost = Math.min(cost, (above[column] as number) + 1, (row[column - 1] as number) + 1);
    if (twoAbove !== undefined && column > 1 && typed === before && query.charCodeAt(column - 2) === letter) {
      cost = Math.min(cost, (twoAbove[column - 2] as number) + 1);
    }
    row[column] = cost;
    if (cost < least) least = cost;
  }
  return least;
}

function make(word: string, typos: number, typed: string): Derivation {
  return { word, typos, isExact: word === typed };
}

function sharedPrefix(a: string, b: string): number {
  const end = Math.min(a.length, b.length);
  let length = 0;
  while (length < end && a.charCodeAt(length) === b.charCodeAt(length)) length += 1;
  return length;
}
