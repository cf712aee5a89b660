import type { Protocol } from "./protocol";

/** What a session showed; null where it wasn't taken. Temperatures in °C, levels in dB. */
export type SessionState = {
  readonly ambientC: readonly number[];
  /** By microphone position: the calibrator read before and after. */
  readonly calibrator: readonly {
    readonly position: string;
    readonly beforeDb: number | null;
    readonly afterDb: number | null;
  }[];
  readonly positions: readonly string[];
  readonly backgroundPositions: readonly string[];
  readonly baselineFirst: boolean;
  readonly baselineLast: boolean;
};

export type GateCode =
  | "ambient-missing"
  | "ambient-outside"
  | "calibrator-missing"
  | "calibrator-drifted"
  | "background-missing"
  | "baseline-first-missing"
  | "baseline-last-missing";

export type GateFault = { readonly code: GateCode; readonly message: string };

/**
 * The protocol's gates that a session doesn't pass, in the order of the checklist; empty when it passes all of them.
 * The calibrator's limit is the protocol's (0.5 dB by default: ISO 3744:2010 5.2, value from memory), compared after
 * rounding to 1e-9; ambient limits are the protocol's, ends inside.
 */
export function gateFaults(protocol: Protocol, session: SessionState): GateFault[] {
  return [...ambientFaults(protocol, session), ...calibratorFaults(protocol, session), ...orderFaults(session)];
}

function ambientFaults({ ambientMinC, ambientMaxC }: Protocol, { ambientC }: SessionState): GateFault[] {
  if (ambientC.length === 0) return [{ code: "ambient-missing", message: "No ambient temperature was taken." }];
  const outside = ambientC.filter((value) => !(value >= ambientMinC && value <= ambientMaxC));
  if (outside.length === 0) return [];
  const message = `Ambient was ${outside.join(", ")} °C; the protocol asks for ${ambientMinC} to ${ambientMaxC} °C.`;
  return [{ code: "ambient-outside", message }];
}

function calibratorFaults({ calibratorDriftMaxDb }: Protocol, { calibrator, positions }: SessionState): GateFault[] {
  return positions.flatMap((position): GateFault[] => {
    const check = calibrator.find((each) => each.position === position);
    if (!check || check.beforeDb === null || check.afterDb === null)
      return [{ code: "calibrator-missing", message: `The calibrator is missing before or after at ${position}.` }];
    const driftDb = Math.round(Math.abs(check.afterDb - check.beforeDb) * 1e9) / 1e9;
    if (driftDb <= calibratorDriftMaxDb) return [];
    const message = `The calibrator moved by ${driftDb.toFixed(2)} dB at ${position}; ${calibratorDriftMaxDb} dB is allowed.`;
    return [{ code: "calibrator-drifted", message }];
  });
}

function orderFaults(session: SessionState): GateFault[] {
  const missing = session.positions.filter((position) => !session.backgroundPositions.includes(position));
  return [
    ...missing.map((position) => ({ code: "background-missing" as const, message: `No background at ${position}.` })),
    ...(session.baselineFirst
      ? []
      : [{ code: "baseline-first-missing" as const, message: "The baseline didn't run first." }]),
    ...(session.baselineLast
      ? []
      : [{ code: "baseline-last-missing" as const, message: "The baseline didn't run last." }]),
  ];
}
