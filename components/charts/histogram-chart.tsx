"use client";

import type { ChartOptions } from "chart.js";
import type { ReactNode } from "react";
import { Bar } from "react-chartjs-2";
import { formatRange } from "@/lib/format/quantities";
import type { HistogramBin } from "@/components/ui/small-histogram";
import { ChartFrame } from "./chart-frame";
import { usePalette } from "./palette";
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
};

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
