import { axisCentre } from "./axis-centre";
import { axisDirections } from "./axis-directions";
import { frameAlong, meshInFrame, pointInFile, type AxisFrame } from "./axis-frame";
import { facesOf } from "./faces";
import { meshBounds, middleOf, type Mesh, type Vec3 } from "./mesh";
import { coarseGrid, fineGrid, searchRotors, type RotorSearch } from "./rotor-search";

/** An axis, the mesh stood on it, and what turns about it. */
export interface AxisFinding {
  readonly frame: AxisFrame;
  /** Point of the axis that became the frame's origin, in file coordinates, mm. */
  readonly originMm: Vec3;
  readonly mesh: Mesh;
  readonly search: RotorSearch;
}

const FACES_MAX = 120_000;
const CONVINCING = 0.85;

/** Every n-th triangle, so that directions and centres of very fine meshes are found from a sample. */
function thinned(mesh: Mesh): Mesh {
  const count = mesh.triangles.length / 3;
  const stride = Math.ceil(count / FACES_MAX);
  if (stride <= 1) return mesh;
  const triangles = new Uint32Array(3 * Math.ceil(count / stride));
  for (let t = 0, to = 0; t < count; t += stride, to += 3) {
    for (let corner = 0; corner < 3; corner++) triangles[to + corner] = mesh.triangles[3 * t + corner] ?? 0;
  }
  return { positions: mesh.positions, triangles };
}

/**
 * The axis about which the file's blades turn: each likely direction is stood upright, centred and searched coarsely;
 * the one whose rows of blades are surest wins and is searched finely. Undefined where no direction shows blades.
 * @param direction fixes the direction (length 1), as when a person names a file axis
 */
export function findAxis(
  mesh: Mesh,
  shellOf: Int32Array,
  shells: number,
  tinyMm: number,
  direction?: Vec3,
): AxisFinding | undefined {
  const sample = thinned(mesh);
  const directions = direction ? [direction] : axisDirections(facesOf(sample));
  let best: { upright: Upright; search: RotorSearch } | undefined;
  for (const candidate of directions) {
    const upright = standUp(mesh, sample, candidate);
    const search = searchRotors(upright.mesh, shellOf, shells, coarseGrid, tinyMm);
    if (!best || search.score > best.search.score * 1.02) best = { upright, search };
    if (search.rows.length > 0 && search.score >= CONVINCING * search.rows.length) break;
  }
  if (!best || best.search.rows.length === 0) return undefined;
  const search = searchRotors(best.upright.mesh, shellOf, shells, fineGrid, tinyMm);
  return search.rows.length === 0 ? undefined : { ...best.upright, search };
}

interface Upright {
  readonly frame: AxisFrame;
  readonly originMm: Vec3;
  readonly mesh: Mesh;
}

/** The mesh turned so that a direction is z, with the axis through x = y = 0. */
function standUp(mesh: Mesh, sample: Mesh, direction: Vec3): Upright {
  const frame = frameAlong(direction);
  const bounds = meshBounds(sample);
  // From the middle of the box, so that a file far from its origin loses no digits.
  const middle = bounds ? middleOf(bounds) : ([0, 0, 0] as const);
  const [x, y] = axisCentre(meshInFrame(sample, frame, middle));
  const originMm = pointInFile(frame, middle, [x, y, 0]);
  return { frame, originMm, mesh: meshInFrame(mesh, frame, originMm) };
}

/** The mesh upright about the middle of its box, for files in which nothing turns. */
export function boxUpright(mesh: Mesh, middleMm: Vec3): Upright {
  const frame = frameAlong([0, 0, 1]);
  return { frame, originMm: middleMm, mesh: meshInFrame(mesh, frame, middleMm) };
}
