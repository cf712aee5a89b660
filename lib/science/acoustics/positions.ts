import { Refusal } from "../refusal";
import { energyMean } from "./levels";

export interface PositionReading {
  /** A-weighted level, dB(A). */
  levelDba: number;
  /** One-third-octave levels in dB, the same bands at every position; null where unknown. */
  bandsDb: readonly (number | null)[];
  /** The level is an upper bound. */
  upperBound: boolean;
}

/**
 * Energy mean over the microphone positions of a run, total and band by band, in dB.
 *
 * A band unknown at one position is unknown in the mean; one bound makes the mean a bound. Undefined for no position;
 * different numbers of bands are refused. Source: ISO 3744:2010 Eq. (12).
 */
export function positionMean(positions: readonly PositionReading[]): PositionReading | undefined {
  const [first] = positions;
  const levelDba = energyMean(positions.map((position) => position.levelDba));
  if (first === undefined || levelDba === undefined) return undefined;
  if (positions.some(({ bandsDb }) => bandsDb.length !== first.bandsDb.length)) {
    throw new Refusal("positions-differ", "The positions of a run have different numbers of bands.");
  }
  const bandsDb = first.bandsDb.map((_, band) => {
    const levels = positions.map((position) => position.bandsDb[band] ?? null).filter((level) => level !== null);
    return levels.length === positions.length ? (energyMean(levels) ?? null) : null;
  });
  return { levelDba, bandsDb, upperBound: positions.some(({ upperBound }) => upperBound) };
}

/**
 * Whether an inlet stack may read high on the axis: it takes a fifth or more of the microphone's distance. Same unit for
 * both; the level is never corrected for it. House rule, no source.
 */
export function inletStackReadsHigh(stackMm: number, distanceMm: number): boolean {
  return stackMm >= distanceMm / 5;
}
