import type { BenchVersionRow, ProtocolRow } from "@/db/queries/bench-sessions";
import type { ReadingInput } from "@/lib/contracts/bench";
import { ExpectedError, type FieldProblem } from "@/lib/domain/expected-error";

/** What a reading is checked by; where it came from says nothing of what it can be. */
export type GivenReading = Omit<ReadingInput, "source">;

const spans = {
  level_dba: [0, 140, "dB(A)"],
  power_w: [0.1, 2000, "W"],
  speed_rpm: [1, 60_000, "rpm"],
} as const;

/**
 * Refuses what can't be: a temperature outside the sensor's range, ΔT at or under zero with the heat on, a level or
 * speed that no instrument here reads. What is merely bad is kept and shown as such.
 * @param standing what the run has already, for ΔT
 * @throws ExpectedError impossible (422) naming every field
 */
export function checkReadings(
  readings: readonly GivenReading[],
  bench: BenchVersionRow,
  standing: readonly { quantity: string; value: number }[] = [],
): void {
  const fields = readings.flatMap((reading, i): FieldProblem[] => {
    const message = whyImpossible(reading, bench);
    return message ? [{ path: `readings[${i}].value`, message }] : [];
  });
  const given = (quantity: string) => readings.findIndex((each) => each.quantity === quantity);
  const of = (quantity: string) =>
    (readings[given(quantity)] ?? standing.find((each) => each.quantity === quantity))?.value;
  const [sensor, ambient] = [of("sensor_c"), of("ambient_c")];
  const at = given("sensor_c") >= 0 ? given("sensor_c") : given("ambient_c");
  if (at >= 0 && sensor !== undefined && ambient !== undefined && !(sensor > ambient)) {
    fields.push({
      path: `readings[${at}].value`,
      message: "leaves the sensor no warmer than the ambient: with the heat on ΔT is above 0 K",
    });
  }
  if (fields.length > 0)
    throw new ExpectedError(
      "impossible",
      "Some figures can't be. Nothing was kept; your typing is still here.",
      fields,
    );
}

/** The same for one value by itself: the field is `value`. */
export function checkValue(
  reading: GivenReading,
  bench: BenchVersionRow,
  standing: readonly { quantity: string; value: number }[],
): void {
  try {
    checkReadings([reading], bench, standing);
  } catch (error) {
    if (!(error instanceof ExpectedError)) throw error;
    throw new ExpectedError(
      error.code,
      error.detail,
      error.fields.map(({ message }) => ({ path: "value", message })),
    );
  }
}

function whyImpossible({ quantity, value }: GivenReading, bench: BenchVersionRow): string | undefined {
  if (!Number.isFinite(value)) return "is no number";
  if (quantity === "delta_t_k") return value > 0 ? undefined : "is not above 0 K: with the heat on ΔT is above 0 K";
  if (quantity === "sensor_c" || quantity === "ambient_c") {
    const { temperatureMinC: low, temperatureMaxC: high } = bench;
    return value >= low && value <= high ? undefined : `lies outside the sensor's range, ${low} to ${high} °C`;
  }
  const [low, high, unit] = spans[quantity];
  return value >= low && value <= high ? undefined : `lies outside what is read here, ${low} to ${high} ${unit}`;
}

/** @throws ExpectedError malformed for a set speed that the protocol doesn't have */
export function checkSetSpeed(setSpeed: number, protocol: ProtocolRow): void {
  if (protocol.setSpeeds.includes(setSpeed)) return;
  throw new ExpectedError("malformed", "The protocol has no such set speed.", [
    { path: "setSpeed", message: `is none of ${protocol.setSpeeds.join(", ")}` },
  ]);
}

/** Levels need a position, speeds a rotor; positions must be of the bench. @throws ExpectedError malformed */
export function checkPlaces(readings: readonly GivenReading[], positionIds: readonly string[]): void {
  const fields = readings.flatMap((reading, i): FieldProblem[] => {
    if (reading.quantity === "level_dba" && !positionIds.includes(reading.positionId ?? "")) {
      return [{ path: `readings[${i}].positionId`, message: "is no microphone position of this bench" }];
    }
    if (reading.quantity === "speed_rpm" && !reading.rotorPosition) {
      return [{ path: `readings[${i}].rotorPosition`, message: "is missing: which rotor?" }];
    }
    return [];
  });
  if (fields.length > 0) throw new ExpectedError("malformed", "Some readings don't say where they were taken.", fields);
}

type Place = { quantity: string; positionId?: string | null; rotorPosition?: number | null };
const placeOf = ({ quantity, positionId, rotorPosition }: Place): string =>
  `${quantity} ${quantity === "level_dba" ? positionId : ""} ${quantity === "speed_rpm" ? rotorPosition : ""}`;

/** A run has one standing reading of a kind and place: the next one supersedes it. @throws ExpectedError already_there */
export function checkTwice(readings: readonly GivenReading[], standing: readonly Place[]): void {
  const seen = new Set(standing.map(placeOf));
  const fields = readings.flatMap((reading, i): FieldProblem[] => {
    const place = placeOf(reading);
    if (seen.has(place)) return [{ path: `readings[${i}].value`, message: "is there already: supersede it instead" }];
    seen.add(place);
    return [];
  });
  if (fields.length > 0) {
    throw new ExpectedError(
      "already_there",
      "The run has such a reading already. Supersede it, with a reason.",
      fields,
    );
  }
}
