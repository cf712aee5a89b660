"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import { NumberField } from "@/components/ui/number-field";
import { useKeepSessionReading } from "@/lib/client/bench";
import type { BenchSession } from "@/lib/contracts/bench-session";
import { ReadingList } from "./reading-list";
import { RecordingDesk } from "./recording-desk";
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
      <Drift session={session} phase={phase} />
      <RecordingDesk session={session} place={{ purpose: "calibration", phase }} />
    </div>
  );
}

/** How far the calibrator moved over the session, by position. */
function Drift({ session, phase }: { session: BenchSession; phase: "before" | "after" }) {
  if (phase === "before") return null;
  const latest = (positionId: string, at: "before" | "after") =>
    session.readings.findLast(
      (each) =>
        each.quantity === "calibrator_db" &&
        each.phase === at &&
        each.positionId === positionId &&
        each.supersededBy === null,
    )?.value;
  const limit = session.protocol.calibratorDriftMaxDb;
  const drifts = session.positions.flatMap(({ id, name }) => {
    const [before, after] = [latest(id, "before"), latest(id, "after")];
    return before === undefined || after === undefined ? [] : [{ id, name, driftDb: after - before }];
  });
  return drifts.map(({ id, name, driftDb }) => {
    const words = `${name}: it moved by ${driftDb < 0 ? "−" : "+"}${Math.abs(driftDb).toFixed(2)} dB`;
    return Math.abs(driftDb) > limit + 1e-9 ? (
      <Notice key={id} kind="wrong" title="the calibrator drifted">
        <p>
          {words}; the limit is {limit} dB. Find the cause before the session ends.
        </p>
      </Notice>
    ) : (
      <p key={id}>
        {words}, within {limit} dB.
      </p>
    );
  });
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
