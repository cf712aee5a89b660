import type { FitFrame, FitSeason } from "@/lib/contracts/fit-limits";
import { placeBeforeCooler } from "@/lib/science/geometry/fit/cooler-place";
import { judgeLimits, type LimitsJudgement } from "@/lib/science/geometry/fit/fan-limits";
import { boxAsMesh, compareWithKeepOuts, type KeepOut, type KeepOutResult } from "@/lib/science/geometry/fit/keep-out";
import { meshCloseness } from "@/lib/science/geometry/fit/mesh-clearance";
import { triangleTree } from "@/lib/science/geometry/fit/triangle-tree";
import type { Mesh } from "@/lib/science/geometry/mesh";
import type { ModelMeasured } from "./messages";

/** What a model is put before. */
export interface Surroundings {
  readonly frame: FitFrame;
  readonly season: FitSeason | undefined;
  /** The file's axis points at the cooler instead of away from it. */
  readonly turned: boolean;
}

export interface Comparison {
  readonly limits: LimitsJudgement;
  readonly keepOuts: readonly KeepOutResult[];
  /** Names of solids that could not be fetched, and so weren't compared. */
  readonly notCompared: readonly string[];
  /** Clearance of the empty frame from each keep-out, mm, in their order. */
  readonly frameClearancesMm: readonly number[];
}

/** A keep-out mesh as it came, mm in cooler coordinates; undefined where it didn't. */
export interface FetchedSolid {
  readonly name: string;
  readonly mesh: Mesh | undefined;
}

/** Compares a measured model with a frame, a season and its bench; undefined where the model has no rotor. */
export function compareModel(
  mesh: Mesh,
  measured: ModelMeasured,
  around: Surroundings,
  solids: readonly FetchedSolid[] = [],
): Comparison | undefined {
  const { frame, season, turned } = around;
  const { axis, rotors } = measured;
  if (!axis || rotors.length === 0) return undefined;
  const placed = placeBeforeCooler({ mesh, axis, rotors }, frame.depthMm, turned);
  const limits = judgeLimits(placed, frame, season ?? { totalDepthMaxMm: null, inletStackMaxMm: null });
  const notAllowed = season && !season.frameKeys.includes(frame.key);
  const reasons = notAllowed
    ? [...limits.reasons, `The frame ${frame.key} isn’t one of this season’s: ${season.frameKeys.join(", ")}.`]
    : limits.reasons;
  const keepOuts: KeepOut[] = [
    ...(season?.keepOuts ?? []).map(({ name, minMm, maxMm }): KeepOut => ({
      name,
      shape: "box",
      box: { min: minMm, max: maxMm },
    })),
    ...solids.flatMap((solid): KeepOut[] =>
      solid.mesh ? [{ name: solid.name, shape: "mesh", mesh: solid.mesh }] : [],
    ),
  ];
  const surface = (solid: KeepOut): Mesh => (solid.shape === "box" ? boxAsMesh(solid.box) : solid.mesh);
  const half = frame.sizeMm / 2;
  const shell = triangleTree(boxAsMesh({ min: [-half, -half, 0], max: [half, half, frame.depthMm * rotors.length] }));
  return {
    limits: { ...limits, reasons },
    keepOuts: compareWithKeepOuts(placed, keepOuts),
    notCompared: solids.flatMap(({ name, mesh: came }) => (came ? [] : [name])),
    frameClearancesMm: keepOuts.map((solid) => meshCloseness(shell, triangleTree(surface(solid)))?.distanceMm ?? 0),
  };
}
