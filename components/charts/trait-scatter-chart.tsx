"use client";

import type { ChartOptions } from "chart.js";
import type { ReactNode } from "react";
import { Scatter } from "react-chartjs-2";
import { ChartFrame } from "./chart-frame";
import { usePalette } from "./palette";
import { commonOptions, figureAxis, paperUnder } from "./paper";
import "./register";

export type TraitScatterChartProps = {
  points: readonly { x: number; y: number }[];
  /** What the picture is of, one of several side by side: "bellmouth". */
  name: string;
  xQuantity: string;
  yQuantity: string;
  yUnit: string;
  countOf: string;
  /** The axes that the pictures side by side share. */
  range: { xMin: number; xMax: number; yMin: number; yMax: number };
  caption?: ReactNode;
};

/** A trait against a figure, a dot an entry. No line: what it amounts to is said with its interval elsewhere. */
export function TraitScatterChart({
  points,
  name,
  xQuantity,
  yQuantity,
  yUnit,
  countOf,
  range,
  caption,
}: TraitScatterChartProps) {
  const palette = usePalette();
  const options: ChartOptions<"scatter"> | undefined = palette && {
    ...commonOptions(palette),
    scales: {
      x: { ...figureAxis(palette, xQuantity, false), min: range.xMin, max: range.xMax },
      y: { ...figureAxis(palette, `${yQuantity}, ${yUnit}`, true), min: range.yMin, max: range.yMax },
    },
  };
  return (
    <ChartFrame
      summary={`${name}: ${yQuantity} against ${xQuantity} for ${points.length} ${countOf}.`}
      caption={caption}
      height="low"
      table={{
        caption: `${name}, the chart’s figures`,
        columns: [
          { key: "x", head: xQuantity },
          { key: "y", head: yQuantity, unit: yUnit },
        ],
        rows: points.map((point, index) => ({
          key: String(index),
          cells: { x: { figure: { value: point.x, decimals: 2 } }, y: { figure: { value: point.y, decimals: 2 } } },
        })),
      }}
    >
      {(chart) =>
        palette && options ? (
          <Scatter
            ref={(made) => {
              chart.current = made ?? null;
            }}
            data={{
              datasets: [
                {
                  data: points.map(({ x, y }) => ({ x, y })),
                  borderColor: palette.ink,
                  pointBackgroundColor: palette.paper,
                  pointRadius: 3,
                  pointBorderWidth: 1.25,
                },
              ],
            }}
            options={options}
            plugins={[paperUnder]}
          />
        ) : null
      }
    </ChartFrame>
  );
}
