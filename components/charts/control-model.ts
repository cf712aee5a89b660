import { formatNumber } from "@/lib/format/numbers";
import type { BarsColumn, BarsRow } from "@/components/ui/bars/bars-model";

export type ControlPoint = {
  key: string;
  /** What the point is called on the axis: a date or a session. */
  at: string;
  /** Undefined where the check run is missing, with why. */
  value: number | undefined;
  why?: string;
  /** Limits of its phase; a break may move them. Undefined before there are enough points. */
  centre?: number;
  lower?: number;
  upper?: number;
  /** The exponentially weighted mean up to here, with its own limits. */
  ewma?: number;
  ewmaLower?: number;
  ewmaUpper?: number;
  /** Something changed before this point: "new microphone". */
  breakBefore?: string;
  /** What it broke, as it was judged; empty when it was in control. Left out: judged by the limits here. */
  out?: string;
  /** Said in the table beside it. */
  note?: string;
};

/** Why a point is out of control, or undefined: outside its own limits, or its weighted mean outside those. */
export function outOfControl(point: ControlPoint): string | undefined {
  const { value, lower, upper, ewma, ewmaLower, ewmaUpper } = point;
  if (point.out !== undefined) return point.out === "" ? undefined : point.out;
  if (value !== undefined && upper !== undefined && value > upper) return "above the upper limit";
  if (value !== undefined && lower !== undefined && value < lower) return "below the lower limit";
  if (ewma !== undefined && ewmaUpper !== undefined && ewma > ewmaUpper) return "weighted mean above its limit";
  if (ewma !== undefined && ewmaLower !== undefined && ewma < ewmaLower) return "weighted mean below its limit";
  return undefined;
}

/** One sentence for those who hear the chart. */
export function controlSummary(points: readonly ControlPoint[], quantity: string, unit: string, decimals = 1): string {
  const known = points.flatMap((point) => (point.value === undefined ? [] : [point.value]));
  if (known.length === 0) return `${quantity}: no check runs yet.`;
  const out = points.filter((point) => outOfControl(point)).length;
  const breaks = points.filter((point) => point.breakBefore).length;
  const low = formatNumber(Math.min(...known), { decimals });
  const high = formatNumber(Math.max(...known), { decimals });
  return `${quantity} over ${known.length} check runs, ${low} to ${high} ${unit}; ${out} out of control, ${breaks} breaks.`;
}

/** The chart's figures as a table, a row a check run. */
export function controlTable(
  points: readonly ControlPoint[],
  quantity: string,
  unit: string,
  decimals = 2,
): { caption: string; columns: BarsColumn[]; rows: BarsRow[] } {
  const figure = (value: number | undefined, why = "not enough check runs yet") => ({
    figure: { value, decimals, why },
  });
  return {
    caption: `${quantity}, the chart’s figures`,
    columns: [
      { key: "at", head: "Check run" },
      { key: "value", head: quantity, unit },
      { key: "lower", head: "Lower limit", unit },
      { key: "upper", head: "Upper limit", unit },
      { key: "ewma", head: "Weighted mean", unit },
      { key: "note", head: "Note" },
    ],
    rows: points.map((point) => {
      const broke = point.breakBefore ? `break: ${point.breakBefore}` : null;
      const note = [broke, outOfControl(point), point.note].filter(Boolean);
      return {
        key: point.key,
        tone: outOfControl(point) ? ("wrong" as const) : undefined,
        cells: {
          at: { words: point.at },
          value: figure(point.value, point.why ?? "not measured"),
          lower: figure(point.lower),
          upper: figure(point.upper),
          ewma: figure(point.ewma),
          note: { words: note.join("; ") || "in control" },
        },
      };
    }),
  };
}
