"use client";

import type { ChartData, ChartOptions } from "chart.js";
import type { ReactNode } from "react";
import { Scatter } from "react-chartjs-2";
import { formatNumber } from "@/lib/format/numbers";
import { countWords } from "@/lib/format/words";
import { ChartFrame } from "./chart-frame";
import { errorBars, type BarredPoint } from "./error-bars";
import { usePalette, type Palette } from "./palette";
import { axis, commonOptions, figureAxis, paperUnder } from "./paper";
import "./register";

export type DotInterval = {
  key: string;
  name: string;
  /** Undefined where there are too few to say anything, with why. */
  estimate: number | undefined;
  low?: number;
  high?: number;
  /** How many it rests on. */
  count: number;
  why?: string;
};

export type DotIntervalChartProps = {
  rows: readonly DotInterval[];
  /** "Effect on ΔT at equal noise". */
  quantity: string;
  unit: string;
  /** What the counts count: "designs". */
  countOf: string;
  /** What the interval is: "95 % interval, adjusted for 14 traits". */
  intervalWords: string;
  caption?: ReactNode;
  summary?: string;
  fileName?: string;
};

function dotTable({ rows, quantity, unit, countOf, intervalWords }: DotIntervalChartProps) {
  const figure = (value: number | undefined, why: string | undefined) => ({
    figure: { value, decimals: 2, signed: true, why: why ?? "not enough to say" },
  });
  return {
    caption: `${quantity}, the chart’s figures: ${intervalWords}`,
    columns: [
      { key: "name", head: "Trait" },
      { key: "estimate", head: "Effect", unit },
      { key: "low", head: "From", unit },
      { key: "high", head: "To", unit },
      { key: "count", head: `Number of ${countOf}` },
    ],
    rows: rows.map((row) => ({
      key: row.key,
      cells: {
        name: { words: row.name },
        estimate: figure(row.estimate, row.why),
        low: figure(row.estimate === undefined ? undefined : row.low, row.why),
        high: figure(row.estimate === undefined ? undefined : row.high, row.why),
        count: { figure: { value: row.count, decimals: 0 } },
      },
    })),
  };
}

function dotSummary({ rows, quantity, unit, intervalWords }: DotIntervalChartProps): string {
  const clear = rows.filter(({ low, high }) => low !== undefined && high !== undefined && low * high > 0);
  const said = clear.map(
    ({ name, estimate = 0 }) => `${name} ${formatNumber(estimate, { decimals: 1, signed: true })} ${unit}`,
  );
  const which = said.length > 0 ? `clear of zero: ${said.join(", ")}` : "none clear of zero";
  return `${quantity} for ${countWords(rows.length, "trait")} with ${intervalWords}; ${which}.`;
}

function dotData(rows: readonly DotInterval[], palette: Palette): ChartData<"scatter", BarredPoint[]> {
  const data = rows.flatMap(({ estimate, low, high }, y) =>
    estimate === undefined ? [] : [{ x: estimate, y, xLow: low, xHigh: high }],
  );
  const spansZero = data.map(({ xLow = 0, xHigh = 0 }) => xLow * xHigh <= 0);
  return {
    datasets: [
      {
        data,
        borderColor: palette.ink,
        pointRadius: 5,
        pointBorderWidth: 2,
        // Hollow: the interval holds zero, so the data can't tell which way.
        pointBackgroundColor: spansZero.map((spans) => (spans ? palette.paper : palette.ink)),
      },
    ],
  };
}

/** Effects with their intervals, a row a trait, against a line at zero; a hollow dot can't be told from none. */
export function DotIntervalChart(props: DotIntervalChartProps) {
  const palette = usePalette();
  const { rows, quantity, unit, caption, fileName } = props;
  const base = palette && axis(palette, "", false);
  const options: ChartOptions<"scatter"> | undefined = palette &&
    base && {
      ...commonOptions(palette),
      scales: {
        x: {
          ...figureAxis(palette, `${quantity}, ${unit}`, false),
          suggestedMin: Math.min(-0.1, ...rows.map(({ low }) => low ?? 0)),
          suggestedMax: Math.max(0.1, ...rows.map(({ high }) => high ?? 0)),
        },
        y: {
          ...base,
          reverse: true,
          min: -0.6,
          max: rows.length - 0.4,
          border: { display: false },
          afterBuildTicks: (scale) => {
            scale.ticks = rows.map((_, value) => ({ value }));
          },
          ticks: {
            ...base.ticks,
            autoSkip: false,
            color: palette.ink,
            callback: (value) => [rows[Number(value)]?.name ?? "", `n = ${rows[Number(value)]?.count ?? 0}`],
          },
        },
      },
      plugins: {
        annotation: {
          annotations: { zero: { type: "line", xMin: 0, xMax: 0, borderColor: palette.ink, borderWidth: 1 } },
        },
      },
    };
  return (
    <ChartFrame
      summary={props.summary ?? dotSummary(props)}
      caption={caption}
      table={dotTable(props)}
      fileName={fileName}
      height={rows.length > 9 ? "long" : rows.length > 6 ? "tall" : "middle"}
    >
      {(chart) =>
        palette && options ? (
          <Scatter
            ref={(made) => {
              chart.current = made ?? null;
            }}
            data={dotData(rows, palette)}
            options={options}
            plugins={[paperUnder, errorBars]}
          />
        ) : null
      }
    </ChartFrame>
  );
}
