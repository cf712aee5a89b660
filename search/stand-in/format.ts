import type { Document, Json } from "./paths";
import { isRecord, matchesPattern, project } from "./paths";
import type { Shown } from "./text-match";
import { phraseAt } from "./text-match";
import type { Token } from "./words";
import { normaliseWord, scalarText, tokenise } from "./words";

export type FormatOptions = {
  highlight: readonly string[];
  /** Attributes to shorten, each with its own length in words after a colon if it has one. */
  crop: readonly string[];
  cropLength: number;
  cropMarker: string;
  preTag: string;
  postTag: string;
};
export type MatchPosition = { start: number; length: number; indices?: number[] };
type Span = { token: number; start: number; end: number };

/** The copy of a hit in which matches are marked, long texts shortened and numbers written as text. */
export function formatDocument(
  document: Document,
  retrieve: readonly string[],
  options: FormatOptions,
  shown: readonly Shown[],
): Document {
  const crop = options.crop.map((each) => each.replace(/:\d+$/, ""));
  const kept = project(document, [...retrieve, ...options.highlight, ...crop]);
  return formatValue(kept, "", options, shown) as Document;
}

function formatValue(value: Json, path: string, options: FormatOptions, shown: readonly Shown[]): Json {
  if (Array.isArray(value)) return value.map((item) => formatValue(item, path, options, shown));
  if (isRecord(value)) {
    const entries = Object.entries(value).map(([key, below]): [string, Json] => [
      key,
      formatValue(below, path === "" ? key : `${path}.${key}`, options, shown),
    ]);
    return Object.fromEntries(entries);
  }
  if (typeof value !== "string" && typeof value !== "number") return value;
  const isMarked = options.highlight.some((pattern) => matchesPattern(pattern, path));
  return formatText(String(value), isMarked, cropLengthOf(path, options), options, shown);
}

function cropLengthOf(path: string, options: FormatOptions): number {
  for (const each of options.crop) {
    const [, pattern = each, length] = /^(.*?)(?::(\d+))?$/.exec(each) ?? [];
    if (matchesPattern(pattern, path)) return length === undefined ? options.cropLength : Number(length);
  }
  return 0;
}

function formatText(
  text: string,
  isMarked: boolean,
  cropLength: number,
  options: FormatOptions,
  shown: readonly Shown[],
): string {
  const tokens = tokenise(text);
  const spans = findSpans(text, tokens, shown);
  const [from, to] =
    cropLength > 0 && tokens.length > cropLength ? cropWindow(tokens.length, spans, cropLength) : [0, tokens.length];
  const start = from === 0 ? 0 : (tokens[from]?.start ?? 0);
  const end = to === tokens.length ? text.length : (tokens[to - 1]?.end ?? text.length);
  let out = from === 0 ? "" : options.cropMarker;
  let at = start;
  if (isMarked) {
    for (const span of spans) {
      if (span.start < at || span.end > end) continue;
      out += text.slice(at, span.start) + options.preTag + text.slice(span.start, span.end) + options.postTag;
      at = span.end;
    }
  }
  out += text.slice(at, end);
  return to === tokens.length ? out : out + options.cropMarker;
}

/** Words of the window that holds most matches, widened evenly around them; the beginning when nothing matches. */
function cropWindow(count: number, spans: readonly Span[], length: number): [number, number] {
  let best: { first: number; last: number; hits: number } | undefined;
  spans.forEach((span, i) => {
    let last = i;
    while ((spans[last + 1]?.token ?? Infinity) - span.token < length) last += 1;
    const hits = last - i + 1;
    if (best === undefined || hits > best.hits)
      best = { first: span.token, last: spans[last]?.token ?? span.token, hits };
  });
  if (best === undefined) return [0, Math.min(length, count)];
  let from = best.first;
  let to = best.last + 1;
  while (to - from < length && (from > 0 || to < count)) {
    if (from > 0) from -= 1;
    if (to < count && to - from < length) to += 1;
  }
  return [from, to];
}

/** Parts of a text that the query's words and phrases match, in order. */
function findSpans(text: string, tokens: readonly Token[], shown: readonly Shown[]): Span[] {
  const spans: Span[] = [];
  const words = tokens.map((token) => token.word);
  const inPhrase = new Set<number>();
  for (const phrase of shown.flatMap((each) => each.phrases)) {
    for (let at = phraseAt(words, phrase, 0); at >= 0; at = phraseAt(words, phrase, at + 1)) {
      phrase.forEach((_, i) => inPhrase.add(at + i));
    }
  }
  tokens.forEach((token, index) => {
    const end = inPhrase.has(index) ? token.end : matchedEnd(text, token, shown);
    if (end !== undefined) spans.push({ token: index, start: token.start, end });
  });
  return spans;
}

/** End of the matched part of a word: all of it, or only the typed beginning. */
function matchedEnd(text: string, token: Token, shown: readonly Shown[]): number | undefined {
  const hit = shown.find((each) => each.accepted.has(token.word));
  if (hit === undefined) return undefined;
  const typed = hit.term.words[0] ?? "";
  if (!hit.term.isPrefix || !token.word.startsWith(typed)) return token.end;
  let end = token.start + 1;
  while (end < token.end && normaliseWord(text.slice(token.start, end)).length < typed.length) end += 1;
  while (end < token.end && /\p{M}/u.test(text[end] ?? "")) end += 1;
  return end;
}

/** Where matches stand in every attribute, in bytes of UTF-8. */
export function matchPositions(document: Document, shown: readonly Shown[]): Record<string, MatchPosition[]> {
  const positions = new Map<string, MatchPosition[]>();
  const visit = (value: Json, path: string, indices: number[]): void => {
    if (Array.isArray(value)) value.forEach((item, i) => visit(item, path, [...indices, i]));
    else if (isRecord(value)) {
      for (const [key, below] of Object.entries(value)) visit(below, path === "" ? key : `${path}.${key}`, indices);
    } else {
      const text = scalarText(value);
      if (text === undefined || typeof value === "boolean") return;
      let at = 0;
      let bytes = 0;
      const found = findSpans(text, tokenise(text), shown).map((span) => {
        bytes += Buffer.byteLength(text.slice(at, span.start));
        at = span.start;
        const length = Buffer.byteLength(text.slice(span.start, span.end));
        return { start: bytes, length, ...(indices.length > 0 ? { indices } : {}) };
      });
      if (found.length > 0) positions.set(path, [...(positions.get(path) ?? []), ...found]);
    }
  };
  visit(document, "", []);
  return Object.fromEntries(positions);
}
