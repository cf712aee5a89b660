import type { MeasuredPoint } from "../results/measured-point";
import type { ScoringRule } from "./rules";

export type RoundGrade = "engineering" | "survey";

export type RoundSubject = { readonly points: readonly MeasuredPoint[] };

export type RoundSession = {
  readonly id: string;
  /** `unit`: which baseline fan ran, by unit. */
  readonly baseline: RoundSubject & { readonly unit: string };
  readonly entries: readonly (RoundSubject & { readonly id: string })[];
};

/** A bridge: what a ratio to `fromUnit` is multiplied by to be one to `toUnit`, from a session that ran both. */
export type Bridge = {
  readonly fromUnit: string;
  readonly toUnit: string;
  readonly ratio: number;
  readonly u: number;
  readonly dof: number | null;
};

/** All that scoring a round needs; the same whether it came from a file or from stored readings. */
export type RoundInput = {
  readonly sessions: readonly RoundSession[];
  readonly rule: ScoringRule;
  readonly grade: RoundGrade;
  /** Whole number from 0. */
  readonly seed: number;
  /** Simulated rounds, from 1. */
  readonly draws: number;
  /** The unit that ratios are to; the first session's where left out. */
  readonly baselineUnit?: string;
  readonly bridges?: readonly Bridge[];
};
