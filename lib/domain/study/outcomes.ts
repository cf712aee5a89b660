import type { StudyEntry, Uncertain } from "./study-entry";

/** The figures that the study may ask of; lower is better in each. */
export const outcomes = {
  equal: {
    label: "ΔT/P at equal noise, of baseline",
    unit: "%",
    log: true,
    of: (entry: StudyEntry): Uncertain | undefined => entry.equalNoiseRatio,
  },
  level: {
    label: "Level against baseline at full speed",
    unit: "dB",
    log: false,
    of: (entry: StudyEntry): Uncertain | undefined => entry.levelDifferenceDb,
  },
  resistance: {
    label: "ΔT/P at full speed, of baseline",
    unit: "%",
    log: true,
    of: (entry: StudyEntry): Uncertain | undefined => entry.resistanceRatio,
  },
} as const;
export type OutcomeKey = keyof typeof outcomes;
export const outcomeKeys = Object.keys(outcomes) as OutcomeKey[];

/** What the regression is made on: ln of a ratio, or a level difference in dB. Undefined where it wasn't reached. */
export function modelValue(outcome: OutcomeKey, entry: StudyEntry): number | undefined {
  const figure = outcomes[outcome].of(entry);
  if (!figure || (outcomes[outcome].log && !(figure.value > 0))) return undefined;
  return outcomes[outcome].log ? Math.log(figure.value) : figure.value;
}

/** Its standard uncertainty on the scale of `modelValue`: relative for a ratio, dB for a level. */
export function modelUncertainty(outcome: OutcomeKey, figure: Uncertain): number {
  return outcomes[outcome].log ? figure.u / figure.value : figure.u;
}

/** What people see of an entry: a ratio in % of its baseline, or dB. */
export function shownValue(outcome: OutcomeKey, entry: StudyEntry): number | undefined {
  const value = outcomes[outcome].of(entry)?.value;
  return value === undefined ? undefined : outcomes[outcome].log ? 100 * value : value;
}

/** An effect or its interval's end as people see it: 100(e^β − 1) % for a ratio, dB as it is. */
export function shownEffect(outcome: OutcomeKey, beta: number): number {
  return outcomes[outcome].log ? 100 * Math.expm1(beta) : beta;
}
