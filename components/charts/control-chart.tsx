"use client";

import type { ChartData, ChartOptions } from "chart.js";
import type { ReactNode } from "react";
import { Scatter } from "react-chartjs-2";
import { ChartFrame } from "./chart-frame";
import { controlSummary, controlTable, outOfControl, type ControlPoint } from "./control-model";
import { endLabels } from "./end-labels";
import { usePalette, type Palette } from "./palette";
import { axis, commonOptions, figureAxis, paperUnder } from "./paper";
import "./register";

export type ControlChartProps = {
  points: readonly ControlPoint[];
  /** "Level at 1 450 rpm". */
  quantity: string;
  unit: string;
  decimals?: number;
  caption?: ReactNode;
  summary?: string;
  fileName?: string;
};

type Data = ChartData<"scatter", { x: number; y: number }[]>;
type Read = (point: ControlPoint) => number | undefined;

function lineOf(points: readonly ControlPoint[], read: Read) {
  return points.map((point, x) => ({ x, y: read(point) ?? Number.NaN }));
}

function controlData(points: readonly ControlPoint[], palette: Palette): Data {
  const bare = { showLine: true, pointRadius: 0, borderWidth: 1.25 };
  const none: ControlPoint = { key: "", at: "", value: undefined };
  const named = (read: Read) => read(points.at(-1) ?? none) !== undefined;
  const limit = (label: string | undefined, read: Read) => ({
    ...bare,
    // A line that has no end has no name there either.
    label: named(read) ? label : undefined,
    borderColor: palette.soft,
    borderDash: [3, 3],
    stepped: "middle" as const,
    data: lineOf(points, read),
  });
  const out = points.map((point) => outOfControl(point) !== undefined);
  const colours = out.map((wrong) => (wrong ? palette.ribbon : palette.carbon));
  return {
    datasets: [
      limit("upper limit", (point) => point.upper),
      limit("lower limit", (point) => point.lower),
      { ...limit("centre", (point) => point.centre), borderDash: [] },
      {
        ...bare,
        label: named((point) => point.ewma) ? "weighted mean" : undefined,
        borderColor: palette.leaf,
        borderWidth: 2.25,
        data: lineOf(points, (point) => point.ewma),
      },
      {
        // The baseline's check runs: carbon blue, dashed, open squares; crossed in ribbon red when out of control.
        label: "check runs",
        borderColor: palette.carbon,
        borderDash: [6, 4],
        borderWidth: 1.5,
        showLine: true,
        pointStyle: out.map((wrong) => (wrong ? ("crossRot" as const) : ("rect" as const))),
        pointBorderColor: colours,
        pointBackgroundColor: palette.paper,
        pointBorderWidth: out.map((wrong) => (wrong ? 3 : 2)),
        pointRadius: out.map((wrong) => (wrong ? 7 : 5)),
        data: lineOf(points, (point) => point.value),
      },
    ],
  };
}

function breaks(points: readonly ControlPoint[], palette: Palette) {
  const marked = points.flatMap((point, index) => (point.breakBefore ? [[point.breakBefore, index] as const] : []));
  return Object.fromEntries(
    marked.map(([why, index], order) => [
      `break${index}`,
      {
        type: "line" as const,
        xMin: index - 0.5,
        xMax: index - 0.5,
        borderColor: palette.ink,
        borderWidth: 1,
        label: {
          display: true,
          content: why,
          // Over the chart, where no point can hide behind it.
          position: "end" as const,
          yAdjust: -20 - (order % 2) * 18,
          backgroundColor: palette.paper,
          color: palette.ink,
          padding: 2,
          font: { family: palette.figures, size: 12, weight: "normal" as const },
        },
      },
    ]),
  );
}

/** The axis is as long as the points and the limits near them need: the first trial limits of a phase may lie far out. */
function drawnRange(points: readonly ControlPoint[]): { min?: number; max?: number } {
  const values = points.flatMap(({ value }) => value ?? []);
  const [low, high] = [Math.min(...values), Math.max(...values)];
  const reach = high - low;
  if (!(reach > 0)) return {};
  const near = points
    .flatMap(({ lower, upper }) => [lower ?? low, upper ?? high])
    .filter((limit) => limit >= low - reach && limit <= high + reach);
  return { min: Math.min(low, ...near) - 0.12 * reach, max: Math.max(high, ...near) + 0.12 * reach };
}

/** Check runs on individuals limits with their weighted mean; breaks are drawn where something changed. */
export function ControlChart({ points, quantity, unit, decimals, caption, summary, fileName }: ControlChartProps) {
  const palette = usePalette();
  const base = palette && axis(palette, "", false);
  const options: ChartOptions<"scatter"> | undefined = palette &&
    base && {
      ...commonOptions(palette),
      scales: {
        x: {
          ...base,
          min: -0.5,
          max: points.length - 0.5,
          afterBuildTicks: (scale) => {
            const every = Math.max(1, Math.ceil(points.length / Math.max(1, Math.floor(scale.width / 150))));
            scale.ticks = points.flatMap((_, value) => (value % every === 0 ? [{ value }] : []));
          },
          ticks: { ...base.ticks, autoSkip: false, callback: (value) => points[Number(value)]?.at ?? "" },
        },
        y: { ...figureAxis(palette, unit, true), ...drawnRange(points) },
      },
      // Room over the chart for breaks, and at its end for the names of the lines.
      layout: { padding: { right: 112, top: points.some((point) => point.breakBefore) ? 44 : 8 } },
      plugins: { annotation: { clip: false, annotations: breaks(points, palette) } },
    };
  return (
    <ChartFrame
      summary={summary ?? controlSummary(points, quantity, unit, decimals)}
      caption={caption}
      table={controlTable(points, quantity, unit, decimals)}
      fileName={fileName}
      height="middle"
    >
      {(chart) =>
        palette && options ? (
          <Scatter
            ref={(made) => {
              chart.current = made ?? null;
            }}
            data={controlData(points, palette)}
            options={options}
            plugins={[paperUnder, endLabels]}
          />
        ) : null
      }
    </ChartFrame>
  );
}
