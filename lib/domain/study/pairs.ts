import { coverageFactor95, welchSatterthwaite } from "@/lib/science/statistics/uncertainty";
import { modelUncertainty, modelValue, outcomes, shownEffect, type OutcomeKey } from "./outcomes";
import { sameCell, type StudyEntry } from "./study-entry";
import { traitKeys, traitOf, type TraitKey, type TraitValue } from "./traits";

/** A revision and the one it was made from. */
export interface Derivation {
  readonly revisionId: string;
  readonly fromRevisionId: string;
}

/** Two entries whose models differ in one trait alone; `change` is later against earlier, in the outcome's unit. */
export interface Pair {
  readonly trait: TraitKey;
  readonly fromEntryId: string;
  readonly toEntryId: string;
  readonly fromValue: string | number;
  readonly toValue: string | number;
  readonly change: number;
  /** The same on the model's scale: difference of ln(ratio), or dB. */
  readonly delta: number;
  /** Half-width of its 95 % interval; sessions taken as independent, so at most this. */
  readonly expanded: number;
  /** Same round, same cell, or different cells (seasons, benches): what the two have in common. */
  readonly together: "round" | "cell" | "no";
  readonly designer: string;
}

/** Why a revision and its forerunner make no pair. */
export interface PairCounts {
  readonly derivations: number;
  readonly severalTraits: number;
  readonly noTrait: number;
  readonly otherBaseline: number;
  readonly otherDesigner: number;
  readonly notReached: number;
}

const joined = (a: StudyEntry, b: StudyEntry): Pair["together"] =>
  !sameCell(a, b) ? "no" : a.roundNumber === b.roundNumber ? "round" : "cell";

/** How near two entries were measured: the same round before the same cell, else the fewest seasons apart. */
function distance(a: StudyEntry, b: StudyEntry): number {
  const has = joined(a, b);
  return has === "round" ? 0 : has === "cell" ? 1 : 2 + Math.abs(a.seasonNumber - b.seasonNumber);
}

/**
 * Traits in which two models differ beyond tolerance. What follows from others (mass, print time), a stack's length
 * where one has no stack, and solidity that moved with the number of blades alone make no further difference.
 */
export function differingTraits(a: StudyEntry, b: StudyEntry): TraitKey[] {
  const differs = traitKeys.filter((key) => {
    const trait = traitOf(key);
    if (trait.follows) return false;
    const [before, after] = [trait.of(a), trait.of(b)];
    // Known of one alone: it goes with a trait that differs itself (stages, stack), or can't be told.
    if (before === undefined || after === undefined) return before !== after && !goesWith(key);
    return typeof before === "number" && typeof after === "number"
      ? Math.abs(after - before) > trait.tolerance + 1e-9
      : before !== after;
  });
  if (!differs.includes("blades") || a.solidityMid === undefined || b.solidityMid === undefined) return differs;
  const asBlades = Math.abs((b.solidityMid / a.solidityMid) * (a.bladesFirst / b.bladesFirst) - 1) < 0.03;
  return asBlades ? differs.filter((key) => key !== "solidity") : differs;
}

const goesWith = (key: TraitKey) => ["rotation", "blades2", "inletmm", "spacer"].includes(key);

/** Pairs of revisions that differ in one trait, nearest entries first taken; and why the rest make none. */
export function pairsOf(
  derivations: readonly Derivation[],
  entries: readonly StudyEntry[],
  outcome: OutcomeKey,
): { pairs: Pair[]; counts: PairCounts } {
  const byRevision = new Map<string, StudyEntry[]>();
  for (const entry of entries) {
    const known = byRevision.get(entry.revisionId);
    if (known) known.push(entry);
    else byRevision.set(entry.revisionId, [entry]);
  }
  const counts = { derivations: 0, severalTraits: 0, noTrait: 0, otherBaseline: 0, otherDesigner: 0, notReached: 0 };
  const pairs: Pair[] = [];
  for (const { revisionId, fromRevisionId } of derivations) {
    const nearest = nearestOf(byRevision.get(fromRevisionId) ?? [], byRevision.get(revisionId) ?? []);
    if (!nearest) continue;
    counts.derivations++;
    const [from, to] = nearest;
    const made = pairFrom(from, to, outcome);
    if (typeof made === "string") counts[made]++;
    else pairs.push(made);
  }
  return { pairs, counts };
}

/** Of all that were measured before and after, the two that lie nearest; of equals the first. */
function nearestOf(befores: readonly StudyEntry[], afters: readonly StudyEntry[]) {
  let nearest: readonly [StudyEntry, StudyEntry] | undefined;
  let best = Infinity;
  for (const to of afters)
    for (const from of befores) {
      const far = distance(from, to);
      if (far >= best) continue;
      best = far;
      nearest = [from, to];
    }
  return nearest;
}

const worth = (value: TraitValue): string | number => value ?? "none";

function pairFrom(from: StudyEntry, to: StudyEntry, outcome: OutcomeKey): Pair | keyof PairCounts {
  const [trait, ...more] = differingTraits(from, to);
  if (!trait) return "noTrait";
  if (more.length > 0) return "severalTraits";
  if (from.designer !== to.designer) return "otherDesigner";
  if (from.baselineUnitId !== to.baselineUnitId) return "otherBaseline";
  const between = changeBetween(from, to, outcome);
  if (!between) return "notReached";
  return {
    trait,
    fromEntryId: from.entryId,
    toEntryId: to.entryId,
    fromValue: worth(traitOf(trait).of(from)),
    toValue: worth(traitOf(trait).of(to)),
    ...between,
    designer: to.designer,
  };
}

/**
 * How a figure changed from one entry to another against one baseline unit, later against earlier, with the half-width of its
 * 95 % interval (sessions taken as independent). Undefined where one of them didn't reach it.
 */
export function changeBetween(
  from: StudyEntry,
  to: StudyEntry,
  outcome: OutcomeKey,
): Pick<Pair, "change" | "delta" | "expanded" | "together"> | undefined {
  const [before, after] = [modelValue(outcome, from), modelValue(outcome, to)];
  const figures = [outcomes[outcome].of(from), outcomes[outcome].of(to)].flatMap((figure) => figure ?? []);
  if (before === undefined || after === undefined) return undefined;
  const parts = figures.map((figure) => ({ u: modelUncertainty(outcome, figure), dof: figure.dof ?? Infinity }));
  const u = Math.hypot(...parts.map((part) => part.u));
  const k = u > 0 ? coverageFactor95(welchSatterthwaite(parts)) : 0;
  const change = shownEffect(outcome, after - before);
  return {
    change,
    delta: after - before,
    // The wider side of the interval, which for a ratio is the upper one.
    expanded: shownEffect(outcome, after - before + k * u) - change,
    together: joined(from, to),
  };
}

/** Chains: pairs that follow one another, each by its index, the earliest first; only those of two steps or more. */
export function chainsOf(pairs: readonly Pair[]): number[][] {
  const next = new Map(pairs.map((pair, index) => [pair.fromEntryId, index]));
  const reached = new Set(pairs.map((pair) => pair.toEntryId));
  const starts = pairs.flatMap((pair, index) => (reached.has(pair.fromEntryId) ? [] : [index]));
  return starts
    .map((start) => {
      const chain: number[] = [];
      for (let at: number | undefined = start; at !== undefined && !chain.includes(at);) {
        chain.push(at);
        at = next.get(pairs[at]?.toEntryId ?? "");
      }
      return chain;
    })
    .filter((chain) => chain.length > 1);
}
