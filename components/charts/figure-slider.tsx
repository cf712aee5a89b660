"use client";

import { useId } from "react";
import { formatNumber } from "@/lib/format/numbers";

export type FigureSliderProps = {
  /** What the slider sets, as it is heard: "Equal noise at". */
  label: string;
  unit: string;
  value: number;
  from: number;
  to: number;
  step?: number;
  onValue: (value: number) => void;
};

/** A figure with one decimal, as a slider: arrows move by one step, page keys by ten, Home and End to the ends. */
export function FigureSlider({ label, unit, value, from, to, step = 0.1, onValue }: FigureSliderProps) {
  const id = useId();
  const write = (figure: number) => formatNumber(figure, { decimals: 1 });
  return (
    <div className="grid content-start gap-1">
      <label htmlFor={id} className="flex flex-wrap items-baseline gap-x-3">
        <span className="sr-only">{label}</span>
        <span className="figures text-2xl font-bold">{write(value)}</span>
        <span>{unit}</span>
      </label>
      <input
        id={id}
        type="range"
        className="slider"
        min={from}
        max={to}
        step={step}
        value={value}
        aria-valuetext={`${write(value)} ${unit}`}
        onChange={(event) => onValue(event.target.valueAsNumber)}
      />
      <span aria-hidden className="docket flex justify-between">
        <span>{write(from)}</span>
        <span>{write(to)}</span>
      </span>
    </div>
  );
}
