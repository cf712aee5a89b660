import type { Plugin } from "chart.js";
import { placeLabels, type Box } from "./label-places";

function labelsOf(dataset: object | undefined): string[][] {
  return dataset && "labels" in dataset && Array.isArray(dataset.labels) ? dataset.labels : [];
}

/**
 * Names over the bars that hold a tone, tied to them, and the name of the line over the bars at its end; clear of the
 * bars and of each other. The first dataset holds the bars with `labels`, a list a bar; a second is the line.
 */
export const toneNames: Plugin = {
  id: "toneNames",
  afterDatasetsDraw(chart) {
    const { ctx, chartArea } = chart;
    const labels = labelsOf(chart.data.datasets[0]);
    const bars = chart.getDatasetMeta(0).data;
    ctx.save();
    ctx.font = `12px ${chart.options.font?.family ?? "monospace"}`;
    ctx.textBaseline = "middle";
    const ink = typeof chart.options.color === "string" ? chart.options.color : "#000";
    const line = chart.data.datasets[1];
    const points = line ? chart.getDatasetMeta(1).data : [];
    const tops = bars.map((bar, index) => Math.min(bar.y, points[index]?.y ?? bar.y));
    const names = bars.flatMap((bar, index) =>
      (labels[index] ?? []).map((name) => ({
        // A narrow chart has room for the frequency; the name stands in the table.
        text: chart.width < 560 ? `${name.split(" Hz")[0]} Hz` : name,
        colour: ink,
        at: { x: bar.x, y: (tops[index] ?? bar.y) - 8 },
      })),
    );
    const end = points.at(-1);
    if (line?.label && end) {
      const colour = typeof line.borderColor === "string" ? line.borderColor : ink;
      names.push({ text: line.label, colour, at: { x: end.x, y: Math.min(...tops.slice(-6)) - 8 } });
    }
    const half = chartArea.width / Math.max(1, bars.length) / 2;
    const obstacles: Box[] = bars.map(({ x }, index) => {
      const y = (tops[index] ?? chartArea.bottom) - 4;
      return { x: x - half, y, w: 2 * half, h: chartArea.bottom - y };
    });
    const area = { x: chartArea.left, y: 4, w: chartArea.width, h: chartArea.bottom - 4 };
    const wishes = names.map(({ text, at }) => ({ w: ctx.measureText(text).width, h: 14, at }));
    placeLabels(wishes, obstacles, area).forEach((place, order) => {
      const name = names[order];
      if (!name) return;
      [ctx.fillStyle, ctx.strokeStyle, ctx.lineWidth] = [name.colour, name.colour, 1];
      ctx.fillText(name.text, place.x, place.y + place.h / 2);
      if (name.colour !== ink) return;
      ctx.beginPath();
      ctx.moveTo(name.at.x, name.at.y + 6);
      const x = Math.min(Math.max(name.at.x, place.x), place.x + place.w);
      ctx.lineTo(x, Math.min(name.at.y + 6, place.y + place.h));
      ctx.stroke();
    });
    ctx.restore();
  },
};
