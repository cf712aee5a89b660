"use client";

import type { ChartData, ChartOptions, Plugin } from "chart.js";
import type { ReactNode } from "react";
import { Bar } from "react-chartjs-2";
import { ChartFrame } from "./chart-frame";
import { placeLabels } from "./label-places";
import { usePalette, type Palette } from "./palette";
import { axis, commonOptions, figureAxis, paperUnder } from "./paper";
import "./register";
import {
  bandName,
  spectrumSummary,
  spectrumTable,
  tonesByBand,
  type BandTones,
  type PredictedTone,
  type SpectrumBand,
} from "./spectrum-model";

export type SpectrumChartProps = {
  bands: readonly SpectrumBand[];
  tones?: readonly PredictedTone[];
  /** "dB(A) @ 100 mm". */
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

/** Names over the bars that hold a predicted tone, tied to them, clear of the bars and of each other. */
const toneNames: Plugin<"bar"> = {
  id: "toneNames",
  afterDatasetsDraw(chart) {
    const { ctx, chartArea } = chart;
    const names = namesOf(chart.data.datasets[0]);
    const bars = chart.getDatasetMeta(0).data;
    ctx.save();
    ctx.font = `12px ${chart.options.font?.family ?? "monospace"}`;
    ctx.textBaseline = "middle";
    const wishes = bars.flatMap((bar, index) =>
      (names[index] ?? []).map((name) => {
        // A narrow chart has room for the frequency; the name stands in the table.
        const text = chart.width < 560 ? name.split(" Hz")[0] + " Hz" : name;
        return { text, w: ctx.measureText(text).width, h: 14, at: { x: bar.x, y: bar.y - 8 } };
      }),
    );
    const half = chartArea.width / Math.max(1, bars.length) / 2;
    const obstacles = bars.map(({ x, y }) => ({ x: x - half, y: y - 4, w: 2 * half, h: chartArea.bottom - y + 4 }));
    const area = { x: chartArea.left, y: 4, w: chartArea.width, h: chartArea.bottom - 4 };
    const ink = typeof chart.options.color === "string" ? chart.options.color : "#000";
    [ctx.fillStyle, ctx.strokeStyle, ctx.lineWidth] = [ink, ink, 1];
    placeLabels(wishes, obstacles, area).forEach((place, order) => {
      const wish = wishes[order];
      if (!wish) return;
      ctx.fillText(wish.text, place.x, place.y + place.h / 2);
      ctx.beginPath();
      ctx.moveTo(wish.at.x, wish.at.y + 6);
      ctx.lineTo(Math.min(Math.max(wish.at.x, place.x), place.x + place.w), Math.min(wish.at.y + 6, place.y + place.h));
      ctx.stroke();
    });
    ctx.restore();
  },
};

function namesOf(dataset: object | undefined): string[][] {
  return dataset && "names" in dataset && Array.isArray(dataset.names) ? dataset.names : [];
}

function spectrumData(
  bands: readonly SpectrumBand[],
  byBand: readonly BandTones[],
  palette: Palette,
): ChartData<"bar"> {
  const hatched = hatch(palette);
  const fill = (tones: BandTones | undefined) =>
    tones?.solid ? palette.ink : tones?.hatched ? hatched : palette.graph;
  const set = {
    names: byBand.map((tones) => tones.names),
    data: bands.map((band) => band.levelDb ?? null),
    backgroundColor: bands.map((_, index) => fill(byBand[index])),
    borderColor: bands.map((_, index) => (byBand[index]?.hatched ? palette.ink : "transparent")),
    borderWidth: 1.5,
    barPercentage: 0.9,
    categoryPercentage: 0.92,
  };
  return { labels: bands.map(({ nominalHz }) => bandName(nominalHz)), datasets: [set] };
}

/** Third-octave levels. Blade-passing tones are solid, rotor-interaction tones hatched. */
export function SpectrumChart({ bands, tones = [], unit, caption, summary, fileName }: SpectrumChartProps) {
  const palette = usePalette();
  const byBand = tonesByBand(bands, tones);
  const lowest = Math.min(0, ...bands.map((band) => band.levelDb ?? 0));
  const options: ChartOptions<"bar"> | undefined = palette && {
    ...commonOptions(palette),
    color: palette.ink,
    layout: { padding: { top: tones.length > 0 ? 48 : 4 } },
    scales: {
      x: { ...axis(palette, "one-third-octave band, Hz", false) },
      y: { ...figureAxis(palette, unit, true), suggestedMin: lowest },
    },
  };
  return (
    <ChartFrame
      summary={summary ?? spectrumSummary(bands, tones, unit)}
      caption={caption}
      table={spectrumTable(bands, tones, unit)}
      fileName={fileName}
      height="middle"
    >
      {(chart) =>
        palette && options ? (
          <Bar
            ref={(made) => {
              chart.current = made ?? null;
            }}
            data={spectrumData(bands, byBand, palette)}
            options={options}
            plugins={[paperUnder, toneNames]}
          />
        ) : null
      }
    </ChartFrame>
  );
}
