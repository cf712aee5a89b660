import { groupBy } from "../group-by";
import { effectiveDof, standardUncertainty, type Effect, type EffectKind, type Quantity } from "./effects";

/** A line of a budget that a person can open: one kind of part of one quantity, of one subject or of the session. */
export type BudgetLine = {
  readonly quantity: Quantity;
  readonly kind: EffectKind;
  /** A subject's key, or the session where the part is shared. */
  readonly owner: string;
  /** Size in the figure's unit: sensitivity × standard uncertainty. */
  readonly u: number;
  /** Share of the figure's variance, 0..1; the lines of a budget add to 1, or to 0 without any uncertainty. */
  readonly share: number;
  readonly dof: number;
  /** What the part would be were the figure not taken against the baseline; undefined where it has no part there. */
  readonly uAlone: number | undefined;
  /** Against the baseline: a part that both share is gone, or smaller, or grown; a part that they don't share stays. */
  readonly cancels: "fully" | "partly" | "no";
};

/** Below this share of its size alone a shared part counts as gone. */
const GONE = 1e-6;

/**
 * The budget of a figure, largest line first.
 * @param effects on the figure, as taken against the baseline
 * @param alone effects on the same figure of the entry without the baseline, in the same unit (for a difference in K:
 * those on the entry's ΔT); empty where there is no such figure, and then nothing is said to cancel
 */
export function budgetLines(effects: readonly Effect[], alone: readonly Effect[] = []): BudgetLine[] {
  const total = standardUncertainty(effects) ** 2;
  const nameOf = ({ quantity, kind, owner }: Effect) => `${quantity} ${kind} ${owner}`;
  const before = groupBy(alone, nameOf);
  return [...groupBy(effects, nameOf)]
    .flatMap(([name, group]): BudgetLine[] => {
      const [first] = group;
      if (!first) return [];
      const u = standardUncertainty(group);
      const same = before.get(name);
      const uAlone = same && standardUncertainty(same);
      return [
        {
          quantity: first.quantity,
          kind: first.kind,
          owner: first.owner,
          u,
          share: total > 0 ? u ** 2 / total : 0,
          dof: effectiveDof(group),
          uAlone,
          cancels: cancelling(first.kind, u, uAlone),
        },
      ];
    })
    .sort((a, b) => b.u - a.u);
}

function cancelling(kind: EffectKind, u: number, uAlone: number | undefined): BudgetLine["cancels"] {
  if ((kind !== "shared_offset" && kind !== "shared_gain") || uAlone === undefined || uAlone === 0) return "no";
  if (u <= GONE * uAlone) return "fully";
  return u < uAlone ? "partly" : "no";
}
