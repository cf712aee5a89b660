import { Refusal } from "../refusal";

/** Speed exponent of the fan sound law, dB per decade. Source: ASHRAE/AMCA form (value from memory). */
export const SPEED_EXPONENT = 50;

/** Change of level in dB from one speed to another. Source: fan sound law, exponent 50 (value from memory). */
export function speedChangeDb(fromRpm: number, toRpm: number, exponent = SPEED_EXPONENT): number {
  return exponent * Math.log10(toRpm / fromRpm);
}

/** Ratios of a second fan to a first; 1 where nothing changes. */
export interface FanRatios {
  speed?: number;
  diameter?: number;
  airDensity?: number;
}

/**
 * Change of sound power level in dB between geometrically similar fans at the same point of operation:
 * 50 lg n + 70 lg D + 20 lg ρ. A check of plausibility within about ±30 % of speed; never a published level.
 * Source: ASHRAE/AMCA form (value from memory).
 */
export function fanSoundLawDb({ speed = 1, diameter = 1, airDensity = 1 }: FanRatios): number {
  return SPEED_EXPONENT * Math.log10(speed) + 70 * Math.log10(diameter) + 20 * Math.log10(airDensity);
}

/** Change in dB by the flow and pressure form, 10 lg Q + 20 lg Δp, from ratios. Source: ASHRAE K_w method. */
export function flowPressureDb(flowRatio: number, pressureRatio: number): number {
  return 10 * Math.log10(flowRatio) + 20 * Math.log10(pressureRatio);
}

/** Speed ratio that lowers the level by an amount in dB, by the fan sound law. */
export function speedRatioForReduction(reductionDb: number, exponent = SPEED_EXPONENT): number {
  return 10 ** (-reductionDb / exponent);
}

export interface SpeedFit {
  exponentDbPerDecade: number;
  interceptDb: number;
  /** Share of the variance that the line explains, 0 to 1. */
  rSquared: number;
  /** Reading less line at each point, dB; beyond ±1.5 dB a resonance is possible (threshold of the house). */
  residualsDb: number[];
}

/**
 * Least-squares line of level (dB) on lg speed. Needs two different speeds above 0, else refused.
 * Source: ordinary least squares.
 */
export function fitSpeedExponent(points: readonly { rpm: number; levelDb: number }[]): SpeedFit {
  const x = points.map(({ rpm }) => Math.log10(rpm));
  const mean = (values: readonly number[]) => values.reduce((sum, value) => sum + value, 0) / values.length;
  const mx = mean(x);
  const my = mean(points.map(({ levelDb }) => levelDb));
  let sxx = 0;
  let sxy = 0;
  let syy = 0;
  points.forEach(({ levelDb }, i) => {
    const dx = (x[i] ?? 0) - mx;
    sxx += dx * dx;
    sxy += dx * (levelDb - my);
    syy += (levelDb - my) ** 2;
  });
  if (!(sxx > 0)) throw new Refusal("speeds-alike", "An exponent needs readings at two different speeds or more.");
  const exponentDbPerDecade = sxy / sxx;
  const interceptDb = my - exponentDbPerDecade * mx;
  const residualsDb = points.map(({ levelDb }, i) => levelDb - interceptDb - exponentDbPerDecade * (x[i] ?? 0));
  const left = residualsDb.reduce((sum, value) => sum + value * value, 0);
  return { exponentDbPerDecade, interceptDb, rSquared: syy > 0 ? 1 - left / syy : 1, residualsDb };
}
