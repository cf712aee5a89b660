import { castColumns, TooManyCrossings } from "./columns";
import { solidStretches } from "./column-solids";
import type { AnalysisOptions, MeshAnalysis } from "./analysis-types";
import { analysisWarnings } from "./analysis-warnings";
import { boxUpright, findAxis, type AxisFinding } from "./axis-search";
import { withPositiveLead } from "./axis-directions";
import { pointInFile } from "./axis-frame";
import { fitInFrame } from "./frame-fit";
import { massProperties, shellIntegrals, addIntegrals, type SolidIntegrals } from "./mass-properties";
import { diagonalMm, meshBounds, middleOf, signedVolume, type Mesh, type Vec3 } from "./mesh";
import { shellOverlaps } from "./overlaps";
import { outerRadius } from "./polar";
import { radiiTo, type FoundRow, type RotorSearch } from "./rotor-search";
import { rotorTraits, type MeasuredRow } from "./rotor-traits";
import { onlyShells, SHELLS_MAX, shellReport, withoutCrumbs, withShellsTurned, type ShellReport } from "./shells";
import { readDucts } from "./standing-parts";
import { countStruts } from "./struts";
import { Refusal } from "@/lib/science/refusal";
import { evenAngles, excessIntegrals, sumIntegrals, zoneIntegrals } from "./union";

/** PLA, the usual print; a person names another density. */
export const DENSITY_DEFAULT_GCM3 = 1.24;
const TINY_SHARE = 1e-5;
const PROBE = { radii: 64, angles: 480 };
const FILE_AXES: Readonly<Record<"x" | "y" | "z", Vec3>> = { x: [1, 0, 0], y: [0, 1, 0], z: [0, 0, 1] };

/**
 * Everything that is read from a mesh in mm: validity, mass, axis, rotors with their traits, balance and stress, and
 * the fit to a frame. Pure: the browser's worker and the server's share it. Masses are null for a mesh that isn't closed
 * and oriented; rotors and axis are empty and null where no blades are found. Throws a Refusal (code "empty" or
 * "no-extent") for a mesh without triangles or without size.
 */
export function analyseMesh(meshIn: Mesh, options: AnalysisOptions = {}): MeshAnalysis {
  try {
    return analyse(meshIn, options, true);
  } catch (error) {
    // Triangles by the thousand that reach right across: only what edges and areas tell is told.
    if (error instanceof TooManyCrossings) return analyse(meshIn, options, false);
    throw error;
  }
}

