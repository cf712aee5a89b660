import { backgroundCorrection, energyMean, type BackgroundGrade } from "@/lib/science/acoustics/levels";
import { combineEffects, type Effect, type EffectKind, type Quantity } from "../../effects";
import type { MeasuredPoint, Subject } from "../../measured-point";

/** A subject at one set speed: the mean over its mounts, with what each source of error does to it. */
export type SetSpeedPoint = {
  readonly setSpeedRpm: number;
  readonly mounts: number;
  readonly correctedDba: number;
  /** The background was too near in at least one mount: the level is at or below `correctedDba`. */
  readonly upperBound: boolean;
  /** Mean level as read less mean level as corrected, dB, 0 or more. */
  readonly correctionDb: number;
  readonly deltaTK: number;
  readonly powerW: number;
  readonly resistanceKPerW: number;
  /** Effects on `correctedDba`, dB. */
  readonly levelEffects: readonly Effect[];
  /** Effects on `deltaTK`, K. */
  readonly deltaTEffects: readonly Effect[];
};

/** Names of the sources of error; the simulation draws one standard normal for each. */
export const sourceOf = {
  own: (subject: Subject, index: number, quantity: Quantity) => `own ${quantity} of ${subject.key} point ${index + 1}`,
  mount: (subject: Subject, mount: number, quantity: Quantity) => `${quantity} of ${subject.key} mount ${mount}`,
  offset: (sessionId: string, quantity: Quantity) => `${quantity} offset of session ${sessionId}`,
  gain: (sessionId: string) => `delta_t gain of session ${sessionId}`,
};

type Weighed = { readonly point: MeasuredPoint; readonly index: number; readonly weight: number };

/**
 * The points of one subject, averaged set speed by set speed, ascending: within a mount over its repeats, then over
 * the mounts, each mount weighing the same. Levels are corrected for background point by point and averaged as
 * energies (ISO 3744:2010 Eq. (12) and (16), or ISO 3746:2010 Eq. (12) by grade); ΔT and power as numbers; ΔT/P is
 * mean ΔT ÷ mean P. Each point's error acts with its share in that mean: own parts of n points fall as 1/√n, a mount's
 * part is one error in all points of that mount at every set speed, offset and gain are the session's.
 * @param points at least one; their order gives the names of the own sources
 */
export function setSpeedPoints(
  subject: Subject,
  points: readonly MeasuredPoint[],
  grade: BackgroundGrade,
): SetSpeedPoint[] {
  const speeds = [...new Set(points.map((point) => point.setSpeedRpm))].sort((a, b) => a - b);
  return speeds.map((setSpeedRpm) => {
    const here = points
      .map((point, index) => ({ point, index }))
      .filter((each) => each.point.setSpeedRpm === setSpeedRpm);
    const repeats = new Map<number, number>();
    for (const { point } of here) repeats.set(point.mount, (repeats.get(point.mount) ?? 0) + 1);
    const weighed = here.map((each): Weighed => {
      const repeatsInMount = repeats.get(each.point.mount) ?? 1;
      return { ...each, weight: 1 / (repeats.size * repeatsInMount) };
    });
    return average(subject, setSpeedRpm, repeats.size, weighed, grade);
  });
}

function average(
  subject: Subject,
  setSpeedRpm: number,
  mounts: number,
  weighed: readonly Weighed[],
  grade: BackgroundGrade,
): SetSpeedPoint {
  const corrected = weighed.map(({ point }) =>
    backgroundCorrection({
      measuredDb: point.levelReadDba,
      backgroundDb: point.backgroundDba ?? -Infinity,
      grade,
    }),
  );
  const weights = weighed.map((each) => each.weight);
  const levels = corrected.map((each) => each.correctedDb);
  const correctedDba = energyMean(levels, weights) ?? Number.NaN;
  const readDba =
    energyMean(
      weighed.map((each) => each.point.levelReadDba),
      weights,
    ) ?? Number.NaN;
  const deltaTK = weighed.reduce((sum, { point, weight }) => sum + weight * point.deltaTK, 0);
  const powerW = weighed.reduce((sum, { point, weight }) => sum + weight * point.powerW, 0);
  const levelShare = weighed.map(({ weight }, i) => weight * 10 ** (((levels[i] ?? Number.NaN) - correctedDba) / 10));
  return {
    setSpeedRpm,
    mounts,
    correctedDba,
    upperBound: corrected.some((each) => each.upperBound),
    correctionDb: readDba - correctedDba,
    deltaTK,
    powerW,
    resistanceKPerW: deltaTK / powerW,
    levelEffects: combineEffects(
      weighed.map((each, i) => ({ factor: levelShare[i] ?? 0, effects: levelEffects(subject, each) })),
    ),
    deltaTEffects: combineEffects(
      weighed.map((each) => ({ factor: each.weight, effects: deltaTEffects(subject, each) })),
    ),
  };
}

function dofOf(point: MeasuredPoint, quantity: "level" | "delta_t", kind: "own_run" | "own_mount"): number {
  const part = point.dofParts?.[`${quantity}_${kind}`];
  return (part === undefined ? point.dof : part) ?? Infinity;
}

function shared(source: string, kind: EffectKind, quantity: Quantity, owner: string, size: number): Effect {
  return { source, kind, quantity, owner, size, dof: Infinity };
}

function unshared(
  subject: Subject,
  each: Weighed,
  quantity: "level" | "delta_t",
  own: number,
  mount: number,
): Effect[] {
  const base = { quantity, owner: subject.key };
  const { point, index } = each;
  return [
    {
      ...base,
      source: sourceOf.own(subject, index, quantity),
      kind: "own_run",
      size: own,
      dof: dofOf(point, quantity, "own_run"),
    },
    {
      ...base,
      source: sourceOf.mount(subject, point.mount, quantity),
      kind: "own_mount",
      size: mount,
      dof: dofOf(point, quantity, "own_mount"),
    },
  ];
}

function levelEffects(subject: Subject, each: Weighed): Effect[] {
  const { sessionId } = subject;
  return [
    ...unshared(subject, each, "level", each.point.uLevelOwnDb, each.point.uLevelMountDb),
    shared(sourceOf.offset(sessionId, "level"), "shared_offset", "level", sessionId, each.point.uLevelOffsetDb),
  ];
}

function deltaTEffects(subject: Subject, each: Weighed): Effect[] {
  const { sessionId } = subject;
  const { point } = each;
  return [
    ...unshared(subject, each, "delta_t", point.uDeltaTOwnK, point.uDeltaTMountK),
    shared(sourceOf.offset(sessionId, "delta_t"), "shared_offset", "delta_t", sessionId, point.uDeltaTOffsetK),
    shared(sourceOf.gain(sessionId), "shared_gain", "delta_t", sessionId, point.deltaTK * point.uDeltaTGainRel),
  ];
}
