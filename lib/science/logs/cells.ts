/** Cells of a record, or why it isn't one. `open`: a quote isn't closed by the end of the text. */
export type Split = { readonly cells: string[] } | { readonly fault: string; readonly open: boolean };

/**
 * Strict split of one record (RFC 4180, 2): a quoted cell begins and ends at a delimiter, "" inside is one quote, and a
 * quote anywhere else is a fault. Blanks around a quoted cell are let pass. The text has no line end outside quotes.
 */
export function splitRecord(text: string, delimiter: string): Split {
  const cells: string[] = [];
  let position = 0;
  for (;;) {
    let start = position;
    while (text[start] === " ") start++;
    if (text[start] !== '"') {
      const next = text.indexOf(delimiter, position);
      const cell = next < 0 ? text.slice(position) : text.slice(position, next);
      if (cell.includes('"')) return { fault: "a quote stands inside an unquoted cell", open: false };
      cells.push(cell);
      if (next < 0) return { cells };
      position = next + delimiter.length;
      continue;
    }
    let cell = "";
    position = start + 1;
    for (;;) {
      const quote = text.indexOf('"', position);
      if (quote < 0) return { fault: "a quote isn't closed", open: true };
      cell += text.slice(position, quote);
      position = quote + 1;
      if (text[position] !== '"') break;
      cell += '"';
      position += 1;
    }
    while (text[position] === " ") position++;
    cells.push(cell);
    if (position >= text.length) return { cells };
    if (text[position] !== delimiter) return { fault: "text stands after a closing quote", open: false };
    position += delimiter.length;
  }
}

/** Decimal mark of a column, and the mark that groups its thousands where it shows one. */
export interface NumberMarks {
  readonly decimal: "." | ",";
  readonly grouped: boolean;
}

const PLAIN = /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i;
/** Thousands in groups of one mark, and what may follow a decimal mark that is another. A group never begins with 0. */
const GROUPED = /^[+-]?[1-9]\d{0,2}(?:([.,' ])\d{3})(?:\1\d{3})*(?:(?!\1)([.,])\d+)?$/;

/** Minus signs and blanks of typography as plain ones. */
function typed(text: string): string {
  return text
    .replace(/\u2212/g, "-")
    .replace(/[\u00a0\u2009\u202f]/g, " ")
    .replace(/\u2019/g, "'")
    .trim();
}

/**
 * A number as written in a cell; NaN for anything else, also for an empty cell, "NaN" and values beyond double
 * precision. A minus sign of typography and non-breaking spaces are read; a trailing unit only if handed in.
 */
export function cellNumber(text: string, marks: NumberMarks, unit?: RegExp): number {
  let written = typed(text);
  if (unit) written = written.replace(unit, "").trim();
  const group = marks.grouped ? GROUPED.exec(written)?.[1] : undefined;
  if (group !== undefined && group !== marks.decimal) written = written.split(group).join("");
  if (marks.decimal === ",") {
    if (written.includes(".")) return Number.NaN;
    written = written.replace(",", ".");
  }
  const value = PLAIN.test(written) ? Number(written) : Number.NaN;
  return Number.isFinite(value) ? value : Number.NaN;
}

/** Whether a cell could be a number, and which mark it shows. */
export function numberLook(text: string): "whole" | "point" | "comma" | undefined {
  const written = typed(text);
  if (/^[+-]?\d+(e[+-]?\d+)?$/i.test(written)) return "whole";
  if (/^[+-]?(\d+\.\d*|\.\d+)(e[+-]?\d+)?$/i.test(written)) return "point";
  return /^[+-]?(\d+,\d*|,\d+)(e[+-]?\d+)?$/i.test(written) ? "comma" : undefined;
}

/**
 * Whether a cell looks like thousands with a group mark ("1.850", "12,400", "1'234.5"). `sure`: it can be nothing else,
 * by two marks, by the same one twice, or by one that never marks decimals; `decimal` where it shows.
 */
export function groupLook(text: string): { sure: boolean; group: string; decimal: "." | "," | undefined } | undefined {
  const found = GROUPED.exec(typed(text));
  const group = found?.[1];
  if (!found || group === undefined) return undefined;
  const decimal = found[2] === "." || found[2] === "," ? found[2] : undefined;
  const twice = found[0].split(group).length > 2;
  return { sure: decimal !== undefined || twice || group === "'" || group === " ", group, decimal };
}
