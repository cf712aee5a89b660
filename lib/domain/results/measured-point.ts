import type { EffectKind, Quantity } from "./effects";

/**
 * One run reduced to a point: one subject (a specimen or a baseline unit) at one set speed in one mount, at one
 * microphone position. Standard uncertainties, all 0 or more. Those of the level are of the level after background
 * correction, in dB; those of ΔT in K, the gain relative.
 */
export type MeasuredPoint = {
  readonly setSpeedRpm: number;
  /** Number of the mount, from 1; points of one subject with the same number share that mount's error. */
  readonly mount: number;
  /** A-weighted level as read, source and background together, dB(A). */
  readonly levelReadDba: number;
  /** A-weighted background level, dB(A); null where there was nothing to hear, so that nothing is corrected. */
  readonly backgroundDba: number | null;
  readonly uLevelOwnDb: number;
  readonly uLevelMountDb: number;
  readonly uLevelOffsetDb: number;
  /** Sensor above ambient, K, above 0. */
  readonly deltaTK: number;
  readonly uDeltaTOwnK: number;
  readonly uDeltaTMountK: number;
  readonly uDeltaTOffsetK: number;
  readonly uDeltaTGainRel: number;
  /** Heat into the cooler, W, above 0. */
  readonly powerW: number;
  /** Degrees of freedom of the own and the mount parts of both quantities; null for "taken as known exactly". */
  readonly dof: number | null;
  /** Degrees of freedom part by part, where they are known so; what is left out is `dof`. */
  readonly dofParts?: Partial<Record<`${Quantity}_${Extract<EffectKind, "own_run" | "own_mount">}`, number | null>>;
};

/** A subject's name in the sources of uncertainty: baselines of two sessions are two subjects. */
export type Subject = { readonly sessionId: string; readonly key: string };

/** The baseline of a session as a subject. */
export function baselineSubject(sessionId: string): Subject {
  return { sessionId, key: `baseline ${sessionId}` };
}

/** An entry in a session as a subject. */
export function entrySubject(sessionId: string, entryId: string): Subject {
  return { sessionId, key: `entry ${entryId}` };
}
