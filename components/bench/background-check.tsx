"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Select } from "@/components/ui/field";
import { Notice } from "@/components/ui/notice";
import { NumberField } from "@/components/ui/number-field";
import { Slot } from "@/components/ui/slot";
import { useKeepSessionReading } from "@/lib/client/bench";
import type { BenchSession } from "@/lib/contracts/bench-session";
import { HeatedTimer } from "./heated-timer";
import { ReadingList } from "./reading-list";
import { RecordingDesk } from "./recording-desk";
import { Refusal } from "./refusal";

/** The level with the fan stopped; with the heater on, at most 30 s under a thermal cut-out, timed here. */
export function BackgroundCheck({ session }: { session: BenchSession }) {
  const keep = useKeepSessionReading(session.id);
  const used = session.positions.filter((position) => position.used);
  const [positionId, setPositionId] = useState(used[0]?.id ?? "");
  const [value, setValue] = useState<number>();
  const [durationS, setDurationS] = useState<number | undefined>(session.protocol.levelAverageS);
  const [heated, setHeated] = useState(false);
  const [round, setRound] = useState(0);
  const kept = session.readings.filter((each) => each.quantity === "background_dba");
  const press = () => {
    if (value === undefined || durationS === undefined || keep.isPending) return;
    keep.mutate(
      { quantity: "background_dba", positionId, value, durationS, heated },
      {
        onSuccess: () => {
          setValue(undefined);
          setRound(round + 1);
        },
      },
    );
  };
  return (
    <div className="grid content-start gap-3">
      <h3>Background</h3>
      <p className="max-w-prose">
        Fan stopped, everything else running, heater off. Each level is corrected by it: without a background no figure
        can be given.
      </p>
      <ReadingList readings={kept} session={session} />
      {session.endedAt === null ? (
        <form
          className="grid gap-3"
          onSubmit={(event) => {
            event.preventDefault();
            press();
          }}
        >
          <div className="flex flex-wrap items-end gap-3">
            {used.length > 1 ? (
              <Select
                label="Position"
                value={positionId}
                onChange={(event) => setPositionId(event.currentTarget.value)}
                options={used.map((position) => ({ value: position.id, label: position.name }))}
              />
            ) : null}
            <NumberField
              key={`level ${round}`}
              className="w-48"
              label="Background level"
              unit="dB(A)"
              onValue={setValue}
              error={keep.error?.field("value")}
            />
            <NumberField
              key={`time ${heated}`}
              className="w-40"
              label="Averaged over"
              unit="s"
              defaultValue={durationS}
              min={0}
              max={heated ? 30 : 3600}
              onValue={setDurationS}
              error={keep.error?.field("durationS")}
            />
          </div>
          <Slot
            label="Heater on, because its supply hums"
            checked={heated}
            onChange={(event) => setHeated(event.currentTarget.checked)}
          />
          {heated ? (
            <Notice kind="caution" title="heater on with the fan stopped: 30 s at most">
              <p className="mb-2">
                Nothing carries the heat away now: the block climbs until the independent thermal cut-out opens. Have it
                fitted and tried, stay beside it, and switch the heater off when the time is up.
              </p>
              <HeatedTimer />
            </Notice>
          ) : null}
          <p>
            <Button
              type="submit"
              aria-label="Keep reading: background"
              busy={keep.isPending}
              disabled={value === undefined || durationS === undefined}
            >
              Keep reading
            </Button>
          </p>
          <Refusal error={keep.error} fields={false} />
        </form>
      ) : null}
      <RecordingDesk session={session} place={{ purpose: "background" }} />
    </div>
  );
}
