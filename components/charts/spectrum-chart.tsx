"use client";

import type { ChartData, ChartOptions } from "chart.js";
import type { ReactNode } from "react";
import { Chart } from "react-chartjs-2";
import { ChartFrame } from "./chart-frame";
import { usePalette, type Palette } from "./palette";
import { axis, commonOptions, figureAxis, paperUnder } from "./paper";
import "./register";
import { baselineStyle } from "./series-style";
import {
  bandName,
  spectrumSummary,
  spectrumTable,
  tonesByBand,
  type BandTones,
  type SpectrumBand,
  type SpectrumLine,
  type SpectrumTone,
} from "./spectrum-model";
import { toneNames } from "./tone-names";

export type SpectrumChartProps = {
  bands: readonly SpectrumBand[];
  tones?: readonly SpectrumTone[];
  /** Laid over the bars, dashed. */
  baseline?: SpectrumLine;
  /** "dB @ 100 mm". */
  unit: string;
  caption?: ReactNode;
  summary?: string;
  fileName?: string;
};

function hatch(palette: Palette): CanvasPattern | string {
  const tile = document.createElement("canvas");
  [tile.width, tile.height] = [8, 8];
  const ctx = tile.getContext("2d");
  if (!ctx) return palette.soft;
  ctx.fillStyle = palette.paper;
  ctx.fillRect(0, 0, 8, 8);
  ctx.strokeStyle = palette.ink;
  ctx.lineWidth = 2.5;
  ctx.beginPath();
  for (const shift of [-8, 0, 8]) {
    ctx.moveTo(shift - 1, 9);
    ctx.lineTo(shift + 9, -1);
  }
  ctx.stroke();
  return ctx.createPattern(tile, "repeat") ?? palette.soft;
}

type Data = ChartData<"bar" | "line", (number | null)[], string>;

function barSet(
  bands: readonly SpectrumBand[],
  byBand: readonly BandTones[],
  palette: Palette,
): Data["datasets"][number] {
  const hatched = hatch(palette);
  const fill = (tones: BandTones | undefined, band: SpectrumBand) =>
    tones?.solid ? palette.ink : tones?.hatched ? hatched : band.bound ? palette.bar : palette.graph;
  const outline = (tones: BandTones | undefined, band: SpectrumBand) =>
    tones?.solid ? "transparent" : tones?.hatched ? palette.ink : band.bound ? palette.graph : "transparent";
  const set = {
    type: "bar" as const,
    labels: byBand.map((tones) => tones.labels),
    data: bands.map((band) => band.levelDb ?? null),
    backgroundColor: bands.map((band, index) => fill(byBand[index], band)),
    borderColor: bands.map((band, index) => outline(byBand[index], band)),
    borderWidth: 1.5,
    barPercentage: 0.9,
    categoryPercentage: 0.92,
    order: 1,
  };
  return set;
}

function lineSet(bands: readonly SpectrumBand[], baseline: SpectrumLine, palette: Palette): Data["datasets"][number] {
  const style = baselineStyle(palette);
  return {
    type: "line",
    label: baseline.name,
    data: bands.map(({ nominalHz }) => baseline.bands.find((each) => each.nominalHz === nominalHz)?.levelDb ?? null),
    borderColor: style.colour,
    borderDash: style.dash,
    borderWidth: 2,
    pointStyle: style.mark,
    pointRadius: 3,
    pointBorderWidth: 1.5,
    pointBorderColor: style.colour,
    pointBackgroundColor: palette.paper,
    order: 0,
  };
}

/** Third-octave levels, the baseline dashed over them. Blade-passing tones are solid, rotor-interaction tones hatched. */
export function SpectrumChart({ bands, tones = [], baseline, unit, caption, summary, fileName }: SpectrumChartProps) {
  const palette = usePalette();
  const byBand = tonesByBand(bands, tones);
  const lowest = Math.min(0, ...bands.map((band) => band.levelDb ?? 0));
  const options: ChartOptions<"bar" | "line"> | undefined = palette && {
    ...commonOptions(palette),
    color: palette.ink,
    layout: { padding: { top: byBand.some(({ labels }) => labels.length > 0) ? 48 : 16 } },
    scales: {
      x: { ...axis(palette, "one-third-octave band, Hz", false) },
      y: { ...figureAxis(palette, unit, true), suggestedMin: lowest },
    },
  };
  return (
    <ChartFrame
      summary={summary ?? spectrumSummary(bands, tones, unit, baseline)}
      caption={caption}
      table={spectrumTable(bands, tones, unit, baseline)}
      fileName={fileName}
      height="middle"
    >
      {(chart) =>
        palette && options ? (
          <Chart
            type="bar"
            ref={(made) => {
              chart.current = made ?? null;
            }}
            data={{
              labels: bands.map(({ nominalHz }) => bandName(nominalHz)),
              datasets: [barSet(bands, byBand, palette), ...(baseline ? [lineSet(bands, baseline, palette)] : [])],
            }}
            options={options}
            plugins={[paperUnder, toneNames]}
          />
        ) : null
      }
    </ChartFrame>
  );
}
