"use client";

import type { ActField } from "@/components/ui/act/act-values";
import { useAddFrame, useChangeFrame } from "@/lib/client/host";
import { frameClasses, type HostFrame } from "@/lib/contracts/frames-admin";
import { formatFrame } from "@/lib/format/frames";
import { HostForm } from "./host-form";

const fields: readonly ActField[] = [
  {
    name: "frameClass",
    label: "Class",
    kind: "choice",
    options: frameClasses.map((value) => ({ value, label: `${value} mm` })),
  },
  { name: "outerMm", label: "Outer size", kind: "number", unit: "mm", hint: "The side of the square." },
  { name: "depthMm", label: "Depth", kind: "number", unit: "mm" },
  { name: "boreMm", label: "Bore", kind: "number", unit: "mm", hint: "Its diameter where it is narrowest." },
  { name: "holeSpacingMm", label: "Hole spacing", kind: "number", unit: "mm", hint: "From centre to centre." },
  { name: "holeDiameterMm", label: "Diameter of the holes", kind: "number", unit: "mm" },
  {
    name: "toleranceMm",
    label: "Tolerance",
    kind: "number",
    unit: "mm",
    hint: "Of the printed and of the moulded part together, a side; it is taken off every clearance.",
  },
  {
    name: "word",
    label: "Word",
    optional: true,
    hint: "Tells it from another frame of this class and depth, as in “narrow”.",
  },
];

const filled = (frame: HostFrame): ActField[] =>
  fields.map((field) => {
    const value = Object.entries(frame.figures).find(([name]) => name === field.name)?.[1];
    return { ...field, defaultValue: String(value ?? "") };
  });

export function AddFrameForm() {
  return (
    <HostForm
      label="Add a frame"
      words="Add the frame"
      busyWords="Adding …"
      doneWords="Added: seasons can allow it, and models can be compared with it."
      wide
      work={useAddFrame()}
      fields={fields}
    />
  );
}

/** Changes a frame that nothing stands on yet. */
export function ChangeFrameForm({ frame }: { frame: HostFrame }) {
  const name = formatFrame(frame.key);
  return (
    <HostForm
      label={`Change ${name}`}
      words={`Change ${name}`}
      busyWords="Changing …"
      doneWords="Changed."
      wide
      work={useChangeFrame(frame.id)}
      fields={filled(frame)}
    />
  );
}
