import type { PointStyle } from "chart.js";
import type { Palette } from "./palette";

export type SeriesStyle = { colour: string; dash: number[]; mark: PointStyle; rotation: number; filled: boolean };

/** Carbon blue, dashed, open squares: the baseline, everywhere and only. */
export function baselineStyle(palette: Palette): SeriesStyle {
  return { colour: palette.carbon, dash: [6, 4], mark: "rect", rotation: 0, filled: false };
}

/** Up to four series, told apart by line and mark as well as by colour. */
export function seriesStyle(palette: Palette, index: number): SeriesStyle {
  const styles: SeriesStyle[] = [
    { colour: palette.ink, dash: [], mark: "circle", rotation: 0, filled: true },
    { colour: palette.leaf, dash: [], mark: "triangle", rotation: 0, filled: false },
    { colour: palette.ochre, dash: [12, 3, 2, 3], mark: "rectRot", rotation: 0, filled: true },
    { colour: palette.plum, dash: [14, 4], mark: "triangle", rotation: 180, filled: false },
  ];
  const style = styles[index];
  if (!style) throw new RangeError("A chart holds at most four series beside the baseline");
  return style;
}
