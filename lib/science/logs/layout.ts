import { BLANKS, blankCells, blankNames } from "./blank-squeezer";
import { groupLook, numberLook, splitRecord } from "./cells";
import { timeKind } from "./times";

/** One physical line of the sample; `line` counts from 1. */
export interface SampleLine {
  readonly line: number;
  readonly text: string;
}

/** How a log is laid out: what divides cells, how many there are, where names and rows begin. */
export interface Layout {
  /** "" for a single column, " " where runs of blanks divide cells. */
  readonly delimiter: string;
  readonly width: number;
  /** Names as written; undefined when the log has none. */
  readonly names: readonly string[] | undefined;
  /** A row of units below the names. */
  readonly unitRow: readonly string[] | undefined;
  readonly firstRowLine: number;
  /** Lines above the names that were passed over, without blank ones and remarks. */
  readonly preambleLines: number;
}

const DELIMITERS = [";", "\t", ",", "|"];
const REMARK = /^\s*(#|%|\/\/|!|\*)/;

/** Whether a line is a remark; a semicolon or apostrophe begins one only where it doesn't divide cells. */
export function isRemark(text: string, delimiter: string): boolean {
  return REMARK.test(text) || (delimiter !== ";" && text.startsWith(";")) || text.startsWith("'");
}

/** Share of a line's cells that are numbers or times, among those that aren't empty; 0 for no cells. */
function dataShare(cells: readonly string[]): number {
  const filled = cells.filter((cell) => cell.trim() !== "");
  if (filled.length === 0) return 0;
  return filled.filter(isDatum).length / filled.length;
}

function isDatum(cell: string): boolean {
  const bare = cell.trim().replace(/(?<=\d)\s*(°\s?[CF]|[CFK]|dB(\(A\))?|s|ms|rpm|%)$/i, "");
  return numberLook(bare) !== undefined || groupLook(bare) !== undefined || timeKind(cell) !== undefined;
}

/** Cells of a line of the sample; undefined where its quotes are broken. */
export function cellsOf(text: string, delimiter: string): string[] | undefined {
  if (delimiter === BLANKS) return blankCells(text);
  if (delimiter === "") return [text.trim().replace(/^"(.*)"$/, "$1")];
  const split = splitRecord(text, delimiter);
  return "cells" in split ? split.cells : undefined;
}

/**
 * The layout of a log from its first lines, or undefined when no line holds numbers: the delimiter whose rows of one
 * width hold most numbers wins; names are the nearest line of that width above the first two rows that follow one another.
 * Blanks divide cells only where they do it better than commas and a single column, and no rarer mark does it at all.
 */
export function findLayout(lines: readonly SampleLine[]): Layout | undefined {
  const candidates = DELIMITERS.map((delimiter) => ({ delimiter, ...rate(lines, delimiter) }));
  const best = candidates.reduce((a, b) => (b.score > a.score ? b : a));
  const single = { delimiter: "", ...rate(lines, "") };
  const marked = best.score === 0 || (best.delimiter === "," && isSingle(lines, best.first)) ? single : best;
  const blanks = { delimiter: BLANKS, ...rate(lines, BLANKS) };
  const byBlanks = (marked.delimiter === "" || marked.delimiter === ",") && blanks.score > marked.score;
  const chosen = byBlanks ? blanks : marked;
  return chosen.score === 0 ? undefined : withNames(lines, chosen.delimiter, chosen.width, chosen.first);
}

/** "34,5" under one name is a decimal comma, not two columns. */
function isSingle(lines: readonly SampleLine[], first: number): boolean {
  const above = lines[first - 1]?.text;
  const rows = lines.slice(first, first + 50).filter(({ text }) => text.trim() !== "");
  return (
    above !== undefined &&
    !above.includes(",") &&
    !REMARK.test(above) &&
    rows.every(({ text }) => /^\s*[+-]?\d+,\d+\s*$/.test(text))
  );
}

function rate(lines: readonly SampleLine[], delimiter: string) {
  const rated = lines.map(({ text }) => {
    const cells = text.trim() === "" || isRemark(text, delimiter) ? undefined : cellsOf(text, delimiter);
    const share = cells && (cells.length > 1 || delimiter === "") ? dataShare(cells) : 0;
    return { width: cells?.length ?? 0, share: share >= 0.5 ? share : 0 };
  });
  const scores = new Map<number, number>();
  for (const { width, share } of rated) if (share > 0) scores.set(width, (scores.get(width) ?? 0) + share);
  const [width, score] = [...scores].reduce((a, b) => (b[1] > a[1] ? b : a), [0, 0]);
  const fits = (index: number) => rated[index]?.width === width && (rated[index]?.share ?? 0) > 0;
  const used = rated.flatMap((_, index) =>
    lines[index]?.text.trim() === "" || isRemark(lines[index]?.text ?? "", delimiter) ? [] : [index],
  );
  const start = used.findIndex((index, at) => {
    const next = used[at + 1];
    return fits(index) && (next === undefined || fits(next));
  });
  return { width, score, first: used[start] ?? used.find(fits) ?? 0 };
}

function withNames(lines: readonly SampleLine[], delimiter: string, width: number, first: number): Layout {
  let headAt = -1;
  let names: string[] | undefined;
  let unitRow: string[] | undefined;
  for (let index = first - 1; index >= 0 && index >= first - 12; index--) {
    const text = lines[index]?.text ?? "";
    if (text.trim() === "") continue;
    const remark = isRemark(text, delimiter);
    const bare = remark ? text.replace(/^\s*(#+|%+|\/\/|!|\*|'|;)\s*/, "") : text;
    const cells = delimiter === BLANKS ? blankNames(bare, width) : cellsOf(bare, delimiter);
    const fits = cells && (cells.length === width || cells.length === width - 1) && dataShare(cells) < 0.5;
    if (!fits) {
      if (names === undefined) continue;
      break;
    }
    if (names === undefined) [names, headAt] = [cells, index];
    else if (names.length === cells.length && names.every(isUnitText)) {
      [unitRow, names] = [names, cells];
      break;
    } else break;
  }
  const firstRow = names === undefined ? firstOfWidth(lines, delimiter, width, first) : headAt + 1;
  const nameLine = names === undefined ? firstRow : headAt;
  const preamble = lines.slice(0, nameLine).filter(({ text }) => text.trim() !== "" && !isRemark(text, delimiter));
  const preambleLines = Math.max(0, preamble.length - (unitRow === undefined ? 0 : 1));
  return { delimiter, width, names, unitRow, firstRowLine: lines[firstRow]?.line ?? 1, preambleLines };
}

function isUnitText(cell: string): boolean {
  return cell.trim() === "" || (cell.trim().length <= 12 && !/\s\S+\s/.test(cell));
}

function firstOfWidth(lines: readonly SampleLine[], delimiter: string, width: number, first: number): number {
  const found = lines.findIndex(({ text }) => !isRemark(text, delimiter) && cellsOf(text, delimiter)?.length === width);
  return found < 0 ? first : Math.min(found, first);
}
