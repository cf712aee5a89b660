import type { AxisFinding } from "./axis-search";
import { leader } from "./blade-count";
import { cylinderSections } from "./blade-sections";
import { castColumns } from "./columns";
import { solidStretches } from "./column-solids";

const SPANS = [0.3, 0.4, 0.5, 0.6, 0.7];
const ANGLES = 1440;

/** Struts, and the share of the cylinders looked at that agree on their number. */
export interface StrutCount {
  readonly count: number;
  readonly confidence: number;
}

/** Shells that belong to no row of blades, of parts that look as if they turned (a mount's boss) too. */
export function standingShells({ search }: AxisFinding): ReadonlySet<number> {
  const bladed = new Set(search.rows.flatMap(({ group }) => [...group.shells]));
  const all = [...search.split.standing, ...search.split.groups.flatMap(({ shells }) => [...shells])];
  return new Set(all.filter((shell) => !bladed.has(shell)));
}

/** Struts that cross the annulus of the first rotor and stand still; null where nothing stands still in the file. */
export function countStruts(finding: AxisFinding): StrutCount | null {
  const { mesh, search } = finding;
  const row = search.rows[0]?.row;
  const standing = standingShells(finding);
  if (!row || standing.size === 0) return null;
  const radiiMm = Float64Array.from(SPANS, (span) => row.hubRadiusMm + span * (row.tipRadiusMm - row.hubRadiusMm));
  const columns = castColumns(mesh, search.shellOf, { radiiMm, angles: ANGLES });
  const solids = solidStretches(columns, (shell) => standing.has(shell), 0);
  const votes = new Map<number, number>();
  SPANS.forEach((_, i) => {
    const { sections, closedRing } = cylinderSections(solids, i, -Infinity, Infinity);
    if (!closedRing) votes.set(sections.length, (votes.get(sections.length) ?? 0) + 1);
  });
  const found = leader(votes);
  // Cylinders that something closes around have no say, and make it less sure.
  const said = [...votes.values()].reduce((sum, count) => sum + count, 0);
  return found ? { count: found.value, confidence: (found.share * said) / SPANS.length } : null;
}
