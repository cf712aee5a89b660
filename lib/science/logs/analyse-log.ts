import { lagOneCorrelation } from "../statistics/autocorrelation";
import { at, mean, median, sampleSd } from "../statistics/descriptive";
import { deltaTSeries } from "../thermal/resistance";
import { driftOver, steadyMean } from "../thermal/steady-mean";
import {
  findSteadyWindow,
  HOUSE_RULE,
  type Clause,
  type SteadyResult,
  type SteadyRule,
} from "../thermal/steady-window";
import type { LogWarning } from "./choice";
import type { ReadLog } from "./log-reader";
import type { RefusedRow } from "./refused-rows";
import type { Quantity } from "./units";

/** What a log says; null where a thing can't be known. Times in s from the first kept row, lines physical, from 1. */
export interface LogReport {
  readonly kind: "log";
  readonly rows: number;
  readonly refused: readonly RefusedRow[];
  readonly refusedCount: number;
  readonly intervalS: number | null;
  readonly columns: readonly { name: string; quantity: Quantity | null; unit: string | null }[];
  readonly temperature: TemperatureReport | null;
  readonly level: { laeqDba: number | null; sDb: number | null; n: number } | null;
  readonly warnings: readonly LogWarning[];
}

export interface TemperatureReport {
  readonly steady: { found: boolean; fromS: number | null; toS: number | null; how: string };
  readonly deltaTK: number | null;
  readonly uDeltaTK: number | null;
  readonly ambientC: number | null;
  readonly ambientDriftK: number | null;
  readonly fit: { finalK: number; tauS: number } | null;
}

/**
 * Level and temperature of a log as read. The rise is the mean over the steady window, sample by sample against the
 * ambient; its u holds scatter over n_eff, the rest of the approach and a display's step. Ambient and drift are those of the window,
 * of the whole record where none was found. The level is the energy mean of its rows.
 * @param log rows in base units @param epsilonK largest rest of the approach that may be left (house value 0.1 K)
 * @param ambientDriftMaxK largest change of the ambient within the window (house value 0.2 K); both are a protocol's
 */
export function analyseLog(
  log: ReadLog,
  epsilonK: number = HOUSE_RULE.epsilonK,
  ambientDriftMaxK: number = HOUSE_RULE.ambientDriftMaxK,
): LogReport {
  const warnings = [...log.warnings];
  const intervalS = intervalOf(log.timeS, warnings);
  const temperature = temperatureOf(log, { ...HOUSE_RULE, epsilonK, ambientDriftMaxK }, warnings);
  return {
    kind: "log",
    rows: log.rows,
    refused: log.refused,
    refusedCount: log.refusedCount,
    intervalS,
    columns: log.columns.map(({ name, quantity, unit, kind }) => ({
      name,
      quantity: quantity ?? null,
      unit: unit?.symbol ?? (kind === "clock" || kind === "timestamp" || kind === "date" ? kind : null),
    })),
    temperature,
    level: levelOf(log, warnings),
    warnings,
  };
}

function intervalOf(timeS: Float64Array | undefined, warnings: LogWarning[]): number | null {
  if (!timeS || timeS.length < 2) return null;
  const steps = new Float64Array(timeS.length - 1);
  for (let i = 0; i < steps.length; i++) steps[i] = at(timeS, i + 1) - at(timeS, i);
  const interval = median(steps) ?? null;
  if (interval === null || !(interval > 0)) return null;
  let gaps = 0;
  let longest = 0;
  for (const step of steps) {
    if (!(step > 2.5 * interval)) continue;
    gaps += 1;
    longest = Math.max(longest, step);
  }
  if (gaps > 0) warnings.push({ code: "gaps", message: `${gaps} gaps in time, the longest ${round(longest)} s` });
  return interval;
}

function levelOf(log: ReadLog, warnings: LogWarning[]): LogReport["level"] {
  const { level } = log.chosen;
  if (!level || !log.levelDb) return null;
  const levels = known(log.levelDb);
  const weighting = level.unit?.symbol ?? "dB";
  const isOther = /\bl[cz]([fsi]?(eq|max|min|peak|pk|e)?\d*)\b/i.test(level.name);
  if (weighting === "dB(C)" || weighting === "dB(Z)" || isOther) {
    warnings.push({ code: "not-a-weighted", message: `"${level.name}" isn't A-weighted: it gives no level in dB(A)` });
    return { laeqDba: null, sDb: sampleSd(levels) ?? null, n: levels.length };
  }
  if (weighting === "dB" && !/\bla|aeq|\(a\)|dba/i.test(level.name)) {
    warnings.push({ code: "weighting-assumed", message: `"${level.name}" names no weighting: read as dB(A)` });
  }
  // Sums of energy are taken about the highest level, so that nothing overflows.
  let top = -Infinity;
  for (const level of levels) top = Math.max(top, level);
  const energies = new Float64Array(levels.length);
  for (let i = 0; i < levels.length; i++) energies[i] = 10 ** ((at(levels, i) - top) / 10);
  const energy = mean(energies);
  return {
    laeqDba: energy === undefined ? null : top + 10 * Math.log10(energy),
    sDb: sampleSd(levels) ?? null,
    n: levels.length,
  };
}

