import type { BenchRunView, BenchSession } from "@/lib/contracts/bench-session";

/** "1450 rpm", or "60 %" where the protocol sets the drive. */
export function speedWords(setSpeed: number, setting: BenchSession["protocol"]["setting"]): string {
  return `${setSpeed} ${setting === "rpm" ? "rpm" : "%"}`;
}

export const quantityWords: Readonly<Record<string, string>> = {
  level_dba: "Level",
  sensor_c: "Sensor",
  ambient_c: "Ambient",
  delta_t_k: "ΔT",
  power_w: "Power",
  speed_rpm: "Speed of rotor",
  calibrator_db: "Calibrator",
  background_dba: "Background",
  pressure_pa: "Air pressure",
  humidity_percent: "Humidity",
};

/** What a session without a round is for. */
export const purposeWords: Readonly<Record<BenchSession["purpose"], string>> = {
  round: "for a round",
  qualification: "qualification of the bench: ten remounts of the baseline",
  bridge: "bridge between two baseline units",
};

export const stateWords = (state: string): string => state.replaceAll("_", " ");

export interface Cell {
  setSpeed: number;
  mountNumber: number;
}

export const sameCell = (run: Pick<BenchRunView, "setSpeed" | "mountNumber">, cell: Cell): boolean =>
  run.setSpeed === cell.setSpeed && run.mountNumber === cell.mountNumber;
