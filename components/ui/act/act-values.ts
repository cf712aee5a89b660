import { parseTypedNumber } from "@/lib/format/typed-number";

/** A field of an act's form; its kind decides what its typing becomes. */
export type ActField = {
  name: string;
  label: string;
  /** Text on one line where left out. */
  kind?: "text" | "area" | "number" | "numbers" | "choice" | "tick" | "time" | "address";
  /** Of a number; stands inside the field's end. */
  unit?: string;
  hint?: string;
  optional?: boolean;
  defaultValue?: string;
  options?: readonly { value: string; label: string; disabled?: boolean }[];
};

export type ActValues = Readonly<Record<string, unknown>>;
export type ActProblems = Readonly<Record<string, string>>;

/**
 * What was typed, as it is sent: numbers as numbers ("54,3" is understood), a list of numbers split at blanks and
 * semicolons, a local time as ISO 8601 in UTC. An optional field left empty is left out, never 0.
 */
export function readTyped(
  fields: readonly ActField[],
  typed: Readonly<Record<string, string>>,
): { values: ActValues; problems: ActProblems } {
  const values: Record<string, unknown> = {};
  const problems: Record<string, string> = {};
  for (const field of fields) {
    const text = (typed[field.name] ?? "").trim();
    if (field.kind === "tick") {
      values[field.name] = text === "on";
    } else if (text === "") {
      if (!field.optional) problems[field.name] = "Fill this in.";
    } else {
      const read = readOne(field, text);
      if ("why" in read) problems[field.name] = read.why;
      else values[field.name] = read.value;
    }
  }
  return { values, problems };
}

function readOne(field: ActField, text: string): { value: unknown } | { why: string } {
  if (field.kind === "number") {
    const { value, why = "is not a number" } = parseTypedNumber(text, field.unit ?? "");
    return value === undefined ? { why } : { value };
  }
  if (field.kind === "numbers") {
    const list: number[] = [];
    for (const part of text.split(/[;\s]+/).filter((each) => each !== "")) {
      const { value, why = "is not a number" } = parseTypedNumber(part.replace(/,$/, ""), field.unit ?? "");
      if (value === undefined) return { why };
      list.push(value);
    }
    return { value: list };
  }
  if (field.kind === "time") {
    const moment = new Date(text);
    return Number.isNaN(moment.getTime()) ? { why: "Write a date and a time." } : { value: moment.toISOString() };
  }
  return { value: text };
}
