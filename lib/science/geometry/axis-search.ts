import { axisCentre } from "./axis-centre";
import { axisDirections } from "./axis-directions";
import { frameAlong, meshInFrame, pointInFile, type AxisFrame } from "./axis-frame";
import { coarsened } from "./coarsened";
import { facesOf } from "./faces";
import { meshBounds, middleOf, signedVolume, type Bounds, type Mesh, type Vec3 } from "./mesh";
import { coarseGrid, fineGrid, searchRotors, type RotorSearch } from "./rotor-search";

/** An axis, the mesh stood on it, and what turns about it. */
export interface AxisFinding {
  readonly frame: AxisFrame;
  /** Point of the axis that became the frame's origin, in file coordinates, mm. */
  readonly originMm: Vec3;
  readonly mesh: Mesh;
  readonly search: RotorSearch;
}

/** So many faces tell directions and centres; of meshes that are searched in a coarser copy, half as many. */
const FACES_MAX = 12_000;
/** Knuth's multiplicative hash: strides through the triangles without marching in step with a grid's rows. */
const SCATTER = 0x9e3779b1;
/** A direction with less than this share of the faces of revolution of the roundest one before it carries no hub. */
const ROUND_SHARE = 0.5;
/** Meshes of more triangles are searched for their axis in a coarser copy. */
const COARSE_ABOVE = 200_000;
const CONVINCING = 0.85;
const ALIKE = 0.02;

/** One of every n triangles that take part, so that directions and centres of very fine meshes are found from a sample. */
function thinned(mesh: Mesh, shellOf: Int32Array): Mesh {
  const count = mesh.triangles.length / 3;
  const stride = Math.ceil(count / (count > COARSE_ABOVE ? FACES_MAX / 2 : FACES_MAX));
  if (stride <= 1 && !shellOf.includes(-1)) return mesh;
  const triangles = new Uint32Array(3 * Math.ceil(count / stride));
  const numbers = new Int32Array(mesh.positions.length / 3).fill(-1);
  const positions: number[] = [];
  let to = 0;
  for (let first = 0; first < count; first += stride) {
    const t = Math.min(count - 1, first + ((Math.imul(first, SCATTER) >>> 8) % stride));
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
 * @param known bounds of the mesh, and its volume, mm³, asked for only where a coarser copy shows nothing
 * @param direction fixes the direction (length 1), as when a person names a file axis
 */
export function findAxis(
  mesh: Mesh,
  shellOf: Int32Array,
  shells: number,
  tinyMm: number,
  known: { readonly bounds: Bounds; readonly volumeMm3: () => number },
  direction?: Vec3,
): AxisFinding | undefined {
  const sample = thinned(mesh, shellOf);
  const directions = direction ? [direction] : axisDirections(facesOf(sample));
  const places = directions.map((candidate) => () => placeOf(sample, candidate));
  const fine = shellOf.length > COARSE_ABOVE ? coarsened(mesh, shellOf, known.bounds) : undefined;
  let best = surest(fine?.mesh ?? mesh, fine?.shellOf ?? shellOf, shells, tinyMm, places);
  // Walls too thin for the coarser copy show in the mesh itself, about the likeliest axis.
  if (fine && !best && !likeIn(fine.mesh, known.volumeMm3()))
    best = surest(mesh, shellOf, shells, tinyMm, places.slice(0, 1));
  if (!best) return undefined;
  const upright = meshInFrame(mesh, best.frame, best.originMm);
  const search = searchRotors(upright, shellOf, shells, fineGrid, tinyMm);
  return search.rows.length === 0 ? undefined : { ...best, mesh: upright, search };
}

/** Whether a coarser copy holds as much as the mesh, so that nothing to speak of vanished. */
const likeIn = (coarse: Mesh, volumeMm3: number): boolean =>
  Math.abs(signedVolume(coarse) - volumeMm3) < ALIKE * Math.abs(volumeMm3);

interface Place {
  readonly frame: AxisFrame;
  readonly originMm: Vec3;
}

/** A place, and the area of the faces of revolution about its axis, mm². */
interface CentredPlace {
  readonly place: Place;
  readonly roundMm2: number;
}

/** The place whose rows of blades are surest; undefined where none shows blades. */
function surest(
  mesh: Mesh,
  shellOf: Int32Array,
  shells: number,
  tinyMm: number,
  places: readonly (() => CentredPlace)[],
): Place | undefined {
  let best: { place: Place; score: number } | undefined;
  let roundest = 0;
  for (const find of places) {
    const { place, roundMm2 } = find();
    if (roundMm2 < ROUND_SHARE * roundest) continue;
    roundest = Math.max(roundest, roundMm2);
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
function placeOf(sample: Mesh, direction: Vec3): CentredPlace {
  const frame = frameAlong(direction);
  const bounds = meshBounds(sample);
  // From the middle of the box, so that a file far from its origin loses no digits.
  const middle = bounds ? middleOf(bounds) : ([0, 0, 0] as const);
  const { centre, roundMm2 } = axisCentre(meshInFrame(sample, frame, middle));
  return { place: { frame, originMm: pointInFile(frame, middle, [centre[0], centre[1], 0]) }, roundMm2 };
}

/** The mesh upright about the middle of its box, for files in which nothing turns. */
export function boxUpright(mesh: Mesh, middleMm: Vec3): Place & { readonly mesh: Mesh } {
  const frame = frameAlong([0, 0, 1]);
  return { frame, originMm: middleMm, mesh: meshInFrame(mesh, frame, middleMm) };
}
