/** What must be ticked before a session starts: the cautions stand where the act is. */
export const checklistItems = {
  guard: "Guard in place between the rotor and everybody; nobody stands in the rotor's plane",
  eyes: "Eye protection on, for spin-up and for every run",
  cut_out: "Independent thermal cut-out fitted and tried; the heater is never left unattended",
  hot: "Cooler and heater are hot enough to burn skin: let them cool before a remount",
  hearing: "Hearing protection at hand: notice from 80 dB(A), protection and time limits near 85 dB(A)",
  mains: "Mains wiring was done by somebody licensed for it, to the local code",
} as const;

/** What must be ticked before a part is spun up. */
export const spinUpItems = {
  guard: "Guard closed around the rotor; nobody stands in its plane",
  eyes: "Eye protection on",
  steps: "Speed raised in steps, each held and listened to",
  vibration: "Stopped at once on vibration, rubbing or a new sound",
} as const;
