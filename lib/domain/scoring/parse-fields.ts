import { Refusal } from "@/lib/science/refusal";

/** A JSON object with the path at which it stands, for messages. */
export type Fields = { readonly path: string; readonly value: Readonly<Record<string, unknown>> };

/** Path of a field below another path, in the manner of JavaScript: `sessions[0].entries[2].id`. */
export function pathOf(path: string, key: string): string {
  return path === "" ? key : `${path}.${key}`;
}

export function fieldsOf(value: unknown, path: string): Fields {
  if (typeof value !== "object" || value === null || Array.isArray(value))
    throw new Refusal("not-an-object", `${path === "" ? "The input" : path} must be an object.`, path || undefined);
  return { path, value: value as Record<string, unknown> };
}

export function listField<T>(fields: Fields, key: string, each: (value: unknown, path: string) => T): T[] {
  const path = pathOf(fields.path, key);
  const list = fields.value[key];
  if (list === undefined) throw new Refusal("missing", `${path} is missing.`, path);
  if (!Array.isArray(list)) throw new Refusal("not-a-list", `${path} must be a list.`, path);
  return list.map((value: unknown, i) => each(value, `${path}[${i}]`));
}

export function textField(fields: Fields, key: string): string {
  const path = pathOf(fields.path, key);
  const value = fields.value[key];
  if (value === undefined) throw new Refusal("missing", `${path} is missing.`, path);
  if (typeof value !== "string" || value.trim() === "")
    throw new Refusal("not-a-text", `${path} must be a text that isn't empty.`, path);
  return value;
}

export function choiceField<T extends string>(fields: Fields, key: string, choices: readonly T[]): T {
  const path = pathOf(fields.path, key);
  const value = fields.value[key];
  if (value === undefined) throw new Refusal("missing", `${path} is missing.`, path);
  const found = choices.find((choice) => choice === value);
  if (found === undefined) throw new Refusal("not-a-choice", `${path} must be one of ${choices.join(", ")}.`, path);
  return found;
}

export type NumberLimits = {
  /** Largest refused number below the range. */
  readonly above?: number;
  readonly min?: number;
  readonly max?: number;
  readonly whole?: boolean;
};

/** A finite number, as JSON has it: a text that looks like one is refused, not converted. */
export function numberAt(value: unknown, path: string, limits: NumberLimits = {}): number {
  if (value === undefined) throw new Refusal("missing", `${path} is missing.`, path);
  if (typeof value !== "number" || !Number.isFinite(value))
    throw new Refusal("not-a-number", `${path} must be a finite number.`, path);
  const { above, min, max, whole } = limits;
  if (above !== undefined && !(value > above))
    throw new Refusal("out-of-range", `${path} must be above ${above}.`, path);
  if (min !== undefined && value < min) throw new Refusal("out-of-range", `${path} must be ${min} or more.`, path);
  if (max !== undefined && value > max) throw new Refusal("out-of-range", `${path} must be ${max} or less.`, path);
  if (whole && !Number.isSafeInteger(value)) throw new Refusal("not-whole", `${path} must be a whole number.`, path);
  return value;
}

export function numberField(fields: Fields, key: string, limits: NumberLimits = {}): number {
  return numberAt(fields.value[key], pathOf(fields.path, key), limits);
}

/** As `numberField`, but null stands for "taken as exactly known" or "none" and passes. */
export function numberOrNullField(fields: Fields, key: string, limits: NumberLimits = {}): number | null {
  return fields.value[key] === null ? null : numberField(fields, key, limits);
}

/** Refuses the second of two equal names. */
export function refuseTwice(names: readonly { readonly name: string | number; readonly path: string }[]): void {
  const seen = new Set<string | number>();
  for (const { name, path } of names) {
    if (seen.has(name)) throw new Refusal("twice", `${path}: ${name} is there twice.`, path);
    seen.add(name);
  }
}
