import type { BenchPart } from "@/lib/domain/results/bench-budget";
import { parseTypedNumber } from "@/lib/format/typed-number";

/** A part as it is typed. */
export type PartDraft = {
  /** Keeps its place on the page while it is edited. */
  key: string;
  quantity: BenchPart["quantity"];
  name: string;
  u: string;
  kind: BenchPart["kind"];
  evaluation: BenchPart["evaluation"];
  distribution: BenchPart["distribution"];
  dof: string;
  source: string;
};

export type PartProblems = Partial<Record<"name" | "u" | "dof" | "source", string>>;

/** The unit that a part of this kind and quantity has. */
export const unitOf = ({ kind, quantity }: Pick<PartDraft, "kind" | "quantity">): BenchPart["unit"] =>
  kind === "shared_gain" ? "relative" : quantity === "level_dba" ? "dB" : "K";

export const draftOf = (part: BenchPart): PartDraft => ({
  ...part,
  key: `${part.quantity} ${part.name}`,
  u: String(part.u),
  dof: part.dof === null ? "" : String(part.dof),
});

export const newPart = (): PartDraft => ({
  key: crypto.randomUUID(),
  quantity: "level_dba",
  name: "",
  u: "",
  kind: "own_run",
  evaluation: "B",
  distribution: "normal",
  dof: "",
  source: "",
});

/** The part that a draft says, or what is wrong with it by field; empty degrees of freedom are infinitely many. */
export function readDraft(draft: PartDraft): { part?: BenchPart; problems: PartProblems } {
  const u = parseTypedNumber(draft.u, "");
  const dof = draft.dof.trim() === "" ? null : parseTypedNumber(draft.dof, "").value;
  const problems: PartProblems = {
    ...(draft.name.trim() === "" ? { name: "Name the part." } : {}),
    ...(u.value === undefined || u.value < 0 ? { u: "Write a size of 0 or more." } : {}),
    ...(dof === undefined || (dof !== null && dof <= 0) ? { dof: "Write a number above 0, or nothing." } : {}),
    ...(draft.source.trim() === "" ? { source: "Say where it comes from." } : {}),
  };
  if (Object.keys(problems).length > 0 || u.value === undefined || dof === undefined) return { problems };
  const { key: _key, ...rest } = draft;
  const words = { name: draft.name.trim(), source: draft.source.trim() };
  return { part: { ...rest, ...words, u: u.value, dof, unit: unitOf(draft) }, problems };
}
