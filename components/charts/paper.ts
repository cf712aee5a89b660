import type { ChartOptions, Plugin, ScaleOptionsByType } from "chart.js";
import { formatNumber } from "@/lib/format/numbers";
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

/** Decimals that write every step of an axis, three at most. */
function stepDecimals(ticks: readonly { value: number }[]): number {
  const step = Math.abs((ticks[1]?.value ?? 1) - (ticks[0]?.value ?? 0));
  const fits = [0, 1, 2].find((decimals) => Math.abs(step * 10 ** decimals - Math.round(step * 10 ** decimals)) < 1e-6);
  return fits ?? 3;
}

/** Figures along a linear axis with a true minus. */
function tickFigures(value: string | number, _index: number, ticks: readonly { value: number }[]): string {
  return formatNumber(Number(value), { decimals: stepDecimals(ticks) });
}

/** One axis: quiet words, thin rules across, none down. */
export function axis(palette: Palette, title: string, rules: boolean) {
  return {
    title: { display: title !== "", text: title, color: palette.soft, font: { family: palette.figures, size: 12 } },
    ticks: { color: palette.soft, font: { family: palette.figures, size: 12 }, maxRotation: 0 },
    grid: { display: rules, color: palette.rule, lineWidth: 0.6, drawTicks: false },
    border: { color: palette.soft, display: !rules },
  } satisfies Partial<Record<keyof ScaleOptionsByType<"linear">, unknown>>;
}

/** A linear axis of figures, named at round steps alone. */
export function figureAxis(palette: Palette, title: string, rules: boolean) {
  const base = axis(palette, title, rules);
  return { ...base, ticks: { ...base.ticks, callback: tickFigures, includeBounds: false } };
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
