import type { Chart, Plugin } from "chart.js";
import { markBoxes } from "./error-bars";
import { lineObstacles, placeLabels, type Box } from "./label-places";

type Named = { index: number; text: string; colour: string; at: { x: number; y: number } };

function endOf(chart: Chart, index: number): Named | undefined {
  const meta = chart.getDatasetMeta(index);
  const dataset = chart.data.datasets[index];
  const last = meta.data.at(-1);
  if (!dataset?.label || !last || meta.hidden) return undefined;
  const colour = typeof dataset.borderColor === "string" ? dataset.borderColor : "currentColor";
  return { index, text: dataset.label, colour, at: { x: last.x, y: last.y } };
}

function drawLabels(chart: Chart): void {
  const { ctx, chartArea } = chart;
  const named = chart.data.datasets.flatMap((_, index) => endOf(chart, index) ?? []);
  const family = chart.options.font?.family ?? "monospace";
  ctx.save();
  ctx.font = `700 12px ${family}`;
  ctx.textBaseline = "middle";
  // A band's edges have no line: labels may lie over a tint.
  const obstacles: Box[] = chart.data.datasets.flatMap((dataset, index) =>
    dataset.borderWidth === 0
      ? []
      : [...markBoxes(chart, index), ...lineObstacles(chart.getDatasetMeta(index).data.map(({ x, y }) => ({ x, y })))],
  );
  const area = { x: chartArea.left, y: chartArea.top, w: chart.width - chartArea.left - 2, h: chartArea.height };
  const wishes = named.map(({ text, at }) => ({ w: ctx.measureText(text).width, h: 14, at }));
  placeLabels(wishes, obstacles, area).forEach((place, order) => {
    const series = named[order];
    if (!series) return;
    ctx.fillStyle = series.colour;
    ctx.strokeStyle = series.colour;
    if (place.tied) {
      ctx.lineWidth = 1;
      ctx.beginPath();
      ctx.moveTo(series.at.x, series.at.y);
      ctx.lineTo(place.x > series.at.x ? place.x : place.x + place.w, place.y + place.h / 2);
      ctx.stroke();
    }
    ctx.fillText(series.text, place.x, place.y + place.h / 2);
  });
  ctx.restore();
}

/** Names every labelled dataset at its end, clear of marks, bars and lines, instead of a legend. */
export const endLabels: Plugin = {
  id: "endLabels",
  afterDatasetsDraw(chart) {
    drawLabels(chart);
  },
};
