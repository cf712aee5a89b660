"use client";

import { useState, type KeyboardEvent } from "react";
import { Button } from "@/components/ui/button";
import { Facts, type Fact } from "@/components/ui/facts";
import { Missing } from "@/components/ui/missing";
import { NumberField } from "@/components/ui/number-field";
import { Section } from "@/components/ui/sheet";
import { Slot, SlotGroup } from "@/components/ui/slot";
import { crossingsOf, crossingStep, type Crossings } from "@/lib/client/fit/crossing-steps";
import type { RotorTraits } from "@/lib/client/fit/messages";
import { formatNumber } from "@/lib/format/numbers";
import { countWords } from "@/lib/format/words";
import { CrossingsDiagram } from "./crossings-diagram";

const figure = (value: number) => formatNumber(value, { decimals: Number.isInteger(value) ? 0 : 1 });

function facts(crossings: Crossings): Fact[] {
  const { planeMode } = crossings;
  return [
    { label: "Blades in line at once", value: figure(crossings.together) },
    { label: "Moments in line, a turn of one against the other", value: figure(crossings.cycle) },
    { label: "Moments, a revolution of rotor 1", value: figure(crossings.instantsPerRevolution) },
    { label: "Encounters, a revolution of rotor 1", value: figure(crossings.encountersPerRevolution) },
    {
      label: "First plane-mode tone",
      value: planeMode ? (
        `${formatNumber(planeMode.frequencyHz)} Hz, orders ${planeMode.m1} and ${formatNumber(planeMode.m2)}`
      ) : (
        <Missing why="the rotors turn as one" />
      ),
    },
  ];
}

export type CrossingsSectionProps = { first: RotorTraits; second: RotorTraits; speedRpm: number | undefined };

/** How the blades of two rotors meet, as figures and as a picture that is stepped through. */
export function CrossingsSection({ first, second, speedRpm }: CrossingsSectionProps) {
  const [counter, setCounter] = useState(first.hand !== second.hand);
  const [ratio, setRatio] = useState<number | undefined>(1);
  const [step, setStep] = useState(0);
  const crossings = crossingsOf(first.blades, second.blades, speedRpm ?? 0, counter, ratio ?? 0);
  const now = crossings && ratio ? crossingStep(first.blades, second.blades, counter, ratio, step) : undefined;
  const words = now
    ? `Step ${step}: rotor 1 turned by ${formatNumber(now.firstTurnedDeg, { decimals: 1 })}°, ${
        now.pairs.length > 0 ? `${countWords(now.pairs.length, "pair")} of blades in line` : "no blades in line"
      }`
    : "";
  const keys = (event: KeyboardEvent) => {
    const by = { ArrowRight: 1, ArrowUp: 1, ArrowLeft: -1, ArrowDown: -1 }[event.key];
    if (by === undefined) return;
    event.preventDefault();
    setStep((at) => Math.max(0, at + by));
  };
  return (
    <Section
      id="crossings"
      title="Crossings"
      note={`${first.blades} blades against ${second.blades}`}
      className="grid gap-4"
    >
      <div className="flex flex-wrap items-end gap-x-8 gap-y-3">
        <SlotGroup legend="Rotor 2 turns">
          <Slot type="radio" name="turns" label="against rotor 1" checked={counter} onChange={() => setCounter(true)} />
          <Slot type="radio" name="turns" label="with rotor 1" checked={!counter} onChange={() => setCounter(false)} />
        </SlotGroup>
        <NumberField
          label="Speed of rotor 2 over rotor 1"
          unit=""
          defaultValue={1}
          min={0.1}
          max={10}
          onValue={setRatio}
        />
      </div>
      {crossings ? <Facts flow="strip" facts={facts(crossings)} /> : null}
      {now ? (
        // One stop for the arrow keys, beside the buttons that do the same.
        <div
          role="group"
          aria-label="Crossings, step by step; arrow keys step"
          tabIndex={0}
          onKeyDown={keys}
          className="grid max-w-80 justify-items-center gap-2"
        >
          <CrossingsDiagram now={now} words={words} />
          <p role="status" className="text-center">
            {words}
          </p>
          <div className="flex flex-wrap justify-center gap-3">
            <Button small disabled={step === 0} onClick={() => setStep(step - 1)}>
              Half a step back
            </Button>
            <Button small onClick={() => setStep(step + 1)}>
              Half a step on
            </Button>
          </div>
        </div>
      ) : (
        <p>
          {counter || ratio !== 1
            ? "Give a speed above, and the crossings stand here."
            : "Turning the same way at one speed, the blades never pass each other."}
        </p>
      )}
    </Section>
  );
}
