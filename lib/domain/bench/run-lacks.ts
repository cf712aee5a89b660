/** A reading that stands, as far as completeness asks. */
export type StandingReading = { readonly quantity: string; readonly positionId: string | null };

/**
 * What a run lacks before it may count as done, in words and in this order; empty when it lacks nothing: a level at
 * each of the protocol's positions, a temperature rise (ΔT, or sensor and ambient), the heater's power.
 * @param readings those of the run that no other supersedes
 */
export function runLacks(
  readings: readonly StandingReading[],
  positions: readonly { readonly id: string; readonly name: string }[],
): string[] {
  const has = (quantity: string) => readings.some((each) => each.quantity === quantity);
  const levels = positions.filter(
    ({ id }) => !readings.some((each) => each.quantity === "level_dba" && each.positionId === id),
  );
  const temperatures = has("delta_t_k")
    ? []
    : [...(has("sensor_c") ? [] : ["sensor temperature"]), ...(has("ambient_c") ? [] : ["ambient temperature"])];
  return [...levels.map(({ name }) => `level ${name}`), ...temperatures, ...(has("power_w") ? [] : ["power"])];
}
