/** What a protocol version asks of a run, in the table as in the view of it that everybody may read. */
export const protocolColumns = {
  heatLoadW: "heat_load_w",
  setting: "setting",
  setSpeeds: "set_speeds",
  positions: "positions",
  mounts: "mounts",
  runsPerMount: "runs_per_mount",
  backgroundGrade: "background_grade",
  epsilonK: "epsilon_k",
  ambientMinC: "ambient_min_c",
  ambientMaxC: "ambient_max_c",
  ambientDriftMaxK: "ambient_drift_max_k",
  calibratorDriftMaxDb: "calibrator_drift_max_db",
  levelAverageS: "level_average_s",
} as const;

export interface ProtocolColumns {
  heatLoadW: number;
  setting: "rpm" | "drive_percent";
  setSpeeds: number[];
  positions: string[];
  mounts: number;
  runsPerMount: number;
  backgroundGrade: "engineering" | "survey";
  epsilonK: number;
  ambientMinC: number;
  ambientMaxC: number;
  ambientDriftMaxK: number;
  calibratorDriftMaxDb: number;
  levelAverageS: number;
}
