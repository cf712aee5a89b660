"use client";

import type { ChartData, ChartOptions } from "chart.js";
import type { ReactNode } from "react";
import { Line } from "react-chartjs-2";
import { ChartFrame } from "./chart-frame";
import { keyHeight, lineKey } from "./line-key";
import { usePalette, type Palette } from "./palette";
import { axis, commonOptions, figureAxis, paperUnder } from "./paper";
import "./register";
import { baselineStyle, seriesStyle, type SeriesStyle } from "./series-style";
import { bandName, spectraSummary, spectraTable, type SpectrumLine } from "./spectrum-model";

export type SpectraChartProps = {
  /** At most four, in the order of their marks. */
  lines: readonly SpectrumLine[];
  baseline?: SpectrumLine;
  /** "dB @ 100 mm", or "dB against its own baseline". */
  unit: string;
  caption?: ReactNode;
  summary?: string;
  fileName?: string;
};

type Data = ChartData<"line", (number | null)[], string>;

function lineSet(line: SpectrumLine, style: SeriesStyle, palette: Palette): Data["datasets"][number] {
  return {
    label: line.name,
    data: line.bands.map((band) => band.levelDb ?? null),
    borderColor: style.colour,
    borderDash: style.dash,
    borderWidth: 2,
    pointStyle: style.mark,
    pointRotation: style.rotation,
    pointRadius: 3.5,
    pointBorderWidth: 1.5,
    pointBorderColor: style.colour,
    pointBackgroundColor: style.filled ? style.colour : palette.paper,
  };
}

/** Third-octave spectra of several fans over each other, the baseline dashed; names over them. */
export function SpectraChart({ lines, baseline, unit, caption, summary, fileName }: SpectraChartProps) {
  const palette = usePalette();
  const all = baseline ? [...lines, baseline] : lines;
  const bands = all[0]?.bands ?? [];
  const options: ChartOptions<"line"> | undefined = palette && {
    ...commonOptions(palette),
    layout: { padding: ({ chart }) => ({ top: keyHeight(chart, all.length) }) },
    scales: {
      x: { ...axis(palette, "one-third-octave band, Hz", false) },
      y: { ...figureAxis(palette, unit, true) },
    },
  };
  const data: Data | undefined = palette && {
    labels: bands.map(({ nominalHz }) => bandName(nominalHz)),
    datasets: [
      ...(baseline ? [lineSet(baseline, baselineStyle(palette), palette)] : []),
      ...lines.map((line, index) => lineSet(line, seriesStyle(palette, index), palette)),
    ],
  };
  return (
    <ChartFrame
      summary={summary ?? spectraSummary(all, unit)}
      caption={caption}
      table={spectraTable(all, unit, baseline?.key)}
      fileName={fileName}
      height="tall"
    >
      {(chart) =>
        palette && options && data ? (
          <Line
            ref={(made) => {
              chart.current = made ?? null;
            }}
            data={data}
            options={options}
            plugins={[paperUnder, lineKey]}
          />
        ) : null
      }
    </ChartFrame>
  );
}