function analyse(meshIn: Mesh, options: AnalysisOptions, closely: boolean): MeshAnalysis {
  const bounds = meshBounds(meshIn);
  if (!bounds) throw new Refusal("empty", "The file holds no triangles.");
  const diagonal = diagonalMm(bounds);
  if (!(diagonal > 0)) throw new Refusal("no-extent", "All triangles of the file lie in one point.");
  const middle = middleOf(bounds);
  const tiny = TINY_SHARE * diagonal;
  const first = shellReport(meshIn, middle);
  const soup = !closely || first.edges.shellCount > SHELLS_MAX;
  const { report, turned } = soup ? { report: first, turned: 0 } : turnedOutward(first, middle, tiny);
  const { mesh, edges } = report;
  // Copies take no part in anything but the counts: the union has each place once.
  const copied = report.copyOf.some((copy) => copy !== undefined);
  const shellOf =
    soup || copied
      ? edges.shellOf.map((shell) => (soup ? Math.min(shell, 0) : report.copyOf[shell] === undefined ? shell : -1))
      : edges.shellOf;
  const shells = soup ? 1 : edges.shellCount;
  const watertight = edges.openEdges === 0 && edges.misorientedEdges === 0 && edges.shellCount > 0;
  const { searched, crumbs } = withoutCrumbs(shellOf, soup ? [] : report.areasMm2);
  const volumeMm3 = (): number =>
    watertight && turned === 0 ? report.integrals.reduce((sum, shell) => sum + shell.volumeMm3, 0) : signedVolume(mesh);
  const finding = soup
    ? undefined
    : findAxis(mesh, searched, shells, tiny, { bounds, volumeMm3 }, options.axis && FILE_AXES[options.axis]);
  const upright = finding ?? boxUpright(mesh, middle);
  const overlapLines =
    finding?.search.overlaps.overlapLines ?? (soup ? 0 : probe(upright.mesh, shellOf, shells, tiny).overlapLines);
  const overlap = copied || overlapLines > 0;
  const density = options.densityGCm3 ?? DENSITY_DEFAULT_GCM3;
  // Upright about its middle, as nothing turns, the mesh has the integrals that the report took there.
  const asReported = !finding && shellOf === edges.shellOf && turned === 0;
  const { integrals } = asReported
    ? { integrals: report.integrals.map((one): SolidIntegrals => ({ ...one, originMm: [0, 0, 0] })) }
    : shellIntegrals(upright.mesh, shellOf, shells, [0, 0, 0]);
  const blades = finding?.search.rows[0]?.row.blades ?? 1;
  const excess = excessOf(upright.mesh, evenAngles(blades), finding?.search);
  const whole =
    watertight && !soup
      ? lessExcess(sumIntegrals(integrals), overlapLines > 0 ? excess(shellOf) : undefined)
      : undefined;
  const mass = whole && massProperties(whole, density);
  const measured = finding
    ? finding.search.rows.map((found) =>
        measureRow(finding, found, { shellOf, integrals, watertight, density, overlapLines, excess }),
      )
    : [];
  const rotors = measured.map((m) => rotorTraits(m, density, options.speedRpm));
  const swept = rotors.map((rotor) => ({
    diameterMm: rotor.sweptDiameterMm,
    fromZMm: rotor.fromMm,
    toZMm: rotor.toMm,
  }));
  const warnings = analysisWarnings({
    report,
    turned,
    crumbs,
    overlap,
    soup,
    watertight,
    rotors,
    rows: measured.map((m) => m.row),
    finding,
    hollow: mass === undefined && watertight && !soup,
  });
  const struts = finding && countStruts(finding);
  return {
    triangles: meshIn.triangles.length / 3,
    shells: edges.shellCount,
    watertight,
    openEdges: edges.openEdges,
    misorientedEdges: edges.misorientedEdges,
    nonManifoldEdges: edges.nonManifoldEdges,
    faults: edges.places,
    overlap,
    volumeMm3: mass?.volumeMm3 ?? null,
    areaMm2: report.areasMm2.reduce((sum, area) => sum + area, 0),
    massG: mass?.massG ?? null,
    centreMm: mass ? pointInFile(upright.frame, upright.originMm, mass.centreMm) : null,
    boundsMm: bounds,
    axis: finding ? axisOf(finding, measured) : null,
    rotors,
    stages: rotors.length,
    spacingsMm: rotors.slice(1).map((rotor, i) => rotor.fromMm - (rotors[i]?.toMm ?? 0)),
    struts: struts?.count ?? null,
    strutsConfidence: struts?.confidence ?? null,
    ...(finding ? readDucts(finding, rotors) : { inletStack: null, spacer: null }),
    fit: options.frame && swept.length > 0 ? fitInFrame(swept, options.frame) : null,
    warnings,
    mesh,
  };
}

/** What shells have in common, worked out once for each choice of shells: one rotor's are often all that there are. */
function excessOf(mesh: Mesh, angles: number, search: RotorSearch | undefined): (own: Int32Array) => SolidIntegrals {
  const known = new Map<Int32Array, SolidIntegrals>();
  return (own) => {
    const kept = known.get(own);
    if (kept) return kept;
    const columns = search?.shellOf === own ? search.columns : undefined;
    const made = excessIntegrals(mesh, own, outerRadius(mesh, own), angles, columns);
    known.set(own, made);
    return made;
  };
}

