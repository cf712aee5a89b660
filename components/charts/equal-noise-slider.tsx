"use client";

import { useId } from "react";
import { formatNumber } from "@/lib/format/numbers";
import { levelUnit } from "@/lib/format/quantities";

export type EqualNoiseSliderProps = {
  levelDba: number;
  /** The span that every series covers; outside it nothing is read off. */
  fromDba: number;
  toDba: number;
  stepDb?: number;
  distanceMm: number;
  onLevel: (levelDba: number) => void;
};

/** The common level, as a slider: arrows move by one step, page keys by ten, Home and End to the ends. */
export function EqualNoiseSlider(props: EqualNoiseSliderProps) {
  const { levelDba, fromDba, toDba, stepDb = 0.1, distanceMm, onLevel } = props;
  const id = useId();
  const words = `${formatNumber(levelDba, { decimals: 1 })} ${levelUnit(distanceMm)}`;
  return (
    <div className="grid content-start gap-1">
      <label htmlFor={id} className="flex flex-wrap items-baseline gap-x-3">
        <span className="sr-only">Equal noise at</span>
        <span className="figures text-2xl font-bold">{formatNumber(levelDba, { decimals: 1 })}</span>
        <span>{levelUnit(distanceMm)}</span>
      </label>
      <input
        id={id}
        type="range"
        className="slider"
        min={fromDba}
        max={toDba}
        step={stepDb}
        value={levelDba}
        aria-valuetext={words}
        onChange={(event) => onLevel(event.target.valueAsNumber)}
      />
      <span aria-hidden className="docket flex justify-between">
        <span>{formatNumber(fromDba, { decimals: 1 })}</span>
        <span>{formatNumber(toDba, { decimals: 1 })}</span>
      </span>
    </div>
  );
}
