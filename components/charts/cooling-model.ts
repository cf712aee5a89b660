import { formatNumber } from "@/lib/format/numbers";
import { levelUnit } from "@/lib/format/quantities";
import type { BarsColumn, BarsRow } from "@/components/ui/bars/bars-model";

export type CoolingPoint = {
  /** A-weighted level in dB at the chart's distance, with its 95 % half-width. */
  levelDba: number;
  levelU95Db?: number;
  /** In the chart's quantity, with its 95 % half-width. */
  cooling: number;
  coolingU95?: number;
  /** Set speed in rpm, for the table. */
  speedRpm?: number;
  /** The level is an upper bound. */
  upperBound?: boolean;
};

export type CoolingSeries = {
  key: string;
  name: string;
  points: readonly CoolingPoint[];
  /**
   * The curve between the points as the method reads it, in drawing order, with its 95 % half-width where there is one;
   * straight lines when not given.
   */
  curve?: readonly { levelDba: number; cooling: number; coolingU95?: number }[];
};

/** The vertical quantity: temperature rise, or rise for each watt where sessions are put side by side. */
export type CoolingQuantity = { head: string; unit: string; decimals: number };

export const deltaTQuantity: CoolingQuantity = { head: "ΔT over ambient", unit: "K", decimals: 1 };
export const resistanceQuantity: CoolingQuantity = { head: "ΔT/P", unit: "K/W", decimals: 3 };

/** One sentence for those who hear the chart. Series without points are said to have none. */
export function coolingSummary(
  series: readonly CoolingSeries[],
  quantity: CoolingQuantity,
  distanceMm: number,
): string {
  const said = series.map(({ name, points }) => {
    const sorted = points.toSorted((a, b) => a.levelDba - b.levelDba);
    const [first, last] = [sorted[0], sorted.at(-1)];
    if (!first || !last) return `${name} has no points`;
    const say = (point: CoolingPoint) =>
      `${formatNumber(point.cooling, quantity)} ${quantity.unit} at ${formatNumber(point.levelDba, { decimals: 1 })}`;
    return `${name} from ${say(first)} to ${say(last)} ${levelUnit(distanceMm)}`;
  });
  return `${quantity.head} against level: ${said.join("; ")}.`;
}

/** The chart's figures as a table, a row a point. */
export function coolingTable(
  series: readonly CoolingSeries[],
  quantity: CoolingQuantity,
  distanceMm: number,
): { caption: string; columns: BarsColumn[]; rows: BarsRow[] } {
  return {
    caption: `${quantity.head} against level, the chart’s figures`,
    columns: [
      { key: "name", head: "Series" },
      { key: "speed", head: "Set speed", unit: "rpm" },
      { key: "level", head: "Level", unit: levelUnit(distanceMm) },
      { key: "cooling", head: quantity.head, unit: quantity.unit },
    ],
    rows: series.flatMap(({ key, name, points }) =>
      points.map((point, index) => ({
        key: `${key}-${index}`,
        cells: {
          name: { words: name },
          speed: { figure: { value: point.speedRpm, decimals: 0, why: "no set speed given" } },
          level: {
            figure: {
              value: point.levelDba,
              uncertainty: point.levelU95Db,
              decimals: 1,
              bound: point.upperBound ? ("upper" as const) : undefined,
            },
          },
          cooling: { figure: { value: point.cooling, uncertainty: point.coolingU95, decimals: quantity.decimals } },
        },
      })),
    ),
  };
}
