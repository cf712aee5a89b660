import { parse } from "csv-parse/sync";
import { ServiceError } from "./errors";
import type { Document, Json } from "./paths";

type Kind = "string" | "number" | "boolean";
const NUMBER = /^[+-]?(\d+(\.\d*)?|\.\d+)([eE][+-]?\d+)?$/;

/**
 * Documents of a table with a head (RFC 4180). A head may end in `:number` or `:boolean`, which tells how to read its
 * column; everything else stays text, and an empty field is null.
 * @throws ServiceError `malformed_payload` for a table that can't be read
 */
export function readCsv(text: string, delimiter: string): Document[] {
  const [head = [], ...rows] = tableOf(text, delimiter);
  const columns = head.map((title) => {
    const [, name = title, kind = "string"] = /^(.*):(string|number|boolean)$/.exec(title) ?? [];
    return { name, kind: kind as Kind };
  });
  return rows.map((row, i) =>
    Object.fromEntries(
      columns.map(({ name, kind }, j): [string, Json] => [name, readField(row[j] ?? "", kind, i + 2)]),
    ),
  );
}

/** The delimiter that an address asks for: one ASCII character, a comma when it asks for none. */
export function readDelimiter(asked: string | null): string {
  if (asked === null) return ",";
  if (asked.length === 1 && asked.charCodeAt(0) < 128) return asked;
  throw new ServiceError(
    "invalid_document_csv_delimiter",
    `Invalid value in parameter \`csvDelimiter\`: expected a string of one character, but found the following string of ${Array.from(asked).length} characters: \`${asked}\``,
  );
}

function tableOf(text: string, delimiter: string): string[][] {
  try {
    return parse(text, { delimiter, bom: true, skip_empty_lines: true });
  } catch (error) {
    throw malformed(error instanceof Error ? error.message : String(error));
  }
}

function readField(text: string, kind: Kind, line: number): Json {
  const trimmed = text.trim();
  if (kind === "string") return text === "" ? null : text;
  if (trimmed === "") return null;
  if (kind === "number") {
    if (NUMBER.test(trimmed)) return Number(trimmed);
    throw malformed(`Error parsing number "${trimmed}" at line ${line}`);
  }
  if (trimmed === "true" || trimmed === "false") return trimmed === "true";
  throw malformed(`Error parsing boolean "${trimmed}" at line ${line}`);
}

const malformed = (said: string): ServiceError =>
  new ServiceError("malformed_payload", `The \`csv\` payload provided is malformed: \`${said}\`.`);
