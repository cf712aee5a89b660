import { eachToken } from "./words";

/** A typed word, or the words of a phrase in quotes. */
export type Term = { words: string[]; isPhrase: boolean; isPrefix: boolean };
export type QueryWords = { terms: Term[]; excluded: Term[] };

const WORDS_MAX = 10;

/**
 * Reads typed text: words, phrases in double quotes, and either with a leading minus to exclude it. At most ten
 * words count. The last word is a beginning unless something that separates follows it or `allowPrefix` is false.
 */
export function readQuery(text: string, stopWords: ReadonlySet<string>, allowPrefix: boolean): QueryWords {
  const terms: Term[] = [];
  const excluded: Term[] = [];
  let budget = WORDS_MAX;
  const pieces = text.split('"');
  let offset = 0;
  pieces.forEach((piece, index) => {
    const isPhrase = index % 2 === 1;
    const tokens = budget > 0 ? eachToken(piece) : [];
    if (isPhrase) {
      const words: string[] = [];
      for (const token of tokens) if (words.push(token.word) >= budget) break;
      budget -= words.length;
      const target = isMinus(text, offset - 2) ? excluded : terms;
      if (words.length > 0) target.push({ words, isPhrase: true, isPrefix: false });
    } else {
      for (const token of tokens) {
        const isNegative = isMinus(text, offset + token.start - 1);
        const isLast = offset + token.end === text.length;
        if (stopWords.has(token.word) && !isNegative) continue;
        budget -= 1;
        const term = { words: [token.word], isPhrase: false, isPrefix: allowPrefix && isLast && !isNegative };
        (isNegative ? excluded : terms).push(term);
        if (budget === 0) break;
      }
    }
    offset += piece.length + 1;
  });
  return { terms, excluded };
}

/** A minus at `at` that begins a word: at the start of the text or after a space. */
function isMinus(text: string, at: number): boolean {
  return text[at] === "-" && (at === 0 || /\s/.test(text[at - 1] ?? ""));
}
