import type { ReadingInput } from "@/lib/contracts/bench";
import type { BenchReadingView, BenchSession, BenchSubject } from "@/lib/contracts/bench-session";
import { parseTypedNumber } from "@/lib/format/typed-number";
import type { Draft } from "./use-draft";

export interface ReadingField {
  name: string;
  label: string;
  unit: string;
  hint?: string;
  reading: Omit<ReadingInput, "value" | "source">;
}

/** The fields that a run still has: those without a standing reading. A ΔT from a log stands for the sensor. */
export function readingFields(
  session: BenchSession,
  subject: BenchSubject,
  standing: readonly BenchReadingView[],
): ReadingField[] {
  const has = (quantity: string) => standing.some((each) => each.quantity === quantity);
  const levels = session.positions
    .filter(({ id }) => !standing.some((each) => each.quantity === "level_dba" && each.positionId === id))
    .map((position): ReadingField => ({
      name: `level ${position.id}`,
      label: `Level ${position.name}`,
      unit: "dB(A)",
      hint: `@ ${position.distanceMm} mm${position.used ? "" : ", not in the protocol"}`,
      reading: { quantity: "level_dba", positionId: position.id },
    }));
  const rotors = Array.from({ length: subject.rotors }, (_, i) => i + 1)
    .filter((rotor) => !standing.some((each) => each.quantity === "speed_rpm" && each.rotorPosition === rotor))
    .map((rotor): ReadingField => ({
      name: `speed ${rotor}`,
      label: `Speed of rotor ${rotor}`,
      unit: "rpm",
      hint: "as measured",
      reading: { quantity: "speed_rpm", rotorPosition: rotor },
    }));
  const plain: (ReadingField | false)[] = [
    !has("sensor_c") &&
      !has("delta_t_k") && {
        name: "sensor",
        label: "Sensor temperature",
        unit: "°C",
        hint: "“54,3” or “129.7 °F” are understood",
        reading: { quantity: "sensor_c" },
      },
    !has("ambient_c") && {
      name: "ambient",
      label: "Ambient temperature",
      unit: "°C",
      reading: { quantity: "ambient_c" },
    },
    !has("power_w") && { name: "power", label: "Heater power", unit: "W", reading: { quantity: "power_w" } },
  ];
  return [...levels, ...plain.filter((field) => field !== false), ...rotors];
}

/** What was typed, as readings in the order of the fields, and why some of it can't be read, by field. */
export function typedReadings(
  fields: readonly ReadingField[],
  draft: Draft,
): { readings: ReadingInput[]; names: string[]; wrong: Readonly<Record<string, string>> } {
  const readings: ReadingInput[] = [];
  const names: string[] = [];
  const wrong: Record<string, string> = {};
  for (const { name, unit, reading } of fields) {
    const text = draft[name] ?? "";
    if (text.trim() === "") continue;
    const typed = parseTypedNumber(text, unit);
    if (typed.value === undefined) wrong[name] = typed.why;
    else {
      readings.push({ ...reading, value: typed.value, source: "typed" });
      names.push(name);
    }
  }
  return { readings, names, wrong };
}
