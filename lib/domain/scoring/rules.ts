/** The kinds of scoring rule. A season's rule is a version: a kind with its parameters, frozen at the first reading. */
export const RULE_KINDS = [
  "equal-noise",
  "plain-sum",
  "plain-product",
  "conductance-less-level",
  "speed-neutral",
] as const;
export type RuleKind = (typeof RULE_KINDS)[number];
export type PointRuleKind = Exclude<RuleKind, "equal-noise">;

export type ScoringRule = {
  readonly kind: RuleKind;
  /** The season's declared levels, dB(A) at the bench's microphone. */
  readonly levelsDba: readonly number[];
  /** The one of them that sheets show first. */
  readonly headlineDba?: number;
  /** Exponent of ΔT ∝ speed^−m; speed-neutral only. */
  readonly m?: number;
};

export type RuleText = {
  readonly label: string;
  readonly formula: string;
  readonly unit: string;
  readonly better: "lower" | "higher";
  readonly note: string;
};

/** What people read of each rule. The scores are in `pointScore` and in the results' `equalNoise`. */
export const RULES: Readonly<Record<RuleKind, RuleText>> = {
  "equal-noise": {
    label: "Equal noise",
    formula: "mean over the declared levels L of (ΔT/P)(L) ÷ (ΔT/P of the session's baseline)(L)",
    unit: "",
    better: "lower",
    note: "Compares fans where they are equally loud. Who doesn't reach every level isn't ranked.",
  },
  "plain-sum": {
    label: "Plain sum",
    formula: "ΔT + L",
    unit: "K + dB",
    better: "lower",
    note: "Adds kelvin to decibels: that 1 K is worth 1 dB is an accident of units. In °F another fan may win.",
  },
  "plain-product": {
    label: "Plain product",
    formula: "ΔT · L",
    unit: "K·dB",
    better: "lower",
    note: "Hangs on where the decibel scale has its zero, which is arbitrary.",
  },
  "conductance-less-level": {
    label: "Conductance less level",
    formula: "10 lg(P/ΔT in W/K) − L",
    unit: "dB",
    better: "higher",
    note: "Cooling per sound power. Rewards whoever runs slowly.",
  },
  "speed-neutral": {
    label: "Speed-neutral figure",
    formula: "10 lg(P/ΔT in W/K) − (m/5)·L",
    unit: "dB",
    better: "higher",
    note: "Nearly the same at any speed of one fan, as far as L goes with 50 lg speed and ΔT with speed^−m.",
  },
};

/** One point as a point rule sees it. ΔT and P above 0. */
export type ScoredPoint = { readonly levelDba: number; readonly deltaTK: number; readonly powerW: number };

/** A score with its first derivatives by level (per dB) and by ΔT (per K). */
export type PointScore = { readonly score: number; readonly byLevel: number; readonly byDeltaT: number };

/**
 * What a point rule gives one point (the formulas of `RULES`; their background: specific sound power level, fan laws).
 * @param m needed by speed-neutral only; without it that rule gives NaN
 */
export function pointScore(kind: PointRuleKind, point: ScoredPoint, m = Number.NaN): PointScore {
  const { levelDba, deltaTK, powerW } = point;
  const perConductance = -10 / (Math.LN10 * deltaTK);
  switch (kind) {
    case "plain-sum":
      return { score: deltaTK + levelDba, byLevel: 1, byDeltaT: 1 };
    case "plain-product":
      return { score: deltaTK * levelDba, byLevel: deltaTK, byDeltaT: levelDba };
    case "conductance-less-level":
      return { score: 10 * Math.log10(powerW / deltaTK) - levelDba, byLevel: -1, byDeltaT: perConductance };
    case "speed-neutral":
      return {
        score: 10 * Math.log10(powerW / deltaTK) - (m / 5) * levelDba,
        byLevel: -m / 5,
        byDeltaT: perConductance,
      };
  }
}
