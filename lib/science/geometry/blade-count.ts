import { median } from "@/lib/science/statistics/descriptive";
import { cylinderSections, type BladeSection } from "./blade-sections";
import type { Solids } from "./column-solids";
import type { RowTable } from "./row-table";

/** What one cylinder says about the blades of a band. */
export interface CylinderFindings {
  readonly radiusMm: number;
  /** Blades by connected pieces; undefined where something closes around the axis. */
  readonly byPieces: number | undefined;
  /** Blades by runs on circles: the commonest number over the heights. */
  readonly byRuns: number | undefined;
  readonly sections: BladeSection[];
}

const FILL_MIN = 0.02;
const FILL_MAX = 0.75;
const FRAGMENT_SHARE = 0.3;

/** Counts on one cylinder between two heights; the table has the same radii as the solids. */
export function cylinderFindings(
  solids: Solids,
  table: RowTable,
  i: number,
  fromMm: number,
  toMm: number,
): CylinderFindings {
  const { sections, closedRing } = cylinderSections(solids, i, fromMm, toMm);
  const largest = Math.max(0, ...sections.map((s) => s.areaMm2));
  const typical = median(sections.map((s) => s.areaMm2).filter((area) => area > 0.05 * largest));
  const blades = sections.filter((s) => s.areaMm2 > FRAGMENT_SHARE * (typical ?? 0));
  return {
    radiusMm: table.radiiMm[i] ?? 0,
    byPieces: closedRing || blades.length === 0 ? undefined : blades.length,
    byRuns: commonestRuns(table, i, fromMm, toMm),
    sections: blades,
  };
}

function commonestRuns(table: RowTable, i: number, fromMm: number, toMm: number): number | undefined {
  const rows = table.heightsMm.length;
  const votes = new Map<number, number>();
  for (let j = 0; j < rows; j++) {
    const height = table.heightsMm[j] ?? 0;
    const fill = table.fill[i * rows + j] ?? 0;
    const runs = table.runs[i * rows + j] ?? 0;
    if (height < fromMm || height > toMm || fill < FILL_MIN || fill > FILL_MAX || runs < 1) continue;
    votes.set(runs, (votes.get(runs) ?? 0) + 1);
  }
  return leader(votes)?.value;
}

/** The number with the most votes and its share of all; undefined without votes. Ties go to the larger number. */
export function leader(votes: ReadonlyMap<number, number>): { value: number; share: number } | undefined {
  let best: { value: number; votes: number } | undefined;
  let total = 0;
  for (const [value, count] of votes) {
    total += count;
    if (!best || count > best.votes || (count === best.votes && value > best.value)) best = { value, votes: count };
  }
  return best && { value: best.value, share: best.votes / total };
}

/** Two agreeing cylinders each inside and outside make splitters; one may be a fragment. */
const SPLIT_CYLINDERS = 2;

/**
 * Blades of two lengths: every cylinder up to some radius shows one number, every one past it a smaller one, at least
 * half as large. The number that reaches the tips, and the other one; undefined where the counts tell no such thing.
 */
export function splitCount(findings: readonly CylinderFindings[]): { long: number; all: number } | undefined {
  const counts = findings.map((f) => f.byPieces).filter((count) => count !== undefined);
  const [all, long] = [counts[0], counts[counts.length - 1]];
  if (all === undefined || long === undefined || long < 2 || all <= long || all > 2 * long) return undefined;
  const change = counts.indexOf(long);
  const clean = counts.every((count, i) => count === (i < change ? all : long));
  return clean && change >= SPLIT_CYLINDERS && counts.length - change >= SPLIT_CYLINDERS ? { long, all } : undefined;
}