/** The readings there are: the series itself where nothing is missing. */
function known(values: Float64Array): Float64Array {
  return values.includes(Number.NaN) ? values.filter((value) => !Number.isNaN(value)) : values;
}

function temperatureOf(log: ReadLog, rule: SteadyRule, warnings: LogWarning[]): TemperatureReport | null {
  const { sensor, ambient } = log.chosen;
  if (!sensor || !log.sensorC) return null;
  if (!ambient || !log.ambientC) {
    warnings.push({ code: "no-ambient", message: `"${sensor.name}" has no ambient beside it: no rise can be known` });
    return null;
  }
  const { sensorC, ambientC, timeS, speedRpm } = log;
  const whole = !sensorC.includes(Number.NaN) && !ambientC.includes(Number.NaN);
  const both = (_: number, i: number) => !Number.isNaN(at(sensorC, i)) && !Number.isNaN(at(ambientC, i));
  const pick = (values: Float64Array) => (whole ? values : values.filter(both));
  const air = pick(ambientC);
  const unknown = { deltaTK: null, uDeltaTK: null, ambientC: mean(air) ?? null };
  if (!timeS) {
    warnings.push({ code: "no-time", message: "no column holds the time: a steady state can't be known" });
    const steady = { found: false, fromS: null, toS: null, how: "no time column" };
    return { steady, ...unknown, ambientDriftK: null, fit: null };
  }
  const time = pick(timeS);
  const rise = deltaTSeries(pick(sensorC), air);
  const speeds = speedRpm && pick(speedRpm);
  const usable = speeds?.every((value) => value > 0) ? { speedRpm: speeds } : {};
  const found = findSteadyWindow({ timeS: time, deltaTK: rise, ambientC: air, ...usable }, rule);
  const fit = found.transient ? { finalK: found.transient.fit.final, tauS: found.transient.fit.tau } : null;
  if (found.from === undefined) {
    const steady = { found: false, fromS: null, toS: null, how: howNot(found) };
    warnings.push({ code: "not-steady", message: `no steady state: ${steady.how}` });
    return { steady, ...unknown, ambientDriftK: driftOver(time, air) ?? null, fit };
  }
  const window = [time, rise, air].map((values) => values.subarray(found.from));
  const [times = time, rises = rise, airs = air] = window;
  const result = steadyMean(times, rises, found.tauS, found.step, fit?.finalK);
  const lagOne = lagOneCorrelation(rises);
  if (result && lagOne === undefined)
    warnings.push({ code: "no-scatter", message: "the rise never moves in the window: its scatter can't be known" });
  if (result && !(result.deltaTK > 0))
    warnings.push({
      code: "no-rise",
      message: "the sensor isn't warmer than the ambient: with the heat on this can't be",
    });
  const scattered = result && lagOne !== undefined;
  return {
    steady: { found: true, fromS: at(times, 0), toS: at(times, times.length - 1), how: how(found) },
    deltaTK: result?.deltaTK ?? null,
    uDeltaTK: scattered || (result && result.uResolutionK > 0) ? result.uDeltaTK : null,
    ambientC: mean(airs) ?? null,
    ambientDriftK: driftOver(times, airs) ?? null,
    fit,
  };
}

const WHY = {
  quantised: "the series is quantised",
  autocorrelated: "the series is autocorrelated",
  "few-samples": "the samples are too few for the variance ratio",
} as const;

function how(found: SteadyResult): string {
  const fit = found.transient ? "fit" : "no approach to fit";
  if (found.withoutRatio === undefined) return `slope, variance ratio, ${fit}`;
  return `slope and ${fit}, without the variance ratio: ${WHY[found.withoutRatio]}`;
}

const CLAUSES: Record<Clause, string> = {
  window: "the record is shorter than the shortest window",
  slope: "the slope is above its limit",
  "variance-ratio": "the variance ratio is above its limit",
  fit: "the mean is off the fitted final value",
  "ambient-drift": "the ambient drifts",
  "speed-drift": "the speed drifts",
};

function howNot(found: SteadyResult): string {
  const broken = found.broken.map((clause) => CLAUSES[clause]);
  return broken.length > 0 ? broken.join("; ") : "no window holds all clauses";
}

function round(value: number): number {
  return Math.round(value * 100) / 100;
}
