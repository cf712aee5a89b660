const T0 = 273.15;

/** Air at one place: temperature in °C, station (never sea-level) pressure in Pa, relative humidity 0..1. */
export interface AirState {
  readonly temperatureC: number;
  readonly pressurePa: number;
  readonly humidityRel: number;
  /** Mole fraction of carbon dioxide; left out: 0.0004. */
  readonly co2Fraction?: number;
}

/**
 * Density of moist air, kg/m³, and the steps on the way, by CIPM-2007: A. Picard, R. S. Davis, M. Gläser, K. Fujii,
 * Metrologia 45 (2008) 149, appendix A1 (its own gas constant, CODATA 2006). Made for 600–1100 hPa and 15–27 °C (range
 * from memory); outside it is still far better than a bench needs.
 */
export function airDensityCipm(air: AirState) {
  const t = air.temperatureC;
  const p = air.pressurePa;
  const kelvin = t + T0;
  const saturationPa = Math.exp(
    1.2378847e-5 * kelvin * kelvin - 1.9121316e-2 * kelvin + 33.93711047 - 6.3431645e3 / kelvin,
  );
  const enhancement = 1.00062 + 3.14e-8 * p + 5.6e-7 * t * t;
  const vapourFraction = (air.humidityRel * enhancement * saturationPa) / p;
  const xv = vapourFraction;
  const first =
    1.58123e-6 -
    2.9331e-8 * t +
    1.1043e-10 * t * t +
    (5.707e-6 - 2.051e-8 * t) * xv +
    (1.9898e-4 - 2.376e-6 * t) * xv * xv;
  const ratio = p / kelvin;
  const compressibility = 1 - ratio * first + ratio * ratio * (1.83e-11 - 0.765e-8 * xv * xv);
  const dryMolar = (28.96546 + 12.011 * ((air.co2Fraction ?? 0.0004) - 0.0004)) * 1e-3;
  const densityKgM3 =
    ((p * dryMolar) / (compressibility * 8.314472 * kelvin)) * (1 - xv * (1 - 18.01528e-3 / dryMolar));
  return { saturationPa, enhancement, vapourFraction, compressibility, densityKgM3 };
}

/** Approximation of OIML R 111-1:2004, E.3 (clause from memory), kg/m³; pressure in hPa, humidity in %. */
export function airDensityOiml(temperatureC: number, pressureHpa: number, humidityPercent: number): number {
  return (0.34848 * pressureHpa - 0.009 * humidityPercent * Math.exp(0.061 * temperatureC)) / (T0 + temperatureC);
}

/** Ideal moist gas with Magnus's vapour pressure, kg/m³ (common practice, no source); within 5e-4 of CIPM-2007 indoors. */
export function airDensitySimplified({ temperatureC, pressurePa, humidityRel }: AirState): number {
  const vapourPa = humidityRel * 611.2 * Math.exp((17.62 * temperatureC) / (243.12 + temperatureC));
  return (pressurePa - 0.378 * vapourPa) / (287.05 * (temperatureC + T0));
}

/**
 * Standard atmosphere of ISO 2533:1975 for a geopotential height up to 11 000 m: temperature K, pressure Pa, dry
 * density kg/m³. Undefined above, or below −5 000 m.
 */
export function standardAtmosphere(heightM: number) {
  if (!(heightM >= -5000 && heightM <= 11_000)) return undefined;
  const temperatureK = 288.15 - 0.0065 * heightM;
  const pressurePa = 101_325 * (temperatureK / 288.15) ** (9.80665 / (0.0065 * 287.05287));
  return { temperatureK, pressurePa, densityKgM3: pressurePa / (287.05287 * temperatureK) };
}
