import type { Bounds, Mesh, Vec3 } from "../mesh";
import type { PlacedModel } from "./cooler-place";
import { meshCloseness } from "./mesh-clearance";
import { reachIntoBox } from "./reach-into-box";
import { sweptMesh, sweptProfile } from "./swept-volume";
import { triangleTree } from "./triangle-tree";

/** A solid near the cooler that a fan must stay clear of, in cooler coordinates, mm. */
export type KeepOut =
  | { readonly name: string; readonly shape: "box"; readonly box: Bounds }
  | { readonly name: string; readonly shape: "mesh"; readonly mesh: Mesh };

/** How a model stands to one keep-out solid. */
export interface KeepOutResult {
  readonly name: string;
  readonly meets: boolean;
  /** Smallest distance, mm; 0 where they meet. */
  readonly clearanceMm: number;
  /** Where on the model, cooler coordinates, mm. */
  readonly atMm: Vec3;
  /** What comes closest: the model as it stands in the file, or what a rotor sweeps. */
  readonly by: string;
  /** How to change it, where it meets. */
  readonly change: string | undefined;
}

/** A box as a closed mesh of twelve triangles. */
export function boxAsMesh({ min, max }: Bounds): Mesh {
  const positions: number[] = [];
  for (let i = 0; i < 8; i++) {
    positions.push((i & 1 ? max : min)[0], (i & 2 ? max : min)[1], (i & 4 ? max : min)[2]);
  }
  const quads = [0, 2, 3, 1, 4, 5, 7, 6, 0, 1, 5, 4, 2, 6, 7, 3, 0, 4, 6, 2, 1, 3, 7, 5];
  const triangles: number[] = [];
  for (let q = 0; q < quads.length; q += 4) {
    const [a = 0, b = 0, c = 0, d = 0] = quads.slice(q, q + 4);
    triangles.push(a, b, c, a, c, d);
  }
  return { positions: Float64Array.from(positions), triangles: Uint32Array.from(triangles) };
}

/**
 * Compares a placed model and what its rotors sweep with keep-out solids, each with its smallest clearance and where.
 * Triangles are tried against solids, not corners alone: one can cross a box with none of its corners inside.
 */
export function compareWithKeepOuts(model: PlacedModel, keepOuts: readonly KeepOut[]): KeepOutResult[] {
  const bodies = [
    { by: "the model as it stands", mesh: model.mesh },
    ...model.zones.map((zone, index) => ({
      by: model.zones.length > 1 ? `what rotor ${index + 1} sweeps` : "what the rotor sweeps",
      mesh: sweptMesh(sweptProfile(model.mesh, zone)),
    })),
  ].map((body) => ({ ...body, tree: triangleTree(body.mesh) }));
  return keepOuts.flatMap((keepOut) => {
    const solid = triangleTree(keepOut.shape === "box" ? boxAsMesh(keepOut.box) : keepOut.mesh);
    const found = bodies.flatMap((body) => {
      const closeness = meshCloseness(body.tree, solid);
      return closeness ? [{ ...body, closeness }] : [];
    });
    const [first] = found;
    if (!first) return [];
    const closest = found.reduce((a, b) => (b.closeness.distanceMm < a.closeness.distanceMm ? b : a), first);
    const meets = closest.closeness.distanceMm === 0;
    const touching = found.filter((body) => body.closeness.distanceMm === 0).map((body) => body.mesh);
    return {
      name: keepOut.name,
      meets,
      clearanceMm: closest.closeness.distanceMm,
      atMm: closest.closeness.onFirst,
      by: closest.by,
      change: meets ? howToChange(keepOut, touching) : undefined,
    };
  });
}

function howToChange(keepOut: KeepOut, touching: readonly Mesh[]): string {
  const general = `move it out of ${keepOut.name}, or take away what reaches into it`;
  if (keepOut.shape === "mesh") return general;
  const reaches = touching.map((mesh) => reachIntoBox(mesh, keepOut.box)).filter((reach) => reach !== undefined);
  const [first] = reaches;
  if (!first) return general;
  // Every body has to leave by the same side, so the deepest reach from that side counts.
  const deepest = first.map((_, side) => Math.max(...reaches.map((reach) => reach[side] ?? 0)));
  const least = Math.min(...deepest);
  const side = ["−x", "+x", "−y", "+y", "−z", "+z"][deepest.indexOf(least)] ?? "";
  return `it reaches ${(Math.ceil(least * 10) / 10).toFixed(1)} mm into ${keepOut.name} from its ${side} side: take that and the tolerance away there`;
}
