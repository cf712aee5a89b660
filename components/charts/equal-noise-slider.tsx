"use client";

import { levelUnit } from "@/lib/format/quantities";
import { FigureSlider } from "./figure-slider";

export type EqualNoiseSliderProps = {
  levelDba: number;
  /** The span that every series covers; outside it nothing is read off. */
  fromDba: number;
  toDba: number;
  stepDb?: number;
  distanceMm: number;
  onLevel: (levelDba: number) => void;
};

/** The common level, as a slider. */
export function EqualNoiseSlider({ levelDba, fromDba, toDba, stepDb, distanceMm, onLevel }: EqualNoiseSliderProps) {
  return (
    <FigureSlider
      label="Equal noise at"
      unit={levelUnit(distanceMm)}
      value={levelDba}
      from={fromDba}
      to={toDba}
      step={stepDb}
      onValue={onLevel}
    />
  );
}
