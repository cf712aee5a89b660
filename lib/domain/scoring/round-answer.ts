import { effectiveDof, standardUncertainty, uncertaintyOfKind } from "../results/effects";
import { reached, type EqualNoiseReading, type NotReached } from "../results/methods/v1/equal-noise";
import type { SetSpeedPoint } from "../results/methods/v1/set-speed-points";
import { dofOrNull, roundResult } from "../results/rounding";
import type { ScoredEntry } from "./score-entry";
import type { ScoredRound } from "./score-round";

/** A point with its standard uncertainties by kind and combined; levels in dB, ΔT in K, dof null for infinite. */
export function pointAnswer(point: SetSpeedPoint) {
  const { levelEffects: level, deltaTEffects: deltaT } = point;
  return {
    setSpeedRpm: point.setSpeedRpm,
    mounts: point.mounts,
    correctedDba: roundResult(point.correctedDba),
    upperBound: point.upperBound,
    correctionDb: roundResult(point.correctionDb),
    deltaTK: roundResult(point.deltaTK),
    powerW: roundResult(point.powerW),
    resistanceKPerW: roundResult(point.resistanceKPerW),
    uLevelOwnDb: roundResult(uncertaintyOfKind(level, "own_run")),
    uLevelMountDb: roundResult(uncertaintyOfKind(level, "own_mount")),
    uLevelOffsetDb: roundResult(uncertaintyOfKind(level, "shared_offset")),
    uLevelDb: roundResult(standardUncertainty(level)),
    dofLevel: dofOrNull(effectiveDof(level)),
    uDeltaTOwnK: roundResult(uncertaintyOfKind(deltaT, "own_run")),
    uDeltaTMountK: roundResult(uncertaintyOfKind(deltaT, "own_mount")),
    uDeltaTOffsetK: roundResult(uncertaintyOfKind(deltaT, "shared_offset")),
    uDeltaTGainK: roundResult(uncertaintyOfKind(deltaT, "shared_gain")),
    uDeltaTK: roundResult(standardUncertainty(deltaT)),
    dofDeltaT: dofOrNull(effectiveDof(deltaT)),
  };
}

/** An equal-noise reading: `u` and `dof` are the ratio's, `uDeltaTK` is that of `deltaTK`; or why there is none. */
export function equalNoiseAnswer(reading: EqualNoiseReading | NotReached) {
  if (!reached(reading)) return { levelDba: reading.levelDba, why: reading.why };
  return {
    levelDba: reading.levelDba,
    ratio: roundResult(reading.ratio),
    deltaTK: roundResult(reading.deltaTK),
    u: roundResult(standardUncertainty(reading.ratioEffects)),
    dof: dofOrNull(effectiveDof(reading.ratioEffects)),
    uDeltaTK: roundResult(standardUncertainty(reading.deltaTEffects)),
    dofDeltaT: dofOrNull(effectiveDof(reading.deltaTEffects)),
    upperBound: reading.upperBound,
  };
}

function entryAnswer(round: ScoredRound, entry: ScoredEntry) {
  const ranked = round.ranked.get(entry.id);
  return {
    id: entry.id,
    session: entry.sessionId,
    points: entry.points.map(pointAnswer),
    equalNoise: entry.equalNoise.map(equalNoiseAnswer),
    score: ranked ? roundResult(ranked.score.value) : null,
    uScore: ranked ? roundResult(standardUncertainty(ranked.score.effects)) : null,
    dofScore: ranked ? dofOrNull(effectiveDof(ranked.score.effects)) : null,
    upperBound: ranked ? ranked.score.upperBound : null,
    boundAllowance: ranked ? roundResult(ranked.score.boundAllowance) : null,
    rank: ranked?.rank ?? null,
    rankLow: ranked?.spread.low ?? null,
    rankHigh: ranked?.spread.high ?? null,
    pFirst: ranked?.spread.pFirst ?? null,
    letters: round.letters.get(entry.id) ?? null,
    whyNotRanked: entry.whyNotRanked ?? null,
  };
}

/** A scored round as it is written out and stored: rounded to 1e-9, null where a thing can't be known. */
export function roundAnswer(round: ScoredRound) {
  return {
    kind: "round" as const,
    sessions: round.sessions.map(({ id, unit, baseline }) => ({
      id,
      baseline: { unit, points: baseline.points.map(pointAnswer) },
    })),
    entries: round.sessions.flatMap(({ entries }) => entries.map((entry) => entryAnswer(round, entry))),
    comparisons: round.comparisons.map(({ a, b, difference, u, dof, p, pHolm, tie }) => ({
      a,
      b,
      difference: roundResult(difference),
      u: roundResult(u),
      dof: dofOrNull(dof),
      p,
      pHolm,
      tie,
    })),
  };
}

export type RoundAnswer = ReturnType<typeof roundAnswer>;
