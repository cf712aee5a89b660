import type { DemoSession } from "./seed-session";

/**
 * What happened at the Alder Bench beside its rounds; invented, and there so that the control charts have something to
 * show. The paste is renewed in season 2, which the host documents; in season 3 the microphone slips in one session,
 * which is found and put right.
 */
export const pasteRenewed = {
  season: 2,
  round: 3,
  session: 1,
  kind: "service" as const,
  reason: "Thermal paste renewed and fins cleaned before round 3: ΔT/P of every fan is lower from here on.",
  shift: { levelDb: 0, resistanceKpw: -0.006 },
};

export const microphoneSlipped = {
  season: 3,
  round: 5,
  session: 2,
  shift: { levelDb: 1.5, resistanceKpw: 0 },
  liftNote:
    "The microphone stood 16 mm too near: its clamp had slipped. Put back and pinned. Everything in the session was read from the same place, so differences to its baseline stand; the levels themselves say so in the note.",
};

/** Where the charts held a session and nothing was found. */
export const nothingFound =
  "Looked over with the operator: paste, clip, microphone and calibrator as before, the repeat mount read the same. Kept as it was read.";

type Where = { season: number; round: number; session: number };
const isAt = (at: Where, what: Where) =>
  at.season === what.season && at.round === what.round && at.session === what.session;
const isFrom = (at: Where, what: Where) =>
  at.season === what.season && (at.round > what.round || (at.round === what.round && at.session >= what.session));

/** What had changed at the bench by a session of the demo; undefined where nothing had. */
export function shiftAt(at: Where): DemoSession["shift"] {
  if (isFrom(at, pasteRenewed)) return pasteRenewed.shift;
  return isAt(at, microphoneSlipped) ? microphoneSlipped.shift : undefined;
}

export const isPasteRenewal = (at: Where): boolean => isAt(at, pasteRenewed);
export const isSlip = (at: Where): boolean => isAt(at, microphoneSlipped);
