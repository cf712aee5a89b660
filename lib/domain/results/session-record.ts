import type { BackgroundGrade } from "@/lib/science/acoustics/levels";
import type { EffectKind } from "./effects";

/** A reading as it stands: not superseded by another. Units are the quantity's own (dB(A), °C, K, W, rpm). */
export type ReadingRecord = {
  readonly id: string;
  readonly quantity: string;
  readonly positionId: string | null;
  readonly rotorPosition: number | null;
  readonly value: number;
  /** What a log said beside the value: `uDeltaTK`, `residualK`, `sDb`, `n`; empty for a typed one. */
  readonly detail: Readonly<Record<string, unknown>>;
};

/** One mount at one set speed, of an entry's specimen or of a baseline unit. */
export type RunRecord = {
  readonly runId: string;
  readonly entryId: string | null;
  readonly specimenId: string | null;
  readonly baselineUnitId: string | null;
  readonly setSpeed: number;
  readonly mountNumber: number;
  readonly repeatNumber: number;
  readonly state: "open" | "done" | "held" | "discarded";
  readonly readings: readonly ReadingRecord[];
};

/** A part of the bench's budget: standard uncertainty in dB or K, relative for a shared gain. */
export type BudgetPartRecord = {
  readonly name: string;
  readonly quantity: "level_dba" | "delta_t_k";
  readonly u: number;
  readonly kind: Exclude<EffectKind, "bridge">;
  readonly evaluation: "A" | "B";
  readonly dof: number | null;
  readonly source: string;
};

/** All of a session that its figures come from. */
export type SessionRecord = {
  readonly sessionId: string;
  readonly roundId: string | null;
  readonly seasonId: string | null;
  readonly benchVersionId: string;
  readonly protocolVersionId: string;
  readonly budgetVersionId: string;
  readonly baselineUnitId: string;
  readonly grade: Extract<BackgroundGrade, "engineering" | "survey">;
  /** Names of the microphone positions whose mean is the level. */
  readonly protocolPositions: readonly string[];
  readonly positions: readonly { readonly id: string; readonly name: string }[];
  readonly budget: readonly BudgetPartRecord[];
  readonly backgrounds: readonly {
    readonly positionId: string;
    readonly valueDba: number;
    readonly readingId: string;
  }[];
  readonly runs: readonly RunRecord[];
};
