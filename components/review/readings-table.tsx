import { BarsTable } from "@/components/ui/bars/bars-table";
import type { ReviewReading } from "@/lib/contracts/review";
import { formatDateTime } from "@/lib/format/dates";

const words: Readonly<Record<string, string>> = {
  level_dba: "Level",
  background_dba: "Background",
  calibrator_db: "Calibrator",
  sensor_c: "Sensor",
  ambient_c: "Ambient",
  delta_t_k: "ΔT",
  power_w: "Heat load",
  speed_rpm: "Speed",
  pressure_pa: "Station pressure",
  humidity_percent: "Humidity",
  flow_m3s: "Flow",
};

/** Raw readings in the order they came; a superseded one says so and stays. */
export function ReadingsTable({ caption, readings }: { caption: string; readings: readonly ReviewReading[] }) {
  return (
    <BarsTable
      caption={caption}
      columns={[
        { key: "quantity", head: "Quantity" },
        { key: "value", head: "Value" },
        { key: "source", head: "Source" },
        { key: "by", head: "Taken by" },
        { key: "standing", head: "Stands" },
      ]}
      rows={readings.map((reading) => ({
        key: reading.readingId,
        ...(reading.supersededBy !== null && { tone: "wrong" as const }),
        cells: {
          quantity: { words: quantityWords(reading) },
          value: { words: `${reading.value} ${reading.unit}` },
          source: { words: reading.source },
          by: { words: `${reading.takenBy ?? "former member"}, ${formatDateTime(reading.takenAt)}` },
          standing: { words: standsWords(reading, readings) },
        },
      }))}
    />
  );
}

function quantityWords({ quantity, position, rotorPosition }: ReviewReading): string {
  const where = position ?? (rotorPosition === null ? undefined : `rotor ${rotorPosition}`);
  return `${words[quantity] ?? quantity}${where ? `, ${where}` : ""}`;
}

function standsWords(reading: ReviewReading, all: readonly ReviewReading[]): string {
  const by = all.find((each) => each.readingId === reading.supersededBy);
  if (reading.supersededBy !== null) return `superseded${by ? ` by ${by.value} ${by.unit}: ${by.reason ?? ""}` : ""}`;
  return reading.reason === null ? "yes" : `yes, in the place of an earlier one: ${reading.reason}`;
}
