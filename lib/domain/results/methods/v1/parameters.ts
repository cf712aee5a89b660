/**
 * Method 1: parameters. Frozen: a figure that was published with it must come out again, digit by digit. A change is
 * a new folder beside this one.
 */
export const METHOD_V1 = {
  version: 1,
  /** Points of a curve closer than this in level become one, the mean of both coordinates (house rule, no source). */
  mergeWithinDb: 0.1,
  /** A curve takes two different levels or more. */
  curvePointsMin: 2,
  /** Step for the sensitivities of a curve reading: dB for a level, relative for a resistance; central difference. */
  sensitivityStep: 1e-5,
  /** What a steady-state gate leaves is a half-width of a rectangular distribution (JCGM 100:2008, 4.3.7). */
  residualDivisor: Math.sqrt(3),
  coverage: 0.95,
} as const;
