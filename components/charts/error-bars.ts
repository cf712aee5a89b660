import type { Chart, Plugin } from "chart.js";
import type { Box } from "./label-places";

/** A point with its 95 % half-widths in the units of its axes, or the ends of an interval that isn't even. */
export type BarredPoint = { x: number; y: number; ux?: number; uy?: number; xLow?: number; xHigh?: number };

const cap = 4;

function isBarred(raw: unknown): raw is BarredPoint {
  return typeof raw === "object" && raw !== null && "x" in raw && "y" in raw;
}

type Bars = { x: number; y: number; left: number; right: number; top: number; bottom: number };

/** Ends of every bar of a dataset in canvas pixels; a bar that isn't given has no length. */
export function barEnds(chart: Chart, datasetIndex: number): Bars[] {
  const [xScale, yScale] = [chart.scales.x, chart.scales.y];
  const data: readonly unknown[] = chart.data.datasets[datasetIndex]?.data ?? [];
  if (!xScale || !yScale) return [];
  return data.filter(isBarred).map(({ x, y, ux = 0, uy = 0, xLow = x - ux, xHigh = x + ux }) => ({
    x: xScale.getPixelForValue(x),
    y: yScale.getPixelForValue(y),
    left: xScale.getPixelForValue(xLow),
    right: xScale.getPixelForValue(xHigh),
    top: yScale.getPixelForValue(y + uy),
    bottom: yScale.getPixelForValue(y - uy),
  }));
}

/** The room that a dataset's marks and bars take, for labels to keep clear of. */
export function markBoxes(chart: Chart, datasetIndex: number): Box[] {
  return barEnds(chart, datasetIndex).flatMap(({ x, y, left, right, top, bottom }) => [
    { x: x - 7, y: y - 7, w: 14, h: 14 },
    { x: left - 2, y: y - cap, w: right - left + 4, h: 2 * cap },
    { x: x - cap, y: top - 2, w: 2 * cap, h: bottom - top + 4 },
  ]);
}

function drawBars(chart: Chart, datasetIndex: number): void {
  const dataset = chart.data.datasets[datasetIndex];
  const { ctx, chartArea } = chart;
  ctx.save();
  ctx.beginPath();
  ctx.rect(chartArea.left, chartArea.top, chartArea.width, chartArea.height);
  ctx.clip();
  ctx.strokeStyle = typeof dataset?.borderColor === "string" ? dataset.borderColor : "currentColor";
  ctx.lineWidth = 1.25;
  ctx.beginPath();
  for (const { x, y, left, right, top, bottom } of barEnds(chart, datasetIndex)) {
    if (right - left > 1) {
      ctx.moveTo(left, y);
      ctx.lineTo(right, y);
      for (const end of [left, right]) {
        ctx.moveTo(end, y - cap);
        ctx.lineTo(end, y + cap);
      }
    }
    if (bottom - top > 1) {
      ctx.moveTo(x, top);
      ctx.lineTo(x, bottom);
      for (const end of [top, bottom]) {
        ctx.moveTo(x - cap, end);
        ctx.lineTo(x + cap, end);
      }
    }
  }
  ctx.stroke();
  ctx.restore();
}

/** Draws error bars both ways under the marks of every dataset whose points carry them. */
export const errorBars: Plugin = {
  id: "errorBars",
  beforeDatasetDraw(chart, { index }) {
    drawBars(chart, index);
  },
};
