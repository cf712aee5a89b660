"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Field } from "@/components/ui/field";
import { NumberField } from "@/components/ui/number-field";
import { Slot } from "@/components/ui/slot";
import { useAddSpecimen } from "@/lib/client/bench-prints";
import type { PrintJob } from "@/lib/contracts/bench-prints";
import { Refusal } from "./refusal";

type Settings = {
  layerHeightMm?: number;
  nozzleMm?: number;
  infillPercent?: number;
  walls?: number;
  printTimeMin?: number;
};

const numbers: readonly { key: keyof Settings; label: string; unit: string }[] = [
  { key: "layerHeightMm", label: "Layer height", unit: "mm" },
  { key: "nozzleMm", label: "Nozzle", unit: "mm" },
  { key: "infillPercent", label: "Infill", unit: "%" },
  { key: "walls", label: "Walls", unit: "" },
  { key: "printTimeMin", label: "Print time", unit: "min" },
];

/** What was printed and how. Rotors get a record each, once the copy is kept. */
export function CopyForm({ job, name }: { job: PrintJob; name: string }) {
  const add = useAddSpecimen();
  const [material, setMaterial] = useState(job.material ?? "");
  const [colour, setColour] = useState("");
  const [note, setNote] = useState("");
  const [across, setAcross] = useState(true);
  const [settings, setSettings] = useState<Settings>({});
  const submit = () => {
    if (add.isPending) return;
    add.mutate({ entryId: job.entryId, material, colour, note, layersAcrossAxis: across, ...settings });
  };
  return (
    <form
      className="grid gap-3"
      aria-label={`Printed copy of ${name}`}
      onSubmit={(event) => {
        event.preventDefault();
        submit();
      }}
    >
      <div className="grid gap-3 sm:grid-cols-2 lg:grid-cols-4">
        <Field
          label="Material of the copy"
          required
          value={material}
          onChange={(event) => setMaterial(event.currentTarget.value)}
          error={add.error?.field("material")}
        />
        <Field label="Colour" value={colour} onChange={(event) => setColour(event.currentTarget.value)} />
        {numbers.map(({ key, label, unit }) => (
          <NumberField
            key={key}
            label={label}
            unit={unit}
            onValue={(value) => setSettings((before) => ({ ...before, [key]: value }))}
            error={add.error?.field(key)}
          />
        ))}
        <Field label="Note on the copy" value={note} onChange={(event) => setNote(event.currentTarget.value)} />
      </div>
      <Slot
        label="Layers lie across the axis of rotation"
        checked={across}
        onChange={(event) => setAcross(event.currentTarget.checked)}
      />
      <p>
        <Button type="submit" aria-label={`Add copy of ${name}`} busy={add.isPending} busyWords="Adding …">
          Add copy
        </Button>
      </p>
      <Refusal error={add.error} />
    </form>
  );
}
