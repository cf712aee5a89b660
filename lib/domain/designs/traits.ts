/** Whether a trait belongs to each rotor by its position, or to the whole revision. */
export type TraitScope = "rotor" | "whole";

type TraitBase = { readonly key: string; readonly label: string; readonly scope: TraitScope };
export type NumberTrait = TraitBase & {
  readonly kind: "number";
  /** As shown; "" for a plain count or ratio. */
  readonly unit: string;
  readonly integer: boolean;
  /** What a form and the database accept; outside it is a slip of the pen, not a fan. */
  readonly min: number;
  readonly max: number;
};
export type ChoiceTrait = TraitBase & {
  readonly kind: "choice";
  readonly choices: readonly { readonly value: string; readonly label: string }[];
};
export type FlagTrait = TraitBase & { readonly kind: "flag" };
export type Trait = NumberTrait | ChoiceTrait | FlagTrait;

/**
 * The trait vocabulary: numbers with unit and accepted range, choices, flags. Keys are for ever: they stand in
 * addresses and in the database. Ranges are house limits for the 120 mm class and its neighbours (no source).
 */
export const TRAITS = [
  { key: "stages", label: "Stages", scope: "whole", kind: "number", unit: "", integer: true, min: 1, max: 4 },
  { key: "counter_rotating", label: "Counter-rotating", scope: "whole", kind: "flag" },
  { key: "blades", label: "Blades", scope: "rotor", kind: "number", unit: "", integer: true, min: 1, max: 60 },
  {
    key: "hand",
    label: "Hand",
    scope: "rotor",
    kind: "choice",
    choices: [
      { value: "left", label: "Left" },
      { value: "right", label: "Right" },
    ],
  },
  {
    key: "hub_diameter",
    label: "Hub diameter",
    scope: "rotor",
    kind: "number",
    unit: "mm",
    integer: false,
    min: 5,
    max: 140,
  },
  {
    key: "tip_diameter",
    label: "Tip diameter",
    scope: "rotor",
    kind: "number",
    unit: "mm",
    integer: false,
    min: 20,
    max: 200,
  },
  {
    key: "swept_diameter",
    label: "Swept diameter",
    scope: "rotor",
    kind: "number",
    unit: "mm",
    integer: false,
    min: 20,
    max: 200,
  },
  { key: "tip_gap", label: "Tip gap", scope: "rotor", kind: "number", unit: "mm", integer: false, min: 0, max: 20 },
  {
    key: "pitch_mid",
    label: "Pitch at mid-span",
    scope: "rotor",
    kind: "number",
    unit: "°",
    integer: false,
    min: 0,
    max: 90,
  },
  {
    key: "chord_mid",
    label: "Chord at mid-span",
    scope: "rotor",
    kind: "number",
    unit: "mm",
    integer: false,
    min: 1,
    max: 150,
  },
  {
    key: "solidity_mid",
    label: "Solidity at mid-span",
    scope: "rotor",
    kind: "number",
    unit: "",
    integer: false,
    min: 0.01,
    max: 5,
  },
  {
    key: "axial_depth",
    label: "Axial depth",
    scope: "rotor",
    kind: "number",
    unit: "mm",
    integer: false,
    min: 1,
    max: 120,
  },
  { key: "shroud", label: "Shroud", scope: "rotor", kind: "flag" },
  { key: "unequal_spacing", label: "Unequal blade spacing", scope: "rotor", kind: "flag" },
  {
    key: "spacer",
    label: "Spacer between stages",
    scope: "whole",
    kind: "number",
    unit: "mm",
    integer: false,
    min: 0,
    max: 120,
  },
  {
    key: "inlet_stack",
    label: "Inlet stack",
    scope: "whole",
    kind: "choice",
    choices: [
      { value: "none", label: "None" },
      { value: "ring", label: "Plain ring" },
      { value: "bellmouth", label: "Bellmouth" },
      { value: "honeycomb", label: "Honeycomb" },
      { value: "vanes", label: "Guide vanes" },
    ],
  },
  {
    key: "inlet_stack_length",
    label: "Inlet stack length",
    scope: "whole",
    kind: "number",
    unit: "mm",
    integer: false,
    min: 0,
    max: 200,
  },
  { key: "struts", label: "Struts", scope: "whole", kind: "number", unit: "", integer: true, min: 0, max: 40 },
  {
    key: "frame",
    label: "Frame",
    scope: "whole",
    kind: "choice",
    choices: [
      { value: "80", label: "80 mm class" },
      { value: "92", label: "92 mm class" },
      { value: "120", label: "120 mm class" },
      { value: "140", label: "140 mm class" },
    ],
  },
  {
    key: "material",
    label: "Material",
    scope: "whole",
    kind: "choice",
    choices: [
      { value: "pla", label: "PLA" },
      { value: "petg", label: "PETG" },
      { value: "abs", label: "ABS" },
      { value: "asa", label: "ASA" },
      { value: "pa", label: "Nylon (PA)" },
      { value: "pc", label: "PC" },
      { value: "resin", label: "Resin" },
      { value: "other", label: "Other" },
    ],
  },
  { key: "mass", label: "Mass", scope: "rotor", kind: "number", unit: "g", integer: false, min: 0.5, max: 500 },
  {
    key: "print_time",
    label: "Print time",
    scope: "whole",
    kind: "number",
    unit: "h",
    integer: false,
    min: 0.05,
    max: 200,
  },
  {
    key: "licence",
    label: "Licence",
    scope: "whole",
    kind: "choice",
    choices: [
      { value: "cc0", label: "CC0 1.0" },
      { value: "cc-by", label: "CC BY 4.0" },
      { value: "cc-by-sa", label: "CC BY-SA 4.0" },
      { value: "cc-by-nc", label: "CC BY-NC 4.0" },
      { value: "cc-by-nc-sa", label: "CC BY-NC-SA 4.0" },
      { value: "cern-ohl-p", label: "CERN-OHL-P 2.0" },
      { value: "cern-ohl-s", label: "CERN-OHL-S 2.0" },
      { value: "none", label: "No files for download" },
    ],
  },
] as const satisfies readonly Trait[];
export type TraitKey = (typeof TRAITS)[number]["key"];

/** The trait of a key, or undefined when no trait has it. */
export function traitOf(key: string): Trait | undefined {
  return TRAITS.find((trait) => trait.key === key);
}

/** Why a value can't be this trait's, or undefined when it can. Numbers are in the trait's own unit. */
export function traitFault(trait: Trait, value: number | string | boolean): string | undefined {
  if (trait.kind === "flag") return typeof value === "boolean" ? undefined : "must be yes or no";
  if (trait.kind === "choice")
    return trait.choices.some((choice) => choice.value === value) ? undefined : "is none of the choices";
  if (typeof value !== "number" || !Number.isFinite(value)) return "must be a number";
  if (trait.integer && !Number.isInteger(value)) return "must be a whole number";
  const unit = trait.unit === "" ? "" : ` ${trait.unit}`;
  return value < trait.min || value > trait.max ? `must be ${trait.min} to ${trait.max}${unit}` : undefined;
}
