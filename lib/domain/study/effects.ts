import { fitWithinCells, type CellFit } from "@/lib/science/statistics/cell-effects";
import { at } from "@/lib/science/statistics/descriptive";
import { studentTQuantile, studentTTwoSided } from "@/lib/science/statistics/distributions";
import { clusterErrors, numbered } from "@/lib/science/statistics/robust-errors";
import { designOf, type Design, type DesignColumn, type Refusal } from "./design-columns";
import { modelValue, shownEffect, type OutcomeKey } from "./outcomes";
import { cellOf, type StudyEntry } from "./study-entry";
import type { TraitKey } from "./traits";
import { wildBootstrap } from "./wild-bootstrap";
import { directionsOf, groupsOf, reversed, type Groups } from "./within-cells";

/** Effects whose inflation lies above this can't be told from the others (handbook's limit). */
export const VIF_MAX = 10;
/** From so many designers on, cluster errors stand by themselves; below, the wild cluster bootstrap. */
export const CLUSTERS_FOR_T = 30;
/** Fewer designers can't reach p = 0.05 by signs alone: 2/2⁵ = 0.0625. */
export const CLUSTERS_MIN = 6;

/** What one step of a measure, or one level of a choice against its reference, goes with; in the outcome's unit. */
export interface Effect {
  readonly key: string;
  readonly trait: TraitKey;
  readonly level?: string;
  readonly reference?: string;
  readonly step?: number;
  readonly n: number;
  readonly estimate?: number;
  readonly low?: number;
  readonly high?: number;
  readonly p?: number;
  /** p adjusted over everything tried on the page (Benjamini and Hochberg). */
  readonly q?: number;
  readonly vif?: number;
  /** The trait alone, all entries together; alone with one level a cell. */
  readonly pooled?: number;
  readonly within?: number;
  readonly cellsDown?: number;
  readonly cellsUp?: number;
  readonly reversed?: boolean;
  readonly why?: Refusal;
}

export interface EffectsFit {
  readonly n: number;
  readonly cells: number;
  readonly designers: number;
  readonly leftOut: number;
  readonly dof?: number;
  readonly residualSd?: number;
  /** How errors are formed: t on designers − 1, or signs drawn a designer. */
  readonly errors: "cluster-t" | "wild-bootstrap" | "none";
  readonly draws?: number;
  readonly effects: readonly Effect[];
}

type Fitted = { columns: readonly DesignColumn[]; fit: CellFit };
type Refused = Design["refused"][number];

/**
 * ln(ratio) or level difference on the traits' columns with one level a cell (season × bench version × protocol ×
 * baseline unit), designers as clusters. An effect that isn't identified is refused with its reason and left out of the
 * model. Estimates and ends are per step, in the outcome's unit (% for ratios, dB).
 * @param seed of the bootstrap's draws
 */
