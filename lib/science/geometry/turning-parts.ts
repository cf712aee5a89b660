import type { Columns } from "./columns";
import { solidStretches } from "./column-solids";
import type { Mesh } from "./mesh";
import { isSquareOutline, outline } from "./outline";
import { polarOf } from "./polar";
import { rowTable } from "./row-table";

/** Shells that turn together. */
export interface TurningGroup {
  readonly shells: ReadonlySet<number>;
  /** Heights of its vertices, mm. */
  readonly fromZMm: number;
  readonly toZMm: number;
}

/** What turns and what stands still in a file; shells that took no part are neither. */
export interface PartSplit {
  readonly groups: TurningGroup[];
  /** Shells of frames, struts, ducts and other things that stand still. */
  readonly standing: ReadonlySet<number>;
}

interface Body {
  readonly shells: number[];
  fromZ: number;
  toZ: number;
  outer: number;
  inner: number;
  kind: "standing" | "carrier" | "ring" | "loose";
  innerRing: number;
  /** Largest radius at which a full circle lies at each of `ROWS` heights, mm; 0 where there is none. */
  readonly closedMm: Float64Array;
}

const ROWS = 48;
/** A ring nearer than this share of the radius to the blades' tips is fixed to them; a duct keeps more away. */
const SHROUD_GAP = 0.002;
/** A ring around this share of another part's length, and no wider than this times, houses it (house limits). */
const HOUSED_SHARE = 0.25;
const HOUSED_WITHIN = 1.4;

/**
 * Sorts the bodies of a file, whose axis stands on z. Square outline: a frame, with all that hangs together with it. A
 * body with a full circle near the axis carries blades, unless it houses another such body in a ring of its own: that is
 * a duct with vanes. One without any full circle belongs to the carrier beside it; a ring belongs to blades that touch
 * it, else it stands still.
 */
export function splitParts(
  mesh: Mesh,
  shellOf: Int32Array,
  columns: Columns,
  bodyOf: Int32Array,
  bodyCount: number,
  tiny: number,
): PartSplit {
  const bodies = measureBodies(mesh, shellOf, bodyOf, bodyCount);
  bodies.forEach((body, number) => {
    const of = (triangle: number): boolean => bodyOf[shellOf[triangle] ?? -1] === number;
    if (isSquareOutline(outline(mesh, of))) {
      body.kind = "standing";
      return;
    }
    const solids = solidStretches(columns, (shell) => bodyOf[shell] === number, tiny);
    const { fill } = rowTable(solids, body.fromZ, body.toZ, ROWS);
    const radii = columns.grid.radiiMm;
    fill.forEach((f, cell) => {
      if (f >= 0.98) body.closedMm[cell % ROWS] = radii[Math.floor(cell / ROWS)] ?? 0;
    });
    const full = radii.findIndex((_, i) => fill.subarray(i * ROWS, (i + 1) * ROWS).some((f) => f >= 0.98));
    // The grid knows a ring's inside to one step; its vertices know it better, unless struts reach further in.
    const sampled = full < 0 ? Infinity : (radii[full] ?? Infinity);
    body.innerRing = Math.max(body.inner, sampled - (radii[0] ?? 0) * 2);
    body.kind = full < 0 ? "loose" : body.innerRing > 0.8 * body.outer ? "ring" : "carrier";
  });
  const carriers = bodies.filter((body) => body.kind === "carrier");
  for (const body of carriers) if (carriers.some((other) => houses(body, other))) body.kind = "standing";
  return group(bodies.filter((body) => body.toZ >= body.fromZ));
}

/** Whether `outer` has a ring of its own around a good part of `inner`. */
function houses(outer: Body, inner: Body): boolean {
  if (outer.outer > HOUSED_WITHIN * inner.outer) return false;
  const step = (outer.toZ - outer.fromZ) / ROWS;
  const around = outer.closedMm.filter((radius, row) => {
    const z = outer.fromZ + (row + 0.5) * step;
    return radius > inner.outer && z > inner.fromZ && z < inner.toZ;
  });
  return around.length * step > HOUSED_SHARE * (inner.toZ - inner.fromZ);
}

function measureBodies(mesh: Mesh, shellOf: Int32Array, bodyOf: Int32Array, bodyCount: number): Body[] {
  const bodies = Array.from({ length: bodyCount }, (): Body => ({
    shells: [],
    fromZ: Infinity,
    toZ: -Infinity,
    outer: 0,
    inner: Infinity,
    kind: "loose",
    innerRing: Infinity,
    closedMm: new Float64Array(ROWS),
  }));
  bodyOf.forEach((body, shell) => bodies[body]?.shells.push(shell));
  const { radiusMm } = polarOf(mesh.positions);
  for (let i = 0; i < mesh.triangles.length; i++) {
    const body = bodies[bodyOf[shellOf[(i / 3) | 0] ?? -1] ?? -1];
    if (!body) continue;
    const v = mesh.triangles[i] ?? 0;
    const z = mesh.positions[3 * v + 2] ?? 0;
    if (z < body.fromZ) body.fromZ = z;
    if (z > body.toZ) body.toZ = z;
    const radius = radiusMm[v] ?? 0;
    if (radius > body.outer) body.outer = radius;
    if (radius < body.inner) body.inner = radius;
  }
  return bodies;
}

const shared = (a: Body, b: Body): number => Math.min(a.toZ, b.toZ) - Math.max(a.fromZ, b.fromZ);

function group(bodies: Body[]): PartSplit {
  let carriers = bodies.filter((body) => body.kind === "carrier");
  const loose = bodies.filter((body) => body.kind === "loose");
  if (carriers.length === 0 && loose.length > 0) carriers = loose.splice(0, 1);
  const members = new Map<Body, Body[]>(carriers.map((carrier) => [carrier, [carrier]]));
  for (const body of loose) {
    const nearest = carriers.reduce((a, b) => (shared(b, body) > shared(a, body) ? b : a));
    members.get(nearest)?.push(body);
  }
  for (const ring of bodies.filter((body) => body.kind === "ring")) {
    for (const all of members.values()) {
      const reach = Math.max(...all.map((body) => (body.kind === "ring" ? 0 : body.outer)));
      const beside = all.some((body) => shared(body, ring) > 0);
      if (!beside || ring.innerRing - reach > SHROUD_GAP * reach || reach < 0.9 * ring.innerRing) continue;
      all.push(ring);
      break;
    }
  }
  const groups = [...members.values()].map((all): TurningGroup => ({
    shells: new Set(all.flatMap((body) => body.shells)),
    fromZMm: Math.min(...all.map((body) => body.fromZ)),
    toZMm: Math.max(...all.map((body) => body.toZ)),
  }));
  const turning = new Set(groups.flatMap((g) => [...g.shells]));
  const standing = new Set(bodies.flatMap((body) => body.shells).filter((shell) => !turning.has(shell)));
  return { groups, standing };
}
