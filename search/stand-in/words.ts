/** One word of a text: its normal form and where it stands in the original, in UTF-16 units. */
export type Token = { word: string; start: number; end: number };

/** Runs in pieces, since a pattern without end may use up the stack on a run of millions. */
const RUN_MAX = 4096;
const RUN = new RegExp(`[\\p{L}\\p{N}\\p{M}]{1,${RUN_MAX}}`, "gu");
const MARKS = /\p{Mn}/gu;
/** Longer words are not indexed, as in the service. */
const WORD_LENGTH_MAX = 250;
const ASCII_LOWER = /^[a-z0-9]+$/;

/** Lower case, compatibility-decomposed, without combining marks: the form in which words are compared. */
export function normaliseWord(word: string): string {
  if (ASCII_LOWER.test(word)) return word;
  return word.normalize("NFKD").replace(MARKS, "").toLowerCase();
}

/**
 * Words of a text in order. Everything but letters, digits and marks separates, hyphen and apostrophe included;
 * scripts written without spaces are not segmented.
 */
export function tokenise(text: string): Token[] {
  return [...eachToken(text)];
}

/** The same one by one, for a reader who may stop early. */
export function* eachToken(text: string): Generator<Token> {
  let lastEnd = -1;
  for (const match of text.matchAll(RUN)) {
    const end = match.index + match[0].length;
    const isRest = match.index === lastEnd;
    lastEnd = end;
    const word = isRest ? "" : normaliseWord(match[0]);
    if (word !== "" && word.length <= WORD_LENGTH_MAX) yield { word, start: match.index, end };
  }
}

/** Marks that end a phrase: Latin, Armenian, Arabic, Indic and East Asian ones; a full stop or comma only with a space. */
const PHRASE_END = /[.,] |[!:;?¡§¶¿՜՝՞։،؛؟۔।॥…※‼‽⁇⁈⁉、。！，．：；？｡､]/u;

/** Whether what stands between two words parts them further than a space does. */
export function endsPhrase(between: string): boolean {
  return PHRASE_END.test(between);
}

/** The words of a text in normal form and in order, without their places. */
export function wordsOf(text: string): string[] {
  const words: string[] = [];
  if (text.length > RUN_MAX) {
    for (const token of eachToken(text)) words.push(token.word);
    return words;
  }
  for (const part of text.match(RUN) ?? []) {
    const word = normaliseWord(part);
    if (word !== "" && word.length <= WORD_LENGTH_MAX) words.push(word);
  }
  return words;
}

/** Form in which facet strings are compared: trimmed, lower case, compatibility-decomposed, accents kept. */
export function normaliseFacet(value: string): string {
  return value.trim().normalize("NFKD").toLowerCase();
}

/** The text by which a scalar is searched; undefined for what is not searched (null). */
export function scalarText(value: unknown): string | undefined {
  if (typeof value === "string") return value;
  if (typeof value === "number" || typeof value === "boolean") return String(value);
  return undefined;
}