const lessExcess = (sum: SolidIntegrals, excess: SolidIntegrals | undefined): SolidIntegrals =>
  excess ? addIntegrals(sum, excess, -1) : sum;

function probe(mesh: Mesh, shellOf: Int32Array, shells: number, tiny: number): ReturnType<typeof shellOverlaps> {
  const grid = { radiiMm: radiiTo(outerRadius(mesh, shellOf), PROBE.radii), angles: PROBE.angles };
  return shellOverlaps(castColumns(mesh, shellOf, grid), shells, tiny);
}

/** Turns shells that face inwards with nothing around them; hollows of other shells stay as they are. */
function turnedOutward(report: ShellReport, middle: Vec3, tiny: number): { report: ShellReport; turned: number } {
  const { mesh, edges } = report;
  if (!report.integrals.some((shell) => shell.volumeMm3 < 0)) return { report, turned: 0 };
  const upright = boxUpright(mesh, middle);
  const { invertedMm, insideMm } = probe(upright.mesh, edges.shellOf, edges.shellCount, tiny);
  const inverted = (shell: number): boolean =>
    (report.integrals[shell]?.volumeMm3 ?? 0) < 0 && (invertedMm[shell] ?? 0) > 0.5 * (insideMm[shell] ?? 0);
  const turned = report.integrals.filter((_, shell) => inverted(shell)).length;
  if (turned === 0) return { report, turned };
  return { report: { ...report, mesh: withShellsTurned(mesh, edges.shellOf, inverted) }, turned };
}

interface MassContext {
  readonly shellOf: Int32Array;
  readonly integrals: SolidIntegrals[];
  readonly watertight: boolean;
  readonly density: number;
  readonly overlapLines: number;
  readonly excess: (own: Int32Array) => SolidIntegrals;
}

/** Mass and reach of one row: its whole group, or its part of a group with several rows. */
function measureRow(finding: AxisFinding, found: FoundRow, context: MassContext): MeasuredRow {
  const { mesh, search } = finding;
  const { row, group } = found;
  const alone = search.rows.filter((other) => other.group === group).length === 1 && Number.isFinite(group.fromZMm);
  const own = onlyShells(context.shellOf, group.shells);
  const outer = outerRadius(mesh, own);
  if (alone) {
    const sum = sumIntegrals(context.integrals.filter((_, shell) => group.shells.has(shell)));
    const solid = context.watertight
      ? lessExcess(sum, context.overlapLines > 0 ? context.excess(own) : undefined)
      : undefined;
    return { row, mass: solid && massProperties(solid, context.density), fromMm: group.fromZMm, toMm: group.toZMm };
  }
  const angles = evenAngles(row.blades);
  const solids = solidStretches(castColumns(mesh, own, { radiiMm: radiiTo(outer, 256), angles }), () => true, 0);
  const [from, to] = [row.zoneFromZMm, row.zoneToZMm];
  let [reachFrom, reachTo] = [row.fromZMm, row.toZMm];
  for (const z of solids.ends) {
    if (z < from || z > to) continue;
    reachFrom = Math.min(reachFrom, z);
    reachTo = Math.max(reachTo, z);
  }
  const solid = context.watertight ? zoneIntegrals(solids, outer, from, to) : undefined;
  return { row, mass: solid && massProperties(solid, context.density), fromMm: reachFrom, toMm: reachTo };
}

/** The axis through the middle of all rotors, its direction with the largest component positive. */
function axisOf(finding: AxisFinding, measured: readonly MeasuredRow[]): { pointMm: Vec3; direction: Vec3 } {
  const from = Math.min(...measured.map((m) => m.fromMm));
  const to = Math.max(...measured.map((m) => m.toMm));
  return {
    pointMm: pointInFile(finding.frame, finding.originMm, [0, 0, (from + to) / 2]),
    direction: withPositiveLead(finding.frame.z),
  };
}
