/** What a protocol version asks for, as far as planning and gates need it. */
export type Protocol = {
  /** rpm, or drive in %. */
  readonly setSpeeds: readonly number[];
  readonly mounts: number;
  readonly runsPerMount: number;
  /** From setting the speed to the last sample of the steady state. */
  readonly minutesPerRun: number;
  /** Taking off, cleaning, paste, mounting. */
  readonly minutesPerMount: number;
  readonly ambientMinC: number;
  readonly ambientMaxC: number;
  readonly ambientDriftMaxK: number;
  readonly calibratorDriftMaxDb: number;
};
