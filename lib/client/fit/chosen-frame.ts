import type { FitFrame } from "@/lib/contracts/fit-limits";

/** What somebody measured of the frame at hand, mm; what is left out is the preset's. */
export interface OwnFrame {
  readonly boreMm?: number;
  readonly depthMm?: number;
  readonly toleranceMm?: number;
}

/** How far each number of a frame may be from nothing and from its size, mm. */
export const ownFrameSpans = (preset: FitFrame) =>
  ({
    boreMm: { label: "Bore", min: preset.sizeMm / 2, max: preset.sizeMm },
    depthMm: { label: "Depth", min: 5, max: 100 },
    toleranceMm: { label: "Tolerance, a side", min: 0, max: 5 },
  }) as const;

/** A preset with the numbers that were measured in place of its own; one that can't be is left out. */
export function chosenFrame(preset: FitFrame, own: OwnFrame): FitFrame {
  const spans = ownFrameSpans(preset);
  const measured = (["boreMm", "depthMm", "toleranceMm"] as const).flatMap((name) => {
    const value = own[name];
    return value !== undefined && value >= spans[name].min && value <= spans[name].max ? [[name, value]] : [];
  });
  return { ...preset, ...(Object.fromEntries(measured) as OwnFrame) };
}

/** Whether any number of a frame is not its preset's. */
export const isOwnFrame = (preset: FitFrame, own: OwnFrame): boolean => {
  const { boreMm, depthMm, toleranceMm } = chosenFrame(preset, own);
  return boreMm !== preset.boreMm || depthMm !== preset.depthMm || toleranceMm !== preset.toleranceMm;
};
