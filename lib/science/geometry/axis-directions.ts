import { vectorAt, type Faces } from "./faces";
import type { Vec3 } from "./mesh";
import { dot, eigenSym3, minus, plus, unit, type Sym3 } from "./vectors";

const FILE_AXES: readonly Vec3[] = [
  [0, 0, 1],
  [0, 1, 0],
  [1, 0, 0],
];
const COS_SAME = Math.cos((0.3 * Math.PI) / 180);
const COS_SNAP = Math.cos((0.03 * Math.PI) / 180);
const PLANAR_DIRECTIONS = 5;

/** The direction with its largest component positive. */
export function withPositiveLead(d: Vec3): Vec3 {
  const lead = d.reduce((best, value) => (Math.abs(value) > Math.abs(best) + 1e-9 ? value : best), 0);
  return lead < 0 ? [-d[0] + 0, -d[1] + 0, -d[2] + 0] : [d[0] + 0, d[1] + 0, d[2] + 0];
}

/** A direction within a few hundredths of a degree of a file axis is that axis: rounding of coordinates tilts it so. */
function snapped(d: Vec3): Vec3 {
  return FILE_AXES.find((axis) => Math.abs(dot(axis, d)) > COS_SNAP) ?? d;
}

/**
 * Directions that the rotation axis may have, likeliest first: normals of the largest flat faces (hub and frame faces
 * stand across the axis), principal axes of the surface, the file's axes. Each has length 1 and its largest component
 * positive; none is within 0.3° of an earlier one.
 */
export function axisDirections(faces: Faces): Vec3[] {
  const candidates = [
    ...planarNormals(faces),
    ...principalAxes(faces).map((d) => alignedWithWalls(faces, d)),
    ...FILE_AXES,
  ];
  const out: Vec3[] = [];
  for (const candidate of candidates) {
    const direction = withPositiveLead(snapped(candidate));
    if (!out.some((earlier) => Math.abs(dot(earlier, direction)) > COS_SAME)) out.push(direction);
  }
  return out;
}

/** Mean normals of the groups of faces with the largest common area, opposite normals together. */
function planarNormals(faces: Faces): Vec3[] {
  const groups = new Map<number, { area: number; sum: Vec3 }>();
  const total = faces.areasMm2.reduce((sum, area) => sum + area, 0);
  for (let t = 0; t < faces.areasMm2.length; t++) {
    const area = faces.areasMm2[t] ?? 0;
    if (area === 0) continue;
    const normal = withPositiveLead(vectorAt(faces.normals, t));
    const key = normal.reduce((sum, value) => 401 * sum + Math.round(value * 200) + 200, 0);
    const group = groups.get(key);
    if (group) {
      group.area += area;
      group.sum = plus(group.sum, normal, area);
    } else if (groups.size < 50_000) groups.set(key, { area, sum: plus([0, 0, 0], normal, area) });
  }
  return [...groups.values()]
    .filter((group) => group.area > 0.01 * total)
    .sort((a, b) => b.area - a.area)
    .slice(0, PLANAR_DIRECTIONS)
    .map((group) => unit(group.sum))
    .filter((normal) => normal !== undefined);
}

/** Principal axes of the surface, the one that stands apart from the other two first. */
function principalAxes(faces: Faces): Vec3[] {
  let middle: Vec3 = [0, 0, 0];
  let total = 0;
  for (let t = 0; t < faces.areasMm2.length; t++) {
    const area = faces.areasMm2[t] ?? 0;
    middle = plus(middle, vectorAt(faces.middlesMm, t), area);
    total += area;
  }
  if (total === 0) return [];
  middle = [middle[0] / total, middle[1] / total, middle[2] / total];
  const s = [0, 0, 0, 0, 0, 0];
  for (let t = 0; t < faces.areasMm2.length; t++) {
    const [x, y, z] = minus(vectorAt(faces.middlesMm, t), middle);
    const products = [x * x, y * y, z * z, x * y, y * z, z * x];
    products.forEach((value, i) => (s[i] = (s[i] ?? 0) + (faces.areasMm2[t] ?? 0) * value));
  }
  const [low, mid, high] = eigenSym3(s as unknown as Sym3);
  const lowFirst = mid.value - low.value > high.value - mid.value;
  return (lowFirst ? [low, high, mid] : [high, low, mid]).map((pair) => pair.vector);
}

/** Turns a rough direction until the walls around it (hub, bore, ring) stand along it; robust against blades. */
function alignedWithWalls(faces: Faces, start: Vec3): Vec3 {
  let direction = start;
  const { normals, areasMm2 } = faces;
  for (const scale of [0.15, 0.1, 0.06, 0.03, 0.03, 0.015, 0.015, 0.008, 0.008, 0.004, 0.004]) {
    const [dx, dy, dz] = direction;
    let [xx, yy, zz, xy, yz, zx, weightSum] = [0, 0, 0, 0, 0, 0, 0];
    // Written out, without a vector for each face: this runs some thirty times over.
    for (let t = 0; t < areasMm2.length; t++) {
      const x = normals[3 * t] ?? 0;
      const y = normals[3 * t + 1] ?? 0;
      const z = normals[3 * t + 2] ?? 0;
      const along = (x * dx + y * dy + z * dz) / scale;
      if (along > 3 || along < -3) continue;
      const weight = (areasMm2[t] ?? 0) / (1 + along * along);
      weightSum += weight;
      xx += weight * x * x;
      yy += weight * y * y;
      zz += weight * z * z;
      xy += weight * x * y;
      yz += weight * y * z;
      zx += weight * z * x;
    }
    const [low, mid] = eigenSym3([xx, yy, zz, xy, yz, zx]);
    // Walls on one side only don't say where the axis points.
    if (weightSum === 0 || mid.value < 0.05 * weightSum || Math.abs(dot(low.vector, start)) < 0.9) return direction;
    direction = dot(low.vector, direction) < 0 ? minus([0, 0, 0], low.vector) : low.vector;
  }
  return direction;
}
