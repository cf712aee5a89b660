"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Slot, SlotGroup } from "@/components/ui/slot";
import type { LengthUnit, ModelFile } from "@/lib/client/fit/messages";
import { formatNumber } from "@/lib/format/numbers";

const units: readonly { unit: LengthUnit; mm: number; word: string }[] = [
  { unit: "mm", mm: 1, word: "millimetres" },
  { unit: "cm", mm: 10, word: "centimetres" },
  { unit: "m", mm: 1000, word: "metres" },
  { unit: "in", mm: 25.4, word: "inches" },
];

const guessed = (guess: ModelFile["guess"]): LengthUnit =>
  guess === "cm?" ? "cm" : guess === "unknown" ? "mm" : guess;
const size = (mm: number) => `${formatNumber(mm, { decimals: mm < 10 ? 2 : 0 })} mm`;

/** Asks for the unit where the size looks wrong for a fan, or a file names one that makes it look so. */
export function UnitQuestion({ model, onUnit }: { model: ModelFile; onUnit: (mmPerUnit: number) => void }) {
  const named = model.mmPerUnit;
  const [unit, setUnit] = useState<LengthUnit>(guessed(model.guess));
  const chosen = units.find((each) => each.unit === unit);
  return (
    <form
      className="grid max-w-3xl justify-items-start gap-3"
      onSubmit={(event) => {
        event.preventDefault();
        onUnit(chosen?.mm ?? 1);
      }}
    >
      <p>
        {named === undefined
          ? `The file names no unit, and its largest side is ${formatNumber(model.extent, { decimals: 3 })}.`
          : `By its own unit the file is ${size(model.extent * named)} across, which looks wrong for a fan.`}{" "}
        Which unit was it drawn in?
      </p>
      <SlotGroup legend="Unit of the file" flow="column">
        {units.map((each) => (
          <Slot
            key={each.unit}
            type="radio"
            name="unit"
            label={`${each.word}: ${size(model.extent * each.mm)} across`}
            checked={unit === each.unit}
            onChange={() => setUnit(each.unit)}
          />
        ))}
      </SlotGroup>
      <Button kind="solid" type="submit">
        Measure it in {chosen?.word}
      </Button>
    </form>
  );
}
