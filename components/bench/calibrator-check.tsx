"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { NumberField } from "@/components/ui/number-field";
import { useKeepSessionReading } from "@/lib/client/bench";
import type { BenchSession } from "@/lib/contracts/bench-session";
import { ReadingList } from "./reading-list";
import { Refusal } from "./refusal";

/** The calibrator, read at each position before the first run or after the last. */
export function CalibratorCheck({ session, phase }: { session: BenchSession; phase: "before" | "after" }) {
  const kept = session.readings.filter((each) => each.quantity === "calibrator_db" && each.phase === phase);
  return (
    <div className="grid content-start gap-3">
      <h3>Calibrator {phase}</h3>
      <p className="max-w-prose">
        {session.bench.calibrator}: {session.bench.calibratorLevelDb} dB. Before and after may differ by{" "}
        {session.protocol.calibratorDriftMaxDb} dB at most.
      </p>
      <ReadingList readings={kept} session={session} />
      {session.endedAt === null
        ? session.positions
            .filter((position) => position.used)
            .map((position) => (
              <CalibratorField key={position.id} session={session} phase={phase} position={position} />
            ))
        : null}
    </div>
  );
}

function CalibratorField({
  session,
  phase,
  position,
}: {
  session: BenchSession;
  phase: "before" | "after";
  position: BenchSession["positions"][number];
}) {
  const keep = useKeepSessionReading(session.id);
  const [value, setValue] = useState<number>();
  const [round, setRound] = useState(0);
  const words = `calibrator ${phase}, ${position.name}`;
  const press = () => {
    if (value === undefined || keep.isPending) return;
    keep.mutate(
      { quantity: "calibrator_db", positionId: position.id, phase, value },
      {
        onSuccess: () => {
          setValue(undefined);
          setRound(round + 1);
        },
      },
    );
  };
  return (
    <form
      className="flex flex-wrap items-end gap-3"
      onSubmit={(event) => {
        event.preventDefault();
        press();
      }}
    >
      <NumberField
        key={round}
        className="w-56"
        label={`Calibrator ${phase}, ${position.name}`}
        unit="dB"
        onValue={setValue}
        error={keep.error?.field("value")}
      />
      <Button type="submit" aria-label={`Keep reading: ${words}`} busy={keep.isPending} disabled={value === undefined}>
        Keep reading
      </Button>
      <Refusal error={keep.error} fields={false} />
    </form>
  );
}