export function fitEffects(
  keys: readonly TraitKey[],
  outcome: OutcomeKey,
  entries: readonly StudyEntry[],
  seed: number,
): EffectsFit {
  const reached = entries.filter((entry) => modelValue(outcome, entry) !== undefined);
  const design = designOf(keys, reached);
  const { rows } = design;
  const y = Float64Array.from(rows, (entry) => modelValue(outcome, entry) ?? Number.NaN);
  const cells = rows.map(cellOf);
  const labels = rows.map((entry) => entry.designer);
  const [cell, cluster] = [groupsOf(cells), numbered(labels)];
  const baselines = groupsOf(rows.map((entry) => entry.baselineUnitId));
  const { fitted, refused } = identified(design, y, cells, cell);
  const base = {
    n: rows.length,
    cells: cell.count,
    designers: cluster.count,
    leftOut: entries.length - rows.length,
  };
  const said = (column: DesignColumn) => described(column, outcome, directionsOf(column.values, y, cell, baselines));
  const refusals = refused.map((each): Effect => {
    const column = design.columns.find(({ key }) => key === each.key);
    return {
      ...(column ? said(column) : { key: each.key, trait: each.trait, level: each.level, n: each.n }),
      why: each.why,
    };
  });
  const few = cluster.count < CLUSTERS_MIN;
  const robust = fitted && !few ? clusterErrors(fitted.fit.within, fitted.fit.fit, labels, cell.count) : undefined;
  if (!fitted || !robust) {
    const why = few ? "too-few-designers" : "too-few-rows";
    const none = (fitted?.columns ?? []).map((column): Effect => ({ ...said(column), why }));
    return { ...base, errors: "none", effects: inOrder(keys, [...none, ...refusals]) };
  }
  const { fit, within } = fitted.fit;
  const wild = cluster.count < CLUSTERS_FOR_T;
  const t = fitted.columns.map((_, j) => at(fit.coefficients, j) / at(robust.errors, j));
  let draws: number | undefined;
  const effects = fitted.columns.map((column, j): Effect => {
    const error = at(robust.errors, j);
    if (!(error > 0)) return { ...said(column), why: "exact" };
    const { residuals, coefficients, inverse } = fit;
    const input = { columns: within, residuals, coefficients, cell: cell.index, cells: cell.count, inverse, t };
    const drawn = wild
      ? wildBootstrap({ ...input, cluster: cluster.index, clusters: cluster.count }, j, seed)
      : undefined;
    draws = drawn?.draws;
    const reach = (drawn?.quantile ?? studentTQuantile(0.975, robust.dof)) * error;
    const [b, step] = [at(fit.coefficients, j), column.step];
    const end = (beta: number) => shownEffect(outcome, beta * step);
    return {
      ...said(column),
      estimate: end(b),
      ...(Number.isFinite(reach) ? { low: end(b - reach), high: end(b + reach) } : {}),
      p: drawn?.p ?? studentTTwoSided(at(Float64Array.from(t), j), robust.dof),
      vif: inflation(fitted.fit, j),
    };
  });
  return {
    ...base,
    dof: fit.dof,
    residualSd: fit.residualSd,
    errors: wild ? "wild-bootstrap" : "cluster-t",
    ...(draws === undefined ? {} : { draws }),
    effects: inOrder(keys, [...effects, ...refusals]),
  };
}

function described(column: DesignColumn, outcome: OutcomeKey, directions: ReturnType<typeof directionsOf>): Effect {
  const { key, trait, level, reference, n, step } = column;
  const alone = (slope: number | undefined) => (slope === undefined ? undefined : shownEffect(outcome, slope * step));
  return {
    key,
    trait,
    ...(level === undefined ? { step } : { level, reference }),
    n,
    pooled: alone(directions.pooled),
    within: alone(directions.within),
    cellsDown: directions.down,
    cellsUp: directions.up,
    reversed: reversed(directions),
  };
}

/** Variance inflation from the fit itself: (XᵀX)⁻¹ⱼⱼ · Σ x², the columns less their cell means. */
function inflation({ fit, within }: CellFit, j: number): number {
  const column = within[j] ?? new Float64Array(0);
  return at(fit.inverse[j] ?? [], j) * column.reduce((total, v) => total + v * v, 0);
}

/** Leaves out, one at a time and with its reason, what the data can't tell apart, until the rest has a fit. */
function identified(
  design: Design,
  y: Float64Array,
  cells: readonly string[],
  cell: Groups,
): { fitted: Fitted | undefined; refused: readonly Refused[] } {
  let columns = design.columns;
  const refused: Refused[] = [...design.refused];
  const refuse = (index: number, why: Refusal) => {
    const column = columns[index];
    if (column) refused.push({ ...column, why });
    columns = columns.filter((each) => each !== column);
  };
  while (columns.length > 0) {
    const fit = fitWithinCells(
      columns.map(({ values }) => values),
      y,
      cells,
    );
    if ("refused" in fit) {
      if (fit.refused === "too-few-rows" || fit.column === undefined) {
        for (const column of columns) refused.push({ ...column, why: "too-few-rows" });
        return { fitted: undefined, refused };
      }
      const values = columns[fit.column]?.values ?? y;
      const unseen = directionsOf(values, y, cell, cell).within === undefined;
      refuse(fit.column, unseen ? "varies-in-no-cell" : "not-apart");
      continue;
    }
    const inflations = columns.map((_, j) => inflation(fit, j));
    const worst = inflations.indexOf(Math.max(...inflations));
    if (at(inflations, worst) <= VIF_MAX) return { fitted: { columns, fit }, refused };
    refuse(worst, "not-apart");
  }
  return { fitted: undefined, refused };
}

function inOrder(keys: readonly TraitKey[], effects: readonly Effect[]): Effect[] {
  return [...effects].sort((a, b) => keys.indexOf(a.trait) - keys.indexOf(b.trait) || (a.key < b.key ? -1 : 1));
}
