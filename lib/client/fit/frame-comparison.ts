import { fitInFrame, type FrameFit } from "@/lib/science/geometry/frame-fit";
import type { FitFrame, FitSeason } from "@/lib/contracts/fit-limits";
import type { ModelMeasured } from "./messages";

/** A model against a frame and a season. */
export interface FrameComparison {
  readonly fit: FrameFit | undefined;
  /** Gap between tips (or the ring) and the bore of the frame, nominal, mm; undefined without a rotor. */
  readonly tipGapMm: number | undefined;
  readonly depthMm: number;
  /** What a season doesn't allow and how to change it; empty where nothing is wrong. */
  readonly seasonReasons: string[];
}

const mm = (value: number): string => `${Math.round(value * 100) / 100} mm`;

/** Extent of all that the file holds along the rotors' axis, mm; along its shortest side where there is no axis. */
function wholeDepthMm({ boundsMm: { min, max }, axis, rotors }: ModelMeasured): number {
  const sides = max.map((value, i) => value - (min[i] ?? 0));
  const lead = axis?.direction.findIndex((part) => Math.abs(part) > 0.999) ?? -1;
  const along = sides[lead];
  if (along !== undefined) return along;
  if (rotors.length === 0) return Math.min(...sides);
  return Math.max(...rotors.map((rotor) => rotor.toMm)) - Math.min(...rotors.map((rotor) => rotor.fromMm));
}

/** Compares rotors with a frame's bore and depth, and the whole with a season's limits. */
export function compareWithFrame(
  measured: ModelMeasured,
  frame: FitFrame,
  season: FitSeason | undefined,
): FrameComparison {
  const swept = measured.rotors.map((rotor) => ({
    diameterMm: rotor.sweptDiameterMm,
    fromZMm: rotor.fromMm,
    toZMm: rotor.toMm,
  }));
  const depthMm = wholeDepthMm(measured);
  const seasonReasons: string[] = [];
  if (season && !season.frameKeys.includes(frame.key)) {
    seasonReasons.push(`The frame ${frame.key} isn’t one of this season’s: ${season.frameKeys.join(", ")}.`);
  }
  if (season && season.totalDepthMaxMm !== null && depthMm > season.totalDepthMaxMm) {
    const over = depthMm - season.totalDepthMaxMm;
    seasonReasons.push(
      `Depth: ${mm(depthMm)} in all, ${mm(season.totalDepthMaxMm)} allowed: make it ${mm(over)} shorter.`,
    );
  }
  const widest = Math.max(0, ...swept.map((rotor) => rotor.diameterMm));
  return {
    fit: swept.length > 0 ? fitInFrame(swept, frame) : undefined,
    tipGapMm: swept.length > 0 ? (frame.boreMm - widest) / 2 : undefined,
    depthMm,
    seasonReasons,
  };
}
