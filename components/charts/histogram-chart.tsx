"use client";

import type { ChartOptions } from "chart.js";
import type { ReactNode } from "react";
import { Bar } from "react-chartjs-2";
import { formatRange } from "@/lib/format/quantities";
import type { HistogramBin } from "@/components/ui/small-histogram";
import { ChartFrame } from "./chart-frame";
import { usePalette, type Palette } from "./palette";
import { axis, commonOptions, figureAxis, paperUnder } from "./paper";
import "./register";

export type HistogramChartProps = {
  bins: readonly HistogramBin[];
  quantity: string;
  unit: string;
  countOf: string;
  decimals?: number;
  caption?: ReactNode;
  fileName?: string;
  /** Single values to be found among the rest, each with its name. */
  marks?: readonly { value: number; name: string }[];
};

/** Lines across the bars; on an axis of bins a value lies by its bin's place. */
function markLines(bins: readonly HistogramBin[], marks: NonNullable<HistogramChartProps["marks"]>, palette: Palette) {
  const [first] = bins;
  if (!first) return {};
  return Object.fromEntries(
    marks.map(({ value, name }, index) => [
      `mark${index}`,
      {
        type: "line" as const,
        scaleID: "x",
        value: (value - first.from) / (first.to - first.from) - 0.5,
        borderColor: palette.ink,
        borderWidth: 2,
        label: {
          display: true,
          content: name,
          position: "start" as const,
          yAdjust: 18 * (index % 3),
          backgroundColor: palette.paper,
          color: palette.ink,
          font: { family: palette.figures, size: 12, weight: "bold" as const },
        },
      },
    ]),
  );
}

/** How many lie where: bars without gaps, counts up the side. */
export function HistogramChart(props: HistogramChartProps) {
  const { bins, quantity, unit, countOf, decimals = 1, caption, fileName } = props;
  const palette = usePalette();
  const total = bins.reduce((sum, bin) => sum + bin.count, 0);
  const most = bins.toSorted((a, b) => b.count - a.count)[0];
  const range = (bin: HistogramBin) => formatRange(bin.from, bin.to, { decimals });
  const base = palette && figureAxis(palette, countOf, true);
  const options: ChartOptions<"bar"> | undefined = palette &&
    base && {
      ...commonOptions(palette),
      plugins: { annotation: { annotations: markLines(bins, props.marks ?? [], palette) } },
      scales: {
        x: axis(palette, `${quantity}, ${unit}`, false),
        y: { ...base, beginAtZero: true, ticks: { ...base.ticks, precision: 0 } },
      },
    };
  return (
    <ChartFrame
      summary={`${quantity} of ${total} ${countOf}${most ? `, most of them ${range(most)} ${unit}` : ""}.`}
      caption={caption}
      fileName={fileName}
      height="low"
      table={{
        caption: `${quantity}, the chart’s figures`,
        columns: [
          { key: "range", head: quantity, unit },
          { key: "count", head: countOf },
        ],
        rows: bins.map((bin) => ({
          key: String(bin.from),
          cells: {
            range: { words: range(bin), sortBy: bin.from },
            count: { figure: { value: bin.count, decimals: 0 } },
          },
        })),
      }}
    >
      {(chart) =>
        palette && options ? (
          <Bar
            ref={(made) => {
              chart.current = made ?? null;
            }}
            data={{
              labels: bins.map(range),
              datasets: [
                {
                  data: bins.map((bin) => bin.count),
                  backgroundColor: palette.graph,
                  borderColor: palette.paper,
                  borderWidth: 1,
                  barPercentage: 1,
                  categoryPercentage: 1,
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
