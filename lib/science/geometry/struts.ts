import type { AxisFinding } from "./axis-search";
import { leader } from "./blade-count";
import { cylinderSections } from "./blade-sections";
import { castColumns } from "./columns";
import { solidStretches } from "./column-solids";

const SPANS = [0.3, 0.4, 0.5, 0.6, 0.7];
const ANGLES = 1440;

/** Struts that cross the annulus of the first rotor and stand still; null where nothing stands still in the file. */
export function countStruts(finding: AxisFinding): number | null {
  const { mesh, search } = finding;
  const row = search.rows[0]?.row;
  if (!row || search.split.standing.size === 0) return null;
  const { standing } = search.split;
  const radiiMm = Float64Array.from(SPANS, (span) => row.hubRadiusMm + span * (row.tipRadiusMm - row.hubRadiusMm));
  const columns = castColumns(mesh, search.shellOf, { radiiMm, angles: ANGLES });
  const solids = solidStretches(columns, (shell) => standing.has(shell), 0);
  const votes = new Map<number, number>();
  SPANS.forEach((_, i) => {
    const { sections, closedRing } = cylinderSections(solids, i, -Infinity, Infinity);
    if (!closedRing) votes.set(sections.length, (votes.get(sections.length) ?? 0) + 1);
  });
  return leader(votes)?.value ?? null;
}
