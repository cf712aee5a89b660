import { budget95 } from "@/lib/science/statistics/uncertainty";

/** A part of a bench's budget as the host writes it down; `u` in dB or K, relative for a shared gain. */
export type BenchPart = {
  readonly quantity: "level_dba" | "delta_t_k";
  readonly name: string;
  readonly u: number;
  readonly unit: "dB" | "K" | "relative";
  readonly evaluation: "A" | "B";
  readonly distribution: "normal" | "rectangular" | "triangular" | "arcsine" | "student";
  readonly dof: number | null;
  readonly source: string;
  readonly kind: "own_run" | "own_mount" | "shared_offset" | "shared_gain";
};

/** ΔT and its difference to the baseline by which a relative part is turned into K in a bench's totals. */
export const TOTALS_AT = { deltaTK: 40, differenceK: 4 } as const;

export type BudgetTotal = { readonly u: number; readonly dof: number; readonly k: number; readonly expanded: number };

/**
 * What a budget comes to for one run of one mount: alone, and as a difference to a baseline of the same session, where
 * own parts count for both, the shared offset is gone and the gain acts on the difference (JCGM 100:2008, 5.1.2, G.4.1
 * and F.1.2.3). Unit of the quantity, dB or K, 95 % coverage. Nothing for a quantity without parts.
 */
export function budgetTotals(
  parts: readonly BenchPart[],
  quantity: BenchPart["quantity"],
): { alone: BudgetTotal; against: BudgetTotal } | undefined {
  const own = parts.filter((part) => part.quantity === quantity);
  if (own.length === 0) return undefined;
  const sized = (part: BenchPart, gain: number) => ({
    u: part.kind === "shared_gain" ? part.u * gain : part.u,
    dof: part.dof ?? Infinity,
  });
  const alone = budget95(own.map((part) => sized(part, TOTALS_AT.deltaTK)));
  const against = budget95(
    own.flatMap((part) => {
      if (part.kind === "shared_offset") return [];
      const each = sized(part, TOTALS_AT.differenceK);
      return part.kind === "shared_gain" ? [each] : [each, each];
    }),
  );
  return { alone, against };
}

export type PartChange = {
  readonly part: BenchPart;
  readonly change: "added" | "removed" | "changed";
  readonly words: string;
};

const nameOf = (part: BenchPart): string => `${part.quantity} ${part.name.trim()}`;

/** What one budget changes against another, part by part; parts are the same by quantity and name. */
export function budgetChanges(before: readonly BenchPart[], after: readonly BenchPart[]): PartChange[] {
  const there = new Map(before.map((part) => [nameOf(part), part]));
  const here = new Set(after.map(nameOf));
  const changed = after.flatMap((part): PartChange[] => {
    const old = there.get(nameOf(part));
    if (!old) return [{ part, change: "added", words: `${part.u} ${part.unit}` }];
    const words = (["u", "kind", "evaluation", "distribution", "dof", "source"] as const)
      .filter((key) => old[key] !== part[key])
      .map((key) => `${labels[key]} ${shown(old[key])} → ${shown(part[key])}`);
    return words.length === 0 ? [] : [{ part, change: "changed", words: words.join("; ") }];
  });
  const gone = before.filter((part) => !here.has(nameOf(part)));
  return [
    ...changed,
    ...gone.map((part): PartChange => ({ part, change: "removed", words: `${part.u} ${part.unit}` })),
  ];
}

const labels = {
  u: "size",
  kind: "kind",
  evaluation: "type",
  distribution: "distribution",
  dof: "degrees of freedom",
  source: "source",
} as const;

const shown = (value: string | number | null): string =>
  value === null ? "infinite" : String(value).replaceAll("_", " ");
