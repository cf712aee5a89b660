/** What a bench's air may be while it measures. Temperatures °C, changes K, humidity 0..1, pressure Pa. */
export interface AmbientLimits {
  readonly temperatureC: readonly [number, number];
  readonly humidityRel: readonly [number, number];
  readonly pressurePa: readonly [number, number];
}

/** IEC 60068-1:2013, standard atmospheric conditions for measurement (values from memory). */
export const STANDARD_LIMITS: AmbientLimits = {
  temperatureC: [15, 35],
  humidityRel: [0.25, 0.75],
  pressurePa: [86_000, 106_000],
};

/** Common practice, no source: tighter room, change within a run, and between a run and its baseline's. */
export const HOUSE_LIMITS = { temperatureC: [18, 28], changeInRunK: 0.5, changeToBaselineK: 3 } as const;

export type AmbientFinding = "temperature" | "humidity" | "pressure" | "change-in-run" | "change-to-baseline";

/** Which limits are broken, in this order; what wasn't recorded (undefined) breaks none. */
export function ambientFindings(
  air: {
    temperatureC: number;
    humidityRel?: number;
    pressurePa?: number;
    changeInRunK?: number;
    changeToBaselineK?: number;
  },
  limits: AmbientLimits = STANDARD_LIMITS,
): AmbientFinding[] {
  const outside = (value: number | undefined, range: readonly [number, number]) =>
    value !== undefined && !(value >= range[0] && value <= range[1]);
  const beyond = (value: number | undefined, limit: number) => value !== undefined && !(Math.abs(value) <= limit);
  const findings: AmbientFinding[] = [];
  if (outside(air.temperatureC, limits.temperatureC)) findings.push("temperature");
  if (outside(air.humidityRel, limits.humidityRel)) findings.push("humidity");
  if (outside(air.pressurePa, limits.pressurePa)) findings.push("pressure");
  if (beyond(air.changeInRunK, HOUSE_LIMITS.changeInRunK)) findings.push("change-in-run");
  if (beyond(air.changeToBaselineK, HOUSE_LIMITS.changeToBaselineK)) findings.push("change-to-baseline");
  return findings;
}
