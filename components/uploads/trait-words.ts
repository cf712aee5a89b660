import type { RotorTraitName, TraitValue, WholeChoices } from "@/lib/contracts/revision-files";

interface TraitWords {
  label: string;
  unit: string;
  kind: "number" | "flag" | "hand" | "stack";
}

const number = (label: string, unit = ""): TraitWords => ({ label, unit, kind: "number" });

export const rotorWords: Readonly<Record<RotorTraitName, TraitWords>> = {
  blades: number("Blades"),
  hand: { label: "Hand", unit: "", kind: "hand" },
  hubDiameterMm: number("Hub diameter", "mm"),
  tipDiameterMm: number("Tip diameter", "mm"),
  sweptDiameterMm: number("Swept diameter", "mm"),
  axialDepthMm: number("Axial depth", "mm"),
  pitchMidDeg: number("Pitch at mid-span", "°"),
  chordMidMm: number("Chord at mid-span", "mm"),
  solidityMid: number("Solidity at mid-span"),
  shroud: { label: "Shroud", unit: "", kind: "flag" },
  unequalSpacing: { label: "Unequal blade spacing", unit: "", kind: "flag" },
  massG: number("Mass", "g"),
};

export const wholeWords: Readonly<Record<keyof WholeChoices, TraitWords>> = {
  spacerMm: number("Spacer between stages", "mm"),
  struts: number("Struts"),
  inletStack: { label: "Inlet stack", unit: "", kind: "stack" },
  inletStackMm: number("Inlet stack length", "mm"),
};

/** A value as a person reads it; an en dash where there is none. */
export function valueWords(value: TraitValue, { unit }: TraitWords): string {
  if (value === null) return "–";
  if (typeof value === "boolean") return value ? "yes" : "no";
  return unit === "" ? String(value) : `${value} ${unit}`;
}

/** A typed text as the trait's value: empty is null, a decimal comma counts; undefined for what is no number. */
export function typedValue(text: string, { kind }: TraitWords): TraitValue | undefined {
  if (text.trim() === "") return null;
  if (kind === "hand" || kind === "stack") return text;
  if (kind === "flag") return text === "yes";
  const value = Number(text.trim().replace(",", "."));
  return Number.isFinite(value) ? value : undefined;
}

/** A value as the text that a field begins with. */
export function textOf(value: TraitValue): string {
  return value === null ? "" : typeof value === "boolean" ? (value ? "yes" : "no") : String(value);
}

export type { TraitWords };
