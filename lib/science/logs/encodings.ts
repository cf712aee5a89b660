import { describeColumns, type Column } from "./columns";
import { findLayout, type Layout, type SampleLine } from "./layout";

/** Encodings of one or two bytes that loggers and spreadsheets write beside UTF-8; the first where none knows better. */
const OLDER = ["windows-1252", "shift_jis", "gb18030", "euc-kr", "windows-1251", "windows-1250"];

export interface Planned {
  readonly layout: Layout;
  readonly columns: readonly Column[];
}

/**
 * Layout and columns of the first bytes of a log, cut at a line end; undefined when no line holds numbers.
 *
 * UTF-8 where the bytes are. Otherwise the encoding (WHATWG Encoding Standard) in which most columns tell by name and unit
 * what they are: bytes alone don't say which it is. Digits, marks and line ends are ASCII in all of them.
 */
export function planOf(bytes: Uint8Array): Planned | undefined {
  const utf8 = decoded(bytes, "utf-8");
  if (utf8 !== undefined) return planned(utf8);
  let best: { plan: Planned; known: number } | undefined;
  for (const encoding of OLDER) {
    const text = decoded(bytes, encoding);
    const plan = text === undefined ? undefined : planned(text);
    if (!plan) continue;
    const known = plan.columns.reduce(
      (sum, { quantity, unit, role }) => sum + [quantity, unit, role].filter(Boolean).length,
      0,
    );
    if (!best || known > best.known) best = { plan, known };
  }
  return best?.plan;
}

function decoded(bytes: Uint8Array, encoding: string): string | undefined {
  try {
    return new TextDecoder(encoding, { fatal: true }).decode(bytes);
  } catch {
    return undefined;
  }
}

function planned(text: string): Planned | undefined {
  const lines = text.split(/\r\n|\n|\r/).map((line, index): SampleLine => ({ line: index + 1, text: line }));
  const layout = findLayout(lines);
  return layout && { layout, columns: describeColumns(lines, layout) };
}
