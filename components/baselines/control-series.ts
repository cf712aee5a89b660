import type { ControlPoint } from "@/components/charts/control-model";
import type { Baseline, BaselineCheck, ControlPhase } from "@/lib/contracts/baselines";
import { formatDate } from "@/lib/format/dates";
import { formatNumber } from "@/lib/format/numbers";

/** Individuals, moving range and weighted mean of one unit on one bench version, of one quantity at one set speed. */
export type ControlSeries = {
  /** Its address on the page. */
  key: string;
  serial: string;
  bench: string;
  words: string;
  unit: string;
  decimals: number;
  checks: BaselineCheck[];
  phases: ControlPhase[];
};

const quantities = {
  level_dba: { words: "Level", decimals: 2, short: "level" },
  thermal_resistance_kpw: { words: "ΔT/P", decimals: 4, short: "resistance" },
  calibrator_db: { words: "Calibrator", decimals: 2, short: "calibrator" },
} as const;
const order = ["level_dba", "thermal_resistance_kpw", "calibrator_db"] as const;

export const breakWords = {
  unit: "unit replaced",
  bench: "bench changed",
  service: "service",
  other: "change",
} as const;

const d2 = 2 / Math.sqrt(Math.PI);
const keyOf = ({
  serial,
  bench,
  quantity,
  setSpeed,
}: Pick<BaselineCheck, "serial" | "bench" | "quantity" | "setSpeed">) =>
  [serial, bench, quantities[quantity].short, ...(setSpeed === null ? [] : [setSpeed])]
    .join(" ")
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, "-");

/** The charts of a baseline: by unit and bench version, levels before ΔT/P before the calibrator, by rising set speed. */
export function controlSeries({ checks, phases }: Pick<Baseline, "checks" | "phases">): ControlSeries[] {
  const found = new Map<string, ControlSeries & { quantity: BaselineCheck["quantity"]; setSpeed: number | null }>();
  for (const check of checks) {
    const { serial, bench, quantity, setSpeed } = check;
    const key = keyOf(check);
    const { words, decimals } = quantities[quantity];
    const unit = quantity === "thermal_resistance_kpw" ? "K/W" : quantity === "calibrator_db" ? "dB" : "dB(A)";
    const series = found.get(key) ?? {
      key,
      serial,
      bench,
      quantity,
      setSpeed,
      words: setSpeed === null ? words : `${words} at ${formatNumber(setSpeed)} rpm`,
      unit,
      decimals,
      checks: [],
      phases: phases.filter((phase) => keyOf(phase) === key),
    };
    series.checks.push(check);
    found.set(key, series);
  }
  return [...found.values()].sort(
    (a, b) =>
      `${a.bench} ${a.serial}`.localeCompare(`${b.bench} ${b.serial}`, "en") ||
      order.indexOf(a.quantity) - order.indexOf(b.quantity) ||
      (a.setSpeed ?? 0) - (b.setSpeed ?? 0),
  );
}

type Shape = Pick<ControlPoint, "value" | "centre" | "lower" | "upper" | "why"> & { out: string };

function points(series: ControlSeries, shape: (check: BaselineCheck) => Shape): ControlPoint[] {
  const breaks = series.phases.filter((phase) => phase.trial && phase.kind !== null);
  return series.checks.map((check, i): ControlPoint => {
    const last = series.checks[i - 1];
    const broke = breaks.find(({ from }) => from <= check.at && (!last || from > last.at));
    const limits = check.kind === "none" ? "no limits yet" : check.kind === "trial" ? "trial limits" : "frozen limits";
    const hold = check.holdReason === null ? [] : [`held; ${check.liftNote ?? "not lifted yet"}`];
    const hidden = check.published ? [] : ["not published"];
    return {
      key: `${check.session}`,
      at: `${check.session}, ${formatDate(check.at)}`,
      breakBefore: broke?.kind ? breakWords[broke.kind] : undefined,
      note: [limits, ...hold, ...hidden].join("; "),
      ...shape(check),
    };
  });
}

const some = (value: number | null): number | undefined => value ?? undefined;

/** The value of each session against the limits that it was held against. */
export const individuals = (series: ControlSeries): ControlPoint[] =>
  points(series, (check) => ({
    value: check.value,
    centre: some(check.centre),
    lower: some(check.lower),
    upper: some(check.upper),
    out: check.out.filter((rule) => !rule.startsWith("weighted")).join(", "),
  }));

/** How far each session lies from the one before; shown with its limit, held against by the individuals alone. */
export const movingRanges = (series: ControlSeries): ControlPoint[] =>
  points(series, (check) => ({
    value: some(check.movingRange),
    why: "the first session of its phase",
    centre: check.sigma === null ? undefined : d2 * check.sigma,
    upper: some(check.rangeUpper),
    out: "",
  }));

/** The exponentially weighted mean, λ = 0.2; judged once limits are frozen. */
export const weightedMeans = (series: ControlSeries): ControlPoint[] =>
  points(series, (check) => ({
    value: some(check.ewma),
    why: "fewer than two sessions of its phase before",
    centre: some(check.centre),
    lower: some(check.ewmaLower),
    upper: some(check.ewmaUpper),
    out: check.out.filter((rule) => rule.startsWith("weighted")).join(", "),
  }));

/** One sentence that says what the chart shows. */
export function seriesSummary({ words, serial, bench, unit, decimals, checks, phases }: ControlSeries): string {
  const values = checks.map((check) => check.value);
  const [first, last] = [checks[0], checks.at(-1)];
  if (!first || !last) return `${words}: no session yet.`;
  const figure = (value: number) => formatNumber(value, { decimals });
  const out = checks.filter((check) => check.out.length > 0).length;
  const breaks = phases.filter((phase) => phase.trial && phase.kind !== null).length;
  const frozen = phases.filter((phase) => !phase.trial).at(-1);
  const limits = frozen ? `limits frozen on ${formatDate(frozen.from)}` : "limits still trial";
  const range = `${figure(Math.min(...values))} to ${figure(Math.max(...values))} ${unit}`;
  return `${words} of unit ${serial} on ${bench}: ${checks.length} sessions from ${formatDate(first.at)} to ${formatDate(last.at)}, ${range}; ${out} out of control, ${breaks} documented ${breaks === 1 ? "change" : "changes"}, ${limits}.`;
}
