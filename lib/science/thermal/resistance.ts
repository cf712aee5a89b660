import { at } from "../statistics/descriptive";

/**
 * Temperature rise over ambient, K, sample by sample, so that a slow drift of the ambient cancels; both in °C, same
 * rows. A missing value (NaN) on either side gives NaN. @throws RangeError when the lengths differ.
 */
export function deltaTSeries(sensorC: ArrayLike<number>, ambientC: ArrayLike<number>): Float64Array {
  if (sensorC.length !== ambientC.length) throw new RangeError("sensor and ambient differ in length");
  const rise = new Float64Array(sensorC.length);
  for (let i = 0; i < rise.length; i++) rise[i] = at(sensorC, i) - at(ambientC, i);
  return rise;
}

/** Thermal resistance R = ΔT/P, K/W; undefined unless the power is above 0 W and the rise above 0 K. */
export function thermalResistance(deltaTK: number, powerW: number): number | undefined {
  return deltaTK > 0 && powerW > 0 ? deltaTK / powerW : undefined;
}

/** Thermal conductance G = P/ΔT, W/K; undefined unless both are above 0. */
export function thermalConductance(deltaTK: number, powerW: number): number | undefined {
  return deltaTK > 0 && powerW > 0 ? powerW / deltaTK : undefined;
}

/** The air's own rise ΔT = P/(ρ·c_p·Q), K: W, kg/m³, J/(kg·K), m³/s. Undefined unless flow and density are above 0. */
export function airSideRise(powerW: number, densityKgM3: number, flowM3S: number, heatCapacityJKgK = 1006) {
  const carried = densityKgM3 * heatCapacityJKgK * flowM3S;
  return carried > 0 ? powerW / carried : undefined;
}

/**
 * Whether a rise can be: no cooler does better than the air's own rise at the outlet. False means that power, flow or
 * sensor are wrong; undefined where no flow was recorded.
 */
export function meetsAirSideBound(deltaTK: number, riseOfAirK: number | undefined): boolean | undefined {
  return riseOfAirK === undefined ? undefined : deltaTK >= riseOfAirK;
}

/** Model, not a standard: ΔT at another density, ΔT·(ρ_ref/ρ)^m. Never published as measured. K in and out. */
export function deltaTAtDensity(
  deltaTK: number,
  densityRefKgM3: number,
  densityKgM3: number,
  exponent: number,
): number {
  return deltaTK * (densityRefKgM3 / densityKgM3) ** exponent;
}

/** Ratio of two resistances of one session, dimensionless: (ΔT/P) of the design over (ΔT/P) of the baseline. */
export function resistanceRatio(
  design: { deltaTK: number; powerW: number },
  baseline: { deltaTK: number; powerW: number },
): number | undefined {
  const own = thermalResistance(design.deltaTK, design.powerW);
  const reference = thermalResistance(baseline.deltaTK, baseline.powerW);
  return own === undefined || reference === undefined ? undefined : own / reference;
}

/** A ratio shown as kelvins against a declared reference rise: (r − 1)·ΔT_ref, K. */
export function differenceAtReference(ratio: number, deltaTRefK: number): number {
  return (ratio - 1) * deltaTRefK;
}
