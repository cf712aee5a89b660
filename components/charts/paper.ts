import type { ChartOptions, Plugin, ScaleOptionsByType } from "chart.js";
import type { Palette } from "./palette";

/** Fills the canvas with paper, so that a picture of it stands by itself. */
export const paperUnder: Plugin = {
  id: "paperUnder",
  beforeDraw(chart) {
    const { ctx, width, height, options } = chart;
    ctx.save();
    ctx.fillStyle = typeof options.backgroundColor === "string" ? options.backgroundColor : "#fff";
    ctx.fillRect(0, 0, width, height);
    ctx.restore();
  },
};

/** One axis: quiet words, thin rules across, none down. */
export function axis(palette: Palette, title: string, rules: boolean) {
  return {
    title: { display: title !== "", text: title, color: palette.soft, font: { family: palette.figures, size: 12 } },
    ticks: { color: palette.soft, font: { family: palette.figures, size: 12 }, maxRotation: 0 },
    grid: { display: rules, color: palette.rule, lineWidth: 0.6, drawTicks: false },
    border: { color: palette.soft, display: !rules },
  } satisfies Partial<Record<keyof ScaleOptionsByType<"linear">, unknown>>;
}

/** What every chart shares: its paper and type, no legend, no motion where none is wanted. */
export function commonOptions(palette: Palette) {
  return {
    backgroundColor: palette.paper,
    font: { family: palette.figures },
    responsive: true,
    maintainAspectRatio: false,
    animation: palette.still ? false : { duration: 200 },
    events: [],
    plugins: {},
  } satisfies ChartOptions;
}
