import type { GateFinding } from "../bench/session-gates";
import { mean } from "@/lib/science/statistics/descriptive";
import type { SessionFigures } from "../results/session-figures";
import { controlPoint, limitsOf, sigmaFloor, type ControlPoint, type ControlQuantity } from "./control-point";

/** One chart of a baseline unit on a bench version. `setSpeed` is null for the calibrator. */
export type Series = { readonly quantity: ControlQuantity; readonly setSpeed: number | null };

export type SeriesValue = Series & { readonly value: number };
export type SeriesCheck = Series & ControlPoint;

/** An earlier session's value in a series, in order of time; `phase` names the stretch between documented changes. */
export type SeriesHistory = Series & {
  readonly points: readonly { readonly value: number; readonly out: boolean; readonly phase: string | null }[];
  /** Frozen limits by phase. */
  readonly frozen: readonly { readonly phase: string | null; readonly centre: number; readonly sigma: number }[];
};

export const sameSeries = (a: Series, b: Series): boolean => a.quantity === b.quantity && a.setSpeed === b.setSpeed;

/**
 * What a session shows of its baseline and calibrator: corrected level and ΔT/P at each set speed, the mean over its
 * mounts; the calibrator as the mean of its readings before the series, dB. A level that is only a bound is no value.
 */
export function sessionValues(figures: SessionFigures, calibratorDb: readonly number[]): SeriesValue[] {
  const points = figures.baseline?.points ?? [];
  const calibrator = mean([...calibratorDb]);
  return [
    ...points.flatMap((point): SeriesValue[] =>
      point.upperBound ? [] : [{ quantity: "level_dba", setSpeed: point.setSpeedRpm, value: point.correctedDba }],
    ),
    ...points.map((point): SeriesValue => ({
      quantity: "thermal_resistance_kpw",
      setSpeed: point.setSpeedRpm,
      value: point.resistanceKPerW,
    })),
    ...(calibrator === undefined ? [] : [{ quantity: "calibrator_db" as const, setSpeed: null, value: calibrator }]),
  ];
}

/**
 * Each value of a session against its chart.
 * @param phase the phase that the session falls into
 * @param series how many charts a whole session of this protocol is held against
 */
export function checkSession(
  values: readonly SeriesValue[],
  histories: readonly SeriesHistory[],
  { phase, heatLoadW, series }: { phase: string | null; heatLoadW: number; series: number },
): SeriesCheck[] {
  return values.map(({ value, ...key }) => {
    const history = histories.find((each) => sameSeries(each, key));
    const earlier = (history?.points ?? []).filter((point) => point.phase === phase);
    const floor = sigmaFloor(key.quantity, heatLoadW);
    const frozen = history?.frozen.find((each) => each.phase === phase) ?? limitsOf(earlier, floor);
    return { ...key, ...controlPoint(earlier, value, { frozen, series: Math.max(series, values.length), floor }) };
  });
}

const names: Record<ControlQuantity, { words: string; unit: string; decimals: number }> = {
  level_dba: { words: "level", unit: "dB(A)", decimals: 1 },
  thermal_resistance_kpw: { words: "ΔT/P", unit: "K/W", decimals: 4 },
  calibrator_db: { words: "calibrator", unit: "dB", decimals: 2 },
};

function words(check: SeriesCheck, speedUnit: string): string {
  const { words: name, unit, decimals } = names[check.quantity];
  const at = check.setSpeed === null ? "" : ` at ${check.setSpeed} ${speedUnit}`;
  const figure = (value: number | null) => (value === null ? "–" : value.toFixed(decimals));
  const limits = `limits ${figure(check.lower)} to ${figure(check.upper)} ${unit}${check.kind === "trial" ? ", trial" : ""}`;
  return `${name}${at} ${figure(check.value)} ${unit} (${limits}; ${check.out.join(", ")})`;
}

/** What of the checks holds the session: the baseline's in one finding, the calibrator's in another; empty when in control. */
export function controlFindings(checks: readonly SeriesCheck[], speedUnit = "rpm"): GateFinding[] {
  const out = checks.filter((check) => check.out.length > 0);
  const baseline = out.filter((check) => check.quantity !== "calibrator_db");
  const calibrator = out.filter((check) => check.quantity === "calibrator_db");
  const list = (found: readonly SeriesCheck[]) => found.map((check) => words(check, speedUnit)).join("; ");
  return [
    ...(calibrator.length > 0
      ? [
          {
            code: "calibrator" as const,
            reason: `The calibrator is out of control: ${list(calibrator)}.`,
            whatToDo:
              "Check coupler, battery and preamplifier and calibrate again. If the microphone or calibrator was changed, the host documents the change under the bench, and a new phase begins.",
          },
        ]
      : []),
    ...(baseline.length > 0
      ? [
          {
            code: "baseline" as const,
            reason: `The baseline is out of control: ${list(baseline)}.`,
            whatToDo:
              "Look for what changed (paste, fins, mounting, microphone's place, bearing) and run the baseline again. If something was changed on purpose, the host documents it under the bench, and a new phase begins; else another person lifts the hold with a note.",
          },
        ]
      : []),
  ];
}
