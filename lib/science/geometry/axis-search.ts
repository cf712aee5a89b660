import { axisCentre } from "./axis-centre";
import { axisDirections } from "./axis-directions";
import { frameAlong, meshInFrame, pointInFile, type AxisFrame } from "./axis-frame";
import { coarsened } from "./coarsened";
import { facesOf } from "./faces";
import { shellIntegrals } from "./mass-properties";
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

const FACES_MAX = 24_000;
/** Meshes of more triangles are searched for their axis in a coarser copy. */
const COARSE_ABOVE = 200_000;
const CONVINCING = 0.85;
const ALIKE = 0.02;

/** Every n-th triangle that takes part, so that directions and centres of very fine meshes are found from a sample. */
function thinned(mesh: Mesh, shellOf: Int32Array): Mesh {
  const count = mesh.triangles.length / 3;
  const stride = Math.ceil(count / FACES_MAX);
  if (stride <= 1 && !shellOf.includes(-1)) return mesh;
  const triangles = new Uint32Array(3 * Math.ceil(count / stride));
  const numbers = new Int32Array(mesh.positions.length / 3).fill(-1);
  const positions: number[] = [];
  let to = 0;
  for (let t = 0; t < count; t += stride) {
    if ((shellOf[t] ?? -1) < 0) continue;
    for (let i = 3 * t; i < 3 * t + 3; i++, to++) {
      const v = mesh.triangles[i] ?? 0;
      if ((numbers[v] ?? -1) < 0) {
        numbers[v] = positions.length / 3;
        positions.push(mesh.positions[3 * v] ?? 0, mesh.positions[3 * v + 1] ?? 0, mesh.positions[3 * v + 2] ?? 0);
      }
      triangles[to] = numbers[v] ?? 0;
    }
  }
  return { positions: Float64Array.from(positions), triangles: triangles.slice(0, to) };
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
  const sample = thinned(mesh, shellOf);
  const directions = direction ? [direction] : axisDirections(facesOf(sample));
  const places = directions.map((candidate) => () => placeOf(sample, candidate));
  const bounds = meshBounds(mesh);
  const fine = shellOf.length > COARSE_ABOVE && bounds ? coarsened(mesh, shellOf, bounds) : undefined;
  let best = surest(fine?.mesh ?? mesh, fine?.shellOf ?? shellOf, shells, tinyMm, places);
  // Walls too thin for the coarser copy show in the mesh itself, about the likeliest axis.
  if (fine && !best && !likeIn(fine.mesh, mesh)) best = surest(mesh, shellOf, shells, tinyMm, places.slice(0, 1));
  if (!best) return undefined;
  const upright = meshInFrame(mesh, best.frame, best.originMm);
  const search = searchRotors(upright, shellOf, shells, fineGrid, tinyMm);
  return search.rows.length === 0 ? undefined : { ...best, mesh: upright, search };
}

/** Whether a coarser copy holds as much as the mesh, so that nothing to speak of vanished. */
function likeIn(coarse: Mesh, mesh: Mesh): boolean {
  const [a, b] = [coarse, mesh].map((one) => {
    const all = new Int32Array(one.triangles.length / 3);
    return shellIntegrals(one, all, 1, [0, 0, 0]).integrals[0]?.volumeMm3 ?? 0;
  });
  return a !== undefined && b !== undefined && Math.abs(a - b) < ALIKE * Math.abs(b);
}

interface Place {
  readonly frame: AxisFrame;
  readonly originMm: Vec3;
}

/** The place whose rows of blades are surest; undefined where none shows blades. */
function surest(
  mesh: Mesh,
  shellOf: Int32Array,
  shells: number,
  tinyMm: number,
  places: readonly (() => Place)[],
): Place | undefined {
  let best: { place: Place; score: number } | undefined;
  for (const find of places) {
    const place = find();
    const { rows, score } = searchRotors(
      meshInFrame(mesh, place.frame, place.originMm),
      shellOf,
      shells,
      coarseGrid,
      tinyMm,
    );
    if (rows.length > 0 && (!best || score > best.score * 1.02)) best = { place, score };
    if (rows.length > 0 && score >= CONVINCING * rows.length) break;
  }
  return best?.place;
}

/** A direction as z with the axis through x = y = 0. */
function placeOf(sample: Mesh, direction: Vec3): Place {
  const frame = frameAlong(direction);
  const bounds = meshBounds(sample);
  // From the middle of the box, so that a file far from its origin loses no digits.
  const middle = bounds ? middleOf(bounds) : ([0, 0, 0] as const);
  const [x, y] = axisCentre(meshInFrame(sample, frame, middle));
  return { frame, originMm: pointInFile(frame, middle, [x, y, 0]) };
}

/** The mesh upright about the middle of its box, for files in which nothing turns. */
export function boxUpright(mesh: Mesh, middleMm: Vec3): Place & { readonly mesh: Mesh } {
  const frame = frameAlong([0, 0, 1]);
  return { frame, originMm: middleMm, mesh: meshInFrame(mesh, frame, middleMm) };
}
