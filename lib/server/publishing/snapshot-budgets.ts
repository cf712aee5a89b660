import type { BudgetLine, Budgets } from "@/lib/contracts/publication";
import { budgetLines } from "@/lib/domain/results/budget";
import { combineEffects, type Effect } from "@/lib/domain/results/effects";
import { readResistance } from "@/lib/domain/results/methods/v1/cooling-curve";
import type { EqualCoolingReading } from "@/lib/domain/results/methods/v1/equal-noise";
import { dofOrNull, roundResult } from "@/lib/domain/results/rounding";
import type { SubjectFigures } from "@/lib/domain/results/session-figures";
import type { SessionRecord } from "@/lib/domain/results/session-record";

type Line = Omit<BudgetLine, "parts">;

const ownerOf = (owner: string): BudgetLine["of"] =>
  owner.startsWith("baseline ") ? "baseline" : owner.startsWith("entry ") ? "entry" : "session";

/** Lines of a figure's budget, largest first, rounded as they are stored; `alone` as in budgetLines. */
function linesOf(effects: readonly Effect[], alone: readonly Effect[]): Line[] {
  return budgetLines(effects, alone).map((line) => ({
    quantity: line.quantity,
    kind: line.kind,
    of: ownerOf(line.owner),
    u: roundResult(line.u),
    share: roundResult(line.share),
    dof: dofOrNull(line.dof),
    cancels: line.cancels,
  }));
}

/** The lines of the headline difference's budget, with the bench's own parts behind each. */
export function headlineBudget(
  record: SessionRecord,
  effects: readonly Effect[],
  alone: readonly Effect[],
): BudgetLine[] {
  return linesOf(effects, alone).map((line) => ({
    ...line,
    parts: record.budget
      .filter(
        (part) => part.quantity === (line.quantity === "level" ? "level_dba" : "delta_t_k") && part.kind === line.kind,
      )
      .map(({ name, evaluation, u, source }) => ({ name, evaluation, u, source })),
  }));
}

/**
 * Budgets of an entry's other figures: the level at equal cooling, and at each set speed the level and ΔT alone and
 * against the baseline. What cancels is told by the same figure without the baseline, in the same unit.
 */
export function figureBudgets(
  record: SessionRecord,
  own: SubjectFigures,
  cooling: EqualCoolingReading | undefined,
): Budgets {
  const figures: Budgets["figures"] = [];
  if (cooling) {
    const there = own.curve && readResistance(own.curve, cooling.entryLevelDba);
    const alone = there ? combineEffects([{ factor: -1 / there.slope, effects: there.effects }]) : [];
    figures.push({ figure: "equal-cooling", setSpeed: null, lines: linesOf(cooling.effects, alone) });
  }
  for (const point of own.points) {
    const setSpeed = point.setSpeedRpm;
    figures.push({ figure: "level", setSpeed, lines: linesOf(point.levelEffects, []) });
    figures.push({ figure: "delta-t", setSpeed, lines: linesOf(point.deltaTEffects, []) });
    const against = own.against.get(setSpeed);
    if (!against) continue;
    const ratioAlone = combineEffects([
      { factor: against.resistanceRatio.value / point.deltaTK, effects: point.deltaTEffects },
    ]);
    figures.push(
      {
        figure: "level-difference",
        setSpeed,
        lines: linesOf(against.levelDifferenceDb.effects, point.levelEffects),
      },
      {
        figure: "delta-t-difference",
        setSpeed,
        lines: linesOf(against.deltaTDifferenceK.effects, point.deltaTEffects),
      },
      { figure: "resistance-ratio", setSpeed, lines: linesOf(against.resistanceRatio.effects, ratioAlone) },
    );
  }
  return {
    parts: record.budget.map(({ quantity, kind, name, evaluation, u, dof, source }) => ({
      quantity: quantity === "level_dba" ? "level" : "delta_t",
      kind,
      name,
      evaluation,
      u,
      dof,
      source,
    })),
    figures,
  };
}
