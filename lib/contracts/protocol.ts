import { z } from "zod";

/** What a protocol version asks of each run, and its gates. */
export const protocolParts = {
  heatLoadW: z.number(),
  setting: z.enum(["rpm", "drive_percent"]),
  setSpeeds: z.array(z.number()),
  mounts: z.int(),
  runsPerMount: z.int(),
  backgroundGrade: z.enum(["engineering", "survey"]),
  epsilonK: z.number(),
  ambientMinC: z.number(),
  ambientMaxC: z.number(),
  ambientDriftMaxK: z.number(),
  calibratorDriftMaxDb: z.number(),
  levelAverageS: z.number(),
};
