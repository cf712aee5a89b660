/** A cell: a number is written as it is, text is quoted where needed, null leaves the cell empty. */
export type CsvCell = number | string | null;

/**
 * A text that a spreadsheet would take for a formula is prefixed by an apostrophe (OWASP, CSV Injection: =, +, -, @,
 * tab, carriage return); quoted by RFC 4180, 2.5–2.7.
 */
function textCell(text: string): string {
  const harmless = /^[=+\-@\t\r]/.test(text) ? `'${text}` : text;
  return /[",\r\n]/.test(harmless) ? `"${harmless.replaceAll('"', '""')}"` : harmless;
}

/** Rows under a head as CSV (RFC 4180): commas, CRLF, decimal point. Numbers are never prefixed; NaN is refused. */
export function writeCsv(head: readonly string[], rows: readonly (readonly CsvCell[])[]): string {
  const cell = (value: CsvCell): string => {
    if (value === null) return "";
    if (typeof value === "string") return textCell(value);
    if (!Number.isFinite(value)) throw new RangeError("Only a finite number can be written");
    return String(value);
  };
  return [head, ...rows].map((row) => `${row.map(cell).join(",")}\r\n`).join("");
}
