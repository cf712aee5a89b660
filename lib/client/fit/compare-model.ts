import type { FitFrame, FitSeason } from "@/lib/contracts/fit-limits";
import { placeBeforeCooler } from "@/lib/science/geometry/fit/cooler-place";
import { judgeLimits, type LimitsJudgement } from "@/lib/science/geometry/fit/fan-limits";
import { boxAsMesh, compareWithKeepOuts, type KeepOutResult } from "@/lib/science/geometry/fit/keep-out";
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
  /** Clearance of the empty frame from each keep-out, mm, in their order. */
  readonly frameClearancesMm: readonly number[];
}

/** Compares a measured model with a frame, a season and its bench; undefined where the model has no rotor. */
export function compareModel(mesh: Mesh, measured: ModelMeasured, around: Surroundings): Comparison | undefined {
  const { frame, season, turned } = around;
  const { axis, rotors } = measured;
  if (!axis || rotors.length === 0) return undefined;
  const placed = placeBeforeCooler({ mesh, axis, rotors }, frame.depthMm, turned);
  const limits = judgeLimits(placed, frame, season ?? { totalDepthMaxMm: null, inletStackMaxMm: null });
  const notAllowed = season && !season.frameKeys.includes(frame.key);
  const reasons = notAllowed
    ? [...limits.reasons, `The frame ${frame.key} isn’t one of this season’s: ${season.frameKeys.join(", ")}.`]
    : limits.reasons;
  const boxes = (season?.keepOuts ?? []).map(({ name, minMm, maxMm }) => ({ name, box: { min: minMm, max: maxMm } }));
  const half = frame.sizeMm / 2;
  const shell = triangleTree(boxAsMesh({ min: [-half, -half, 0], max: [half, half, frame.depthMm * rotors.length] }));
  return {
    limits: { ...limits, reasons },
    keepOuts: compareWithKeepOuts(
      placed,
      boxes.map(({ name, box }) => ({ name, shape: "box", box })),
    ),
    frameClearancesMm: boxes.map(({ box }) => meshCloseness(shell, triangleTree(boxAsMesh(box)))?.distanceMm ?? 0),
  };
}
