"use client";

import type { ChartData, ChartOptions } from "chart.js";
import { color } from "chart.js/helpers";
import type { ReactNode } from "react";
import { Scatter } from "react-chartjs-2";
import { levelUnit } from "@/lib/format/quantities";
import { ChartFrame } from "./chart-frame";
import {
  coolingSummary,
  coolingTable,
  deltaTQuantity,
  type CoolingQuantity,
  type CoolingSeries,
} from "./cooling-model";
import { endLabels } from "./end-labels";
import { errorBars, type BarredPoint } from "./error-bars";
import { usePalette, type Palette } from "./palette";
import { commonOptions, figureAxis, paperUnder } from "./paper";
import "./register";
import { baselineStyle, seriesStyle, type SeriesStyle } from "./series-style";

export type CoolingChartProps = {
  /** At most four, in the order of their marks. */
  series: readonly CoolingSeries[];
  baseline?: CoolingSeries;
  quantity?: CoolingQuantity;
  distanceMm: number;
  /** Where the dotted equal-noise line stands, dB(A). */
  equalNoiseDba?: number;
  caption?: ReactNode;
  /** Instead of the sentence made from the points. */
  summary?: string;
  fileName?: string;
  height?: "tall" | "middle";
};

type Data = ChartData<"scatter", BarredPoint[]>;

/** The curve's 95 % band: two bare edges with what is between them tinted, light enough for bands to lie over each other. */
function band(curve: NonNullable<CoolingSeries["curve"]>, style: SeriesStyle): Data["datasets"] {
  const edge = (sign: 1 | -1, fill: false | "-1") => ({
    showLine: true,
    pointRadius: 0,
    borderWidth: 0,
    fill,
    backgroundColor: color(style.colour).alpha(0.13).rgbString(),
    data: curve.map(({ levelDba, cooling, coolingU95 = 0 }) => ({ x: levelDba, y: cooling + sign * coolingU95 })),
  });
  return curve.some(({ coolingU95 }) => coolingU95 !== undefined) ? [edge(-1, false), edge(1, "-1")] : [];
}

function datasets(series: CoolingSeries, style: SeriesStyle, palette: Palette): Data["datasets"] {
  const line = { borderColor: style.colour, borderWidth: 2, borderDash: style.dash };
  const marks = {
    ...line,
    label: series.name,
    showLine: !series.curve,
    pointStyle: style.mark,
    pointRotation: style.rotation,
    pointRadius: style.mark === "circle" ? 5 : 6,
    pointBorderWidth: 2,
    pointBackgroundColor: style.filled ? style.colour : palette.paper,
    data: series.points
      .map((point) => ({ x: point.levelDba, y: point.cooling, ux: point.levelU95Db, uy: point.coolingU95 }))
      .toSorted((a, b) => a.x - b.x),
  };
  if (!series.curve) return [marks];
  const curve = series.curve.map(({ levelDba, cooling }) => ({ x: levelDba, y: cooling }));
  return [marks, { ...line, showLine: true, pointRadius: 0, data: curve }, ...band(series.curve, style)];
}

function options(props: CoolingChartProps, palette: Palette, quantity: CoolingQuantity): ChartOptions<"scatter"> {
  const all = [...props.series, ...(props.baseline ? [props.baseline] : [])].flatMap(({ points }) => points);
  const right = Math.max(...all.map((point) => point.levelDba + (point.levelU95Db ?? 0)));
  const left = Math.min(...all.map((point) => point.levelDba - (point.levelU95Db ?? 0)));
  const top = Math.max(...all.map((point) => point.cooling + (point.coolingU95 ?? 0)));
  const bottom = Math.min(...all.map((point) => point.cooling - (point.coolingU95 ?? 0)));
  const level = props.equalNoiseDba;
  return {
    ...commonOptions(palette),
    scales: {
      // Room at the end for the names of the series.
      x: {
        ...figureAxis(palette, `Level, ${levelUnit(props.distanceMm)}`, false),
        suggestedMin: left,
        suggestedMax: right + (right - left) * 0.2,
      },
      y: {
        ...figureAxis(palette, `${quantity.head}, ${quantity.unit}`, true),
        suggestedMin: bottom,
        suggestedMax: top,
      },
    },
    plugins: {
      annotation: {
        annotations:
          level === undefined
            ? {}
            : {
                equalNoise: {
                  type: "line",
                  xMin: level,
                  xMax: level,
                  borderColor: palette.ink,
                  borderWidth: 1.75,
                  borderDash: [2, 3],
                  label: {
                    display: true,
                    content: "equal noise",
                    position: "end",
                    xAdjust: 46,
                    backgroundColor: "transparent",
                    color: palette.ink,
                    font: { family: palette.figures, size: 12, weight: "normal" },
                  },
                },
              },
      },
    },
  };
}

/** Cooling against noise over the baseline: error bars both ways, bands along curves that carry them, names at the ends, left and low is better. */
export function CoolingChart(props: CoolingChartProps) {
  const palette = usePalette();
  const { series, baseline, quantity = deltaTQuantity, distanceMm, caption, fileName, height = "tall" } = props;
  const all = baseline ? [...series, baseline] : series;
  const data: Data | undefined = palette && {
    datasets: [
      ...(baseline ? datasets(baseline, baselineStyle(palette), palette) : []),
      ...series.flatMap((each, index) => datasets(each, seriesStyle(palette, index), palette)),
    ],
  };
  return (
    <ChartFrame
      summary={props.summary ?? coolingSummary(all, quantity, distanceMm)}
      caption={caption}
      table={coolingTable(all, quantity, distanceMm)}
      fileName={fileName}
      height={height}
    >
      {(chart) =>
        palette && data ? (
          <Scatter
            ref={(made) => {
              chart.current = made ?? null;
            }}
            data={data}
            options={options(props, palette, quantity)}
            plugins={[paperUnder, errorBars, endLabels]}
          />
        ) : null
      }
    </ChartFrame>
  );
}
