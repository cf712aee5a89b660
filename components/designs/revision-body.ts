import type { ActField } from "@/components/ui/act/act-values";
import { formatFrame } from "@/lib/format/frames";
import { inletStacks, licences, materials, type OwnChoices } from "@/lib/contracts/own-designs";

const choices = (values: readonly string[]) => values.map((value) => ({ value, label: value }));

/** Fields of a revision with so many rotors; a rotor's end in its position. */
export function revisionFields(frames: OwnChoices["frames"], stages: number): ActField[] {
  return [
    { name: "licence", label: "Licence", kind: "choice", options: choices(licences) },
    {
      name: "frameId",
      label: "Frame",
      kind: "choice",
      options: frames.map(({ id, key }) => ({ value: id, label: `${formatFrame(key)} mm` })),
    },
    { name: "material", label: "Material", kind: "choice", options: choices(materials) },
    ...Array.from({ length: stages }, (_, i) => rotorFields(i + 1)).flat(),
    ...(stages > 1
      ? [
          { name: "counterRotating", label: "Counter-rotating", kind: "tick" as const },
          { name: "spacerMm", label: "Spacer", kind: "number" as const, unit: "mm", defaultValue: "0" },
        ]
      : []),
    { name: "struts", label: "Struts", kind: "number", defaultValue: "0" },
    { name: "inletStack", label: "Inlet stack", kind: "choice", options: choices(inletStacks) },
    { name: "inletStackMm", label: "Length of the inlet stack", kind: "number", unit: "mm", defaultValue: "0" },
    { name: "tipGapMm", label: "Tip gap", kind: "number", unit: "mm", optional: true },
    { name: "printTimeMin", label: "Print time", kind: "number", unit: "min", optional: true },
    { name: "changes", label: "What changed", kind: "area", optional: true },
    { name: "printNotes", label: "Print notes", kind: "area", optional: true },
  ];
}

function rotorFields(position: number): ActField[] {
  const of = (name: string, label: string, more: Partial<ActField> = {}): ActField => ({
    name: `${name}${position}`,
    label: `Rotor ${position}: ${label}`,
    kind: "number",
    ...more,
  });
  return [
    of("blades", "blades"),
    of("hand", "hand", { kind: "choice", options: choices(["right", "left"]) }),
    of("hubDiameterMm", "hub diameter", { unit: "mm", optional: true }),
    of("tipDiameterMm", "tip diameter", { unit: "mm", optional: true }),
    of("pitchMidDeg", "pitch at mid-span", { unit: "°", optional: true }),
    of("solidityMid", "solidity at mid-span", { optional: true }),
    of("massG", "mass", { unit: "g", optional: true }),
    of("shroud", "shroud", { kind: "tick" }),
  ];
}

const ofRotor = ["blades", "hand", "hubDiameterMm", "tipDiameterMm", "pitchMidDeg", "solidityMid", "massG", "shroud"];
const ofTraits = [
  "frameId",
  "material",
  "counterRotating",
  "spacerMm",
  "struts",
  "inletStack",
  "inletStackMm",
  "tipGapMm",
  "printTimeMin",
];

/** The request's body from the flat values of the form; what is missing is left out. */
export function revisionBody(values: Readonly<Record<string, unknown>>, stages: number): Record<string, unknown> {
  const pick = (names: readonly string[], suffix = "") =>
    Object.fromEntries(
      names.flatMap((name) => {
        const value = values[`${name}${suffix}`];
        return value === undefined ? [] : [[name, value]];
      }),
    );
  return {
    ...pick(["licence", "changes", "printNotes"]),
    traits: { ...pick(ofTraits), rotors: Array.from({ length: stages }, (_, i) => pick(ofRotor, String(i + 1))) },
  };
}

/** Where a refusal's path such as `traits.rotors[1].blades` stands in the form: `blades2`. */
export function fieldOf(path: string): string {
  const rotor = /^traits\.rotors\[(\d+)\]\.(\w+)/.exec(path);
  if (rotor) return `${rotor[2]}${Number(rotor[1]) + 1}`;
  return path.replace(/^traits\./, "");
}
