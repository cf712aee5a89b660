/** What a session's own checks say when it is closed: each finding holds the session until another person lifts it. */
export type GateFinding = {
  readonly code: "calibrator" | "baseline" | "ambient" | "background";
  readonly reason: string;
  readonly whatToDo: string;
};

export type GateInput = {
  readonly calibratorLevelDb: number;
  readonly calibratorDriftMaxDb: number;
  readonly ambientMinC: number;
  readonly ambientMaxC: number;
  /** Names of the microphone positions that the protocol uses. */
  readonly positions: readonly string[];
  readonly calibrator: readonly {
    readonly position: string;
    readonly phase: "before" | "after";
    readonly valueDb: number;
  }[];
  readonly background: readonly { readonly position: string; readonly valueDba: number }[];
  readonly ambientC: readonly number[];
  /** The baseline's levels and resistances by mount at each set speed, in the order of the mounts. */
  readonly baseline: readonly {
    readonly setSpeed: number;
    readonly levelsDba: readonly number[];
    readonly deltaTK: readonly number[];
  }[];
  /** Whether the first and the last run that is done was the baseline's. */
  readonly baselineFirst: boolean;
  readonly baselineLast: boolean;
  /** Standard deviation between two baseline mounts that the bench's budget expects, dB and K. */
  readonly repeatabilityDb: number;
  readonly repeatabilityK: number;
};

const one = (value: number): string => value.toFixed(1);

/**
 * Calibrator before and after within the protocol's limit (ISO 3744:2010, 5.2, 0,5 dB: value from memory) and on its
 * nominal level within the same; background at every position; ambient within the protocol's limits; the baseline's
 * first mount against its last within the repeatability limit 2.8 s_r (ISO 5725-6:1994, 4.1.4: r = 2.8 s_r; clause
 * from memory) in level and in ΔT at every set speed. An empty list means that nothing was found.
 */
export function sessionGates(input: GateInput): GateFinding[] {
  return [
    ...calibratorFindings(input),
    ...backgroundFindings(input),
    ...ambientFindings(input),
    ...baselineFindings(input),
  ];
}

function calibratorFindings(input: GateInput): GateFinding[] {
  const whatToDo =
    "Find the cause (battery, coupler, preamplifier), calibrate again, and measure the series again if it moved.";
  return input.positions.flatMap((position): GateFinding[] => {
    const at = (phase: "before" | "after") =>
      input.calibrator.findLast((each) => each.position === position && each.phase === phase)?.valueDb;
    const before = at("before");
    const after = at("after");
    if (before === undefined || after === undefined) {
      return [
        {
          code: "calibrator",
          reason: `No calibrator reading ${before === undefined ? "before" : "after"} the series (${position}).`,
          whatToDo,
        },
      ];
    }
    const drift = Math.abs(after - before);
    const off = Math.abs(before - input.calibratorLevelDb);
    const limit = input.calibratorDriftMaxDb + 1e-9;
    if (drift > limit) {
      return [
        {
          code: "calibrator",
          reason: `The calibrator moved by ${one(drift)} dB (${position}); the limit is ${one(input.calibratorDriftMaxDb)} dB.`,
          whatToDo,
        },
      ];
    }
    if (off > limit) {
      return [
        {
          code: "calibrator",
          reason: `The calibrator read ${one(before)} dB, not ${one(input.calibratorLevelDb)} dB (${position}).`,
          whatToDo,
        },
      ];
    }
    return [];
  });
}

function backgroundFindings(input: GateInput): GateFinding[] {
  return input.positions.flatMap((position): GateFinding[] =>
    input.background.some((each) => each.position === position)
      ? []
      : [
          {
            code: "background",
            reason: `No background level was read (${position}).`,
            whatToDo:
              "Read it with the fan stopped, everything else running, the heater off; measure the series again if that is no longer possible.",
          },
        ],
  );
}

function ambientFindings(input: GateInput): GateFinding[] {
  const whatToDo = "Bring the room into its limits, let everything soak, and measure the affected runs again.";
  if (input.ambientC.length === 0) return [{ code: "ambient", reason: "No ambient temperature was read.", whatToDo }];
  const outside = input.ambientC.filter((value) => !(value >= input.ambientMinC && value <= input.ambientMaxC));
  if (outside.length === 0) return [];
  const middle = (input.ambientMinC + input.ambientMaxC) / 2;
  const worst = outside.reduce((a, b) => (Math.abs(b - middle) > Math.abs(a - middle) ? b : a));
  return [
    {
      code: "ambient",
      reason: `The ambient was ${one(worst)} °C; the protocol takes ${one(input.ambientMinC)} to ${one(input.ambientMaxC)} °C.`,
      whatToDo,
    },
  ];
}

function baselineFindings(input: GateInput): GateFinding[] {
  const whatToDo =
    "Look for what changed (paste, mounting, cable, bearing), remount the baseline and run it again before the session counts.";
  const order = [...(input.baselineFirst ? [] : ["first"]), ...(input.baselineLast ? [] : ["last"])];
  const turns = order.map((turn): GateFinding => ({
    code: "baseline",
    reason: `The baseline did not run ${turn}.`,
    whatToDo,
  }));
  const moved = input.baseline.flatMap(({ setSpeed, levelsDba, deltaTK }): GateFinding[] => {
    const spread = (values: readonly number[]) => Math.abs((values.at(-1) ?? 0) - (values[0] ?? 0));
    if (levelsDba.length < 2) {
      return [{ code: "baseline", reason: `The baseline was not run first and last at ${setSpeed}.`, whatToDo }];
    }
    const level = spread(levelsDba) - 1e-9;
    const deltaT = spread(deltaTK) - 1e-9;
    const findings: GateFinding[] = [];
    if (level > 2.8 * input.repeatabilityDb) {
      findings.push({
        code: "baseline",
        reason: `The baseline's level moved by ${one(level)} dB at ${setSpeed}; two mounts should differ by less than ${one(2.8 * input.repeatabilityDb)} dB.`,
        whatToDo,
      });
    }
    if (deltaT > 2.8 * input.repeatabilityK) {
      findings.push({
        code: "baseline",
        reason: `The baseline's ΔT moved by ${one(deltaT)} K at ${setSpeed}; two mounts should differ by less than ${one(2.8 * input.repeatabilityK)} K.`,
        whatToDo,
      });
    }
    return findings;
  });
  return [...turns, ...moved];
}
