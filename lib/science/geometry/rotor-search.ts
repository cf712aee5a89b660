import { bladeBands, radialProfiles } from "./blade-bands";
import { bladeRow, type BladeRow, type TurningPart } from "./blade-row";
import { castColumns, type Columns } from "./columns";
import { solidStretches } from "./column-solids";
import type { Mesh } from "./mesh";
import { shellOverlaps, type OverlapReport } from "./overlaps";
import { outerRadius } from "./polar";
import { rowTable } from "./row-table";
import { onlyShells } from "./shells";
import { splitParts, type PartSplit, type TurningGroup } from "./turning-parts";

/** How finely a search samples. */
export interface SearchGrid {
  readonly radii: number;
  readonly angles: number;
  readonly rows: number;
}

export const coarseGrid: SearchGrid = { radii: 48, angles: 480, rows: 96 };
export const fineGrid: SearchGrid = { radii: 80, angles: 1440, rows: 144 };

/** A row that reaches less far than this share of the widest one beside it is a stub. */
const STUB_SHARE = 0.55;

/** A hub further out has to be surer by this factor. */
const OUTER_HUB_GAIN = 1.1;

/** A row of blades and the group of shells that it turns with. */
export interface FoundRow {
  readonly row: BladeRow;
  readonly group: TurningGroup;
}

/** All that was found about one axis, which stands on z. */
export interface RotorSearch {
  /** Shell of each triangle that took part. */
  readonly shellOf: Int32Array;
  readonly rows: FoundRow[];
  readonly split: PartSplit;
  readonly overlaps: OverlapReport;
  readonly columns: Columns;
  /** Sum of the rows' confidences: how well this axis explains the file. */
  readonly score: number;
}

/** Evenly spaced radii from the axis to the farthest vertex of the triangles kept. */
export function radiiTo(outerMm: number, count: number): Float64Array {
  return Float64Array.from({ length: count }, (_, i) => ((i + 0.5) / count) * outerMm);
}

/**
 * Looks for rows of blades about the z axis of a mesh. Rows come in order along z. `tinyMm` is the length below which
 * solids touch rather than overlap. A file in which nothing but a frame is found is searched as a whole, in case rotor
 * and frame touch; blades that reach the frame are struts then, not blades.
 */
export function searchRotors(
  mesh: Mesh,
  shellOf: Int32Array,
  shells: number,
  grid: SearchGrid,
  tinyMm: number,
): RotorSearch {
  const outer = outerRadius(mesh, shellOf);
  const columns = castColumns(mesh, shellOf, { radiiMm: radiiTo(outer, grid.radii), angles: grid.angles });
  const overlaps = shellOverlaps(columns, shells, tinyMm);
  const split = splitParts(mesh, shellOf, columns, overlaps.bodyOf, overlaps.bodyCount, tinyMm);
  const rows = split.groups.flatMap((group) => {
    const everything = split.groups.length === 1 && split.standing.size === 0;
    return rowsOfGroup(mesh, shellOf, group, grid, tinyMm, everything ? columns : undefined);
  });
  if (rows.length === 0 && split.standing.size > 0) {
    const all = Array.from({ length: shells }, (_, shell) => shell);
    const whole: TurningGroup = { shells: new Set(all), fromZMm: -Infinity, toZMm: Infinity };
    const found = rowsOfGroup(mesh, shellOf, whole, grid, tinyMm).filter(
      ({ row }) => !row.shroud && row.sweptRadiusMm < 0.9 * outer,
    );
    rows.push(...found);
  }
  rows.sort((a, b) => a.row.fromZMm + a.row.toZMm - b.row.fromZMm - b.row.toZMm);
  return { shellOf, rows, split, overlaps, columns, score: rows.reduce((sum, { row }) => sum + row.confidence, 0) };
}

function rowsOfGroup(
  mesh: Mesh,
  shellOf: Int32Array,
  group: TurningGroup,
  grid: SearchGrid,
  tinyMm: number,
  cast?: Columns,
): FoundRow[] {
  const own = onlyShells(shellOf, group.shells);
  const columns =
    cast ?? castColumns(mesh, own, { radiiMm: radiiTo(outerRadius(mesh, own), grid.radii), angles: grid.angles });
  const include = (shell: number): boolean => group.shells.has(shell);
  const solids = solidStretches(columns, include, tinyMm);
  let [low, high] = [Infinity, -Infinity];
  for (const z of solids.ends) {
    low = Math.min(low, z);
    high = Math.max(high, z);
  }
  if (!(high > low)) return [];
  const table = rowTable(solids, low, high, grid.rows);
  const part: TurningPart = { mesh, shellOf: own, include, tinyMm };
  const found = bladeBands(table).flatMap((band) => {
    const rows = radialProfiles(table, band).map((profile) => bladeRow(part, table, band, profile, grid.angles));
    // Blades through a ring at part span are as sure from its outside on; spokes inside a hub's ring make it less sure.
    const row = rows.reduce((a, b) => (b && b.confidence > OUTER_HUB_GAIN * (a?.confidence ?? 0) ? b : a), undefined);
    return row ? [{ row, group }] : [];
  });
  // Stubs on the same shaft (blade roots past the hub's end, set screws, spokes) are no rotor of their own.
  const widest = Math.max(0, ...found.map(({ row }) => row.tipRadiusMm));
  return found.filter(({ row }) => row.tipRadiusMm > STUB_SHARE * widest);
}
