import type { Chart, Plugin } from "chart.js";
import { drawPoint } from "chart.js/helpers";

const rowPx = 18;
const narrowPx = 560;

/** Room that the key takes over a chart of so many lines: a row each on a narrow chart, else two rows at most. Pixels. */
export function keyHeight(chart: Chart, lines: number): number {
  return rowPx * (chart.width < narrowPx ? lines : Math.ceil(lines / 3)) + 10;
}

/** Names of the lines over the chart, each after a piece of its line, where the ends lie too close to be named there. */
export const lineKey: Plugin<"line"> = {
  id: "lineKey",
  afterDraw(chart) {
    const { ctx, chartArea } = chart;
    const perRow = chart.width < narrowPx ? 1 : 3;
    const columnPx = chartArea.width / perRow;
    ctx.save();
    ctx.font = `700 12px ${chart.options.font?.family ?? "monospace"}`;
    ctx.textBaseline = "middle";
    chart.data.datasets.forEach((dataset, index) => {
      const x = chartArea.left + (index % perRow) * columnPx;
      const y = rowPx * Math.floor(index / perRow) + rowPx / 2 + 2;
      const colour = typeof dataset.borderColor === "string" ? dataset.borderColor : "#000";
      [ctx.strokeStyle, ctx.fillStyle, ctx.lineWidth] = [colour, colour, 2];
      const dash = Array.isArray(dataset.borderDash) ? dataset.borderDash : [];
      ctx.setLineDash(dash.filter((part) => part !== undefined));
      ctx.beginPath();
      ctx.moveTo(x, y);
      ctx.lineTo(x + 34, y);
      ctx.stroke();
      ctx.setLineDash([]);
      const { pointStyle, pointRotation, pointBackgroundColor } = dataset;
      if (typeof pointStyle === "string") {
        ctx.fillStyle = typeof pointBackgroundColor === "string" ? pointBackgroundColor : colour;
        const rotation = typeof pointRotation === "number" ? pointRotation : 0;
        drawPoint(ctx, { pointStyle, rotation, radius: 4, borderWidth: 1.5 }, x + 17, y);
      }
      ctx.fillStyle = colour;
      ctx.fillText(dataset.label ?? "", x + 42, y, columnPx - 46);
    });
    ctx.restore();
  },
};
