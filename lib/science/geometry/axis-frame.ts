import type { Mesh, Vec3 } from "./mesh";
import { cross, dot, plus, unit } from "./vectors";

/** A right-handed frame whose z runs along a direction. */
export interface AxisFrame {
  readonly x: Vec3;
  readonly y: Vec3;
  readonly z: Vec3;
}

/** The frame along `direction` (length 1); for a file axis its axes are the file's own, in cyclic order. */
export function frameAlong(direction: Vec3): AxisFrame {
  const [ax, ay, az] = direction.map(Math.abs) as [number, number, number];
  const helper: Vec3 = az >= ax && az >= ay ? [1, 0, 0] : ay >= ax ? [0, 0, 1] : [0, 1, 0];
  const x = unit(plus(helper, direction, -dot(helper, direction))) ?? helper;
  return { x, y: cross(direction, x), z: direction };
}

/** The mesh with the frame's axes as x, y, z and `origin` (file coordinates) at zero. */
export function meshInFrame(mesh: Mesh, frame: AxisFrame, origin: Vec3): Mesh {
  const { positions: p } = mesh;
  const out = new Float64Array(p.length);
  const { x, y, z } = frame;
  if (x[0] === 1 && y[1] === 1 && z[2] === 1) {
    // The file's own axes: nothing turns.
    for (let i = 0; i < p.length; i += 3) {
      out[i] = (p[i] ?? 0) - origin[0];
      out[i + 1] = (p[i + 1] ?? 0) - origin[1];
      out[i + 2] = (p[i + 2] ?? 0) - origin[2];
    }
    return { positions: out, triangles: mesh.triangles };
  }
  for (let i = 0; i < p.length; i += 3) {
    const a = (p[i] ?? 0) - origin[0];
    const b = (p[i + 1] ?? 0) - origin[1];
    const c = (p[i + 2] ?? 0) - origin[2];
    out[i] = a * x[0] + b * x[1] + c * x[2];
    out[i + 1] = a * y[0] + b * y[1] + c * y[2];
    out[i + 2] = a * z[0] + b * z[1] + c * z[2];
  }
  return { positions: out, triangles: mesh.triangles };
}

/** A point of the frame in file coordinates. */
export function pointInFile(frame: AxisFrame, origin: Vec3, point: Vec3): Vec3 {
  return plus(plus(plus(origin, frame.x, point[0]), frame.y, point[1]), frame.z, point[2]);
}
