"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { TextArea } from "@/components/ui/field";
import { NumberField } from "@/components/ui/number-field";
import { leftToTick, TickList, type Ticks } from "@/components/ui/tick-list";
import { useRecordPart } from "@/lib/client/bench-prints";
import type { SpecimenPart } from "@/lib/contracts/bench-prints";
import { spinUpItems } from "@/lib/domain/bench/cautions";
import { Refusal } from "./refusal";

const cautions = Object.entries(spinUpItems).map(([key, words]) => ({ key, words }));

export type PartFormProps = { specimenId: string; part: SpecimenPart; topSpeedRpm: number | null; name: string };

/** Mass, balance and spin-up of one rotor. It passes with its record whole and every caution ticked, or it fails. */
export function PartForm({ specimenId, part, topSpeedRpm, name }: PartFormProps) {
  const record = useRecordPart(specimenId, part.rotorPosition);
  const [massG, setMassG] = useState(part.massG ?? undefined);
  const [speed, setSpeed] = useState(part.spinUpSpeedRpm ?? undefined);
  const [balanceRecord, setBalanceRecord] = useState(part.balanceRecord);
  const [spinUpRecord, setSpinUpRecord] = useState(part.spinUpRecord);
  const [ticked, setTicked] = useState<Ticks>({});
  const to = (state: SpecimenPart["state"]) =>
    record.mutate({
      massG: massG ?? null,
      spinUpSpeedRpm: speed ?? null,
      ...{ balanceRecord, spinUpRecord, cautions: ticked, state },
    });
  const { error } = record;
  return (
    <form
      className="grid gap-3"
      aria-label={`Rotor ${part.rotorPosition}`}
      onSubmit={(event) => event.preventDefault()}
    >
      <h4>
        Rotor {part.rotorPosition} <span className="docket">{part.state}</span>
      </h4>
      <div className="grid gap-3 sm:grid-cols-2">
        <NumberField
          label={`Mass of rotor ${part.rotorPosition}`}
          unit="g"
          defaultValue={massG}
          onValue={setMassG}
          error={error?.field("massG")}
        />
        <NumberField
          label={`Spin-up speed of rotor ${part.rotorPosition}`}
          unit="rpm"
          hint={topSpeedRpm ? `${topSpeedRpm} rpm or more` : undefined}
          defaultValue={speed}
          onValue={setSpeed}
          error={error?.field("spinUpSpeedRpm")}
        />
        <TextArea
          label={`Balance of rotor ${part.rotorPosition}`}
          rows={2}
          value={balanceRecord}
          onChange={(event) => setBalanceRecord(event.currentTarget.value)}
          error={error?.field("balanceRecord")}
        />
        <TextArea
          label={`Spin-up of rotor ${part.rotorPosition}: steps and what was heard`}
          rows={2}
          value={spinUpRecord}
          onChange={(event) => setSpinUpRecord(event.currentTarget.value)}
          error={error?.field("spinUpRecord")}
        />
      </div>
      <TickList
        title="a rotor can burst: tick each one"
        legend={`Spin-up of rotor ${part.rotorPosition}`}
        hideLegend
        items={cautions}
        ticked={ticked}
        onTick={setTicked}
      />
      <p className="flex flex-wrap gap-3">
        <Button busy={record.isPending} aria-label={`Keep record: ${name}`} onClick={() => to("printed")}>
          Keep record
        </Button>
        <Button
          kind="solid"
          busy={record.isPending}
          aria-label={`Passed its spin-up: ${name}`}
          disabled={leftToTick(cautions, ticked) > 0}
          onClick={() => to("passed")}
        >
          Passed its spin-up
        </Button>
        <Button kind="danger" busy={record.isPending} aria-label={`Failed: ${name}`} onClick={() => to("failed")}>
          Failed
        </Button>
      </p>
      <Refusal error={error} fields={false} />
    </form>
  );
}
