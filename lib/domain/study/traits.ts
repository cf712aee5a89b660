import type { StudyEntry } from "./study-entry";

export type TraitValue = number | string | undefined;

export interface Trait {
  readonly label: string;
  /** "measure" has an order and a step; "choice" has names, of which one is the reference. */
  readonly kind: "measure" | "choice";
  readonly unit: string;
  /** What one step of a measure is, in its unit: effects are said per step. */
  readonly step: number;
  /** Two revisions differ in it when they lie further apart (house rule, no source). Choices: when not equal. */
  readonly tolerance: number;
  /** Follows from other traits, so it stands in no joint model unless asked for, and never makes a second difference. */
  readonly follows?: true;
  readonly of: (entry: StudyEntry) => TraitValue;
}

const measure = (
  label: string,
  unit: string,
  step: number,
  tolerance: number,
  of: (entry: StudyEntry) => number | undefined,
): Trait => ({ label, kind: "measure", unit, step, tolerance, of });
const choice = (label: string, of: (entry: StudyEntry) => string | undefined): Trait => ({
  label,
  kind: "choice",
  unit: "",
  step: 1,
  tolerance: 0,
  of,
});
const yesNo = (value: boolean) => (value ? "with" : "without");

/** Every trait that can be asked of, in the order in which pages list them. */
export const traits = {
  stages: measure("Stages", "", 1, 0, (e) => e.stages),
  rotation: choice("Counter-rotating", (e) => (e.stages > 1 ? yesNo(e.counterRotating) : undefined)),
  blades: measure("Blades, first stage", "", 1, 0, (e) => e.bladesFirst),
  blades2: { ...measure("Blades, second stage", "", 1, 0, (e) => e.bladesSecond) },
  hand: choice("Hand, first stage", (e) => e.handFirst),
  inlet: choice("Inlet stack", (e) => e.inletStack),
  inletmm: measure("Inlet stack, length", "mm", 10, 1, (e) => (e.inletStack === "none" ? undefined : e.inletStackMm)),
  spacer: measure("Spacer", "mm", 1, 0.5, (e) => (e.stages > 1 ? e.spacerMm : undefined)),
  struts: measure("Struts", "", 1, 0, (e) => e.struts),
  shroud: choice("Shroud ring", (e) => yesNo(e.shroud)),
  frame: choice("Frame", (e) => e.frameKey),
  material: choice("Material", (e) => e.material),
  gap: measure("Tip gap", "mm", 0.1, 0.05, (e) => e.tipGapMm),
  solidity: measure("Solidity at mid-span", "", 0.1, 0.02, (e) => e.solidityMid),
  pitch: measure("Pitch at mid-span", "°", 1, 0.5, (e) => e.pitchMidDeg),
  mass: { ...measure("Rotor mass", "g", 10, Infinity, (e) => e.massG), follows: true },
  print: { ...measure("Print time", "min", 60, Infinity, (e) => e.printTimeMin), follows: true },
} as const satisfies Record<string, Trait>;
export type TraitKey = keyof typeof traits;
export const traitKeys = Object.keys(traits) as TraitKey[];

/** A trait by its key, as the plain interface. */
export const traitOf = (key: TraitKey): Trait => traits[key];

/**
 * Traits of the joint model when none is asked for: what every entry has. A second rotor's blades, a spacer and the
 * sense of rotation exist only from two stages on, a stack's length only with a stack; mass and print time follow.
 */
export const jointTraits: readonly TraitKey[] = [
  "stages",
  "blades",
  "hand",
  "inlet",
  "struts",
  "shroud",
  "frame",
  "material",
  "gap",
  "solidity",
  "pitch",
];

/** Whether a choice is one of with and without, so that its effect needs no name of a level. */
export const isYesNo = (key: TraitKey) => key === "rotation" || key === "shroud";
