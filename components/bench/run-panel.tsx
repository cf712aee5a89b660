"use client";

import { Button } from "@/components/ui/button";
import { Field } from "@/components/ui/field";
import { Fold } from "@/components/ui/fold";
import { useAddRun, useKeepReadings } from "@/lib/client/bench";
import type { BenchRunView, BenchSession, BenchSubject } from "@/lib/contracts/bench-session";
import { sameSubject } from "@/lib/domain/bench/next-run";
import { LogForm } from "./log-form";
import { ReadingList } from "./reading-list";
import { readingFields, typedReadings } from "./reading-fields";
import { RecordingDesk } from "./recording-desk";
import { Refusal } from "./refusal";
import { RunStateForm } from "./run-state-form";
import { useDraft } from "./use-draft";
import { sameCell, speedWords, type Cell } from "./words";

export type RunPanelProps = { session: BenchSession; subject: BenchSubject; cell: Cell; onClose: () => void };

/** One run: its readings, what is still to be typed, its logs, and whether it is done. */
export function RunPanel({ session, subject, cell, onClose }: RunPanelProps) {
  const runs = session.runs.filter((run) => sameSubject(run, subject) && sameCell(run, cell));
  const run = runs.find((each) => each.state !== "discarded");
  const words = `mount ${cell.mountNumber} at ${speedWords(cell.setSpeed, session.protocol.setting)}`;
  const readings = session.readings.filter((each) => runs.some(({ id }) => id === each.runId));
  const writable = subject.closed === null && session.endedAt === null;
  return (
    <div className="mt-3 grid gap-4 border border-rule p-4">
      <div className="flex flex-wrap items-baseline justify-between gap-3">
        <h4>
          {subject.name}, {words}
        </h4>
        <Button kind="quiet" small onClick={onClose}>
          Close this run
        </Button>
      </div>
      {run ? (
        <p className="docket" role="status">
          Run {run.ordinal}, {run.state}
          {run.reason ? `: ${run.reason}` : ""}, by {run.by.handle ?? "an erased account"}
          {run.lacks.length > 0 ? `. It lacks ${run.lacks.join(", ")}.` : "."}
        </p>
      ) : null}
      <ReadingList readings={readings} session={session} />
      {writable ? <RunReadings session={session} subject={subject} cell={cell} run={run} words={words} /> : null}
      {run ? <RecordingDesk session={session} place={{ purpose: "run", run }} /> : null}
      {writable && run ? (
        <>
          <Fold title="Bring a log (CSV)">
            <LogForm session={session} run={run} />
          </Fold>
          <RunStateForm run={run} />
        </>
      ) : null}
    </div>
  );
}

function RunReadings({
  session,
  subject,
  cell,
  run,
  words,
}: Omit<RunPanelProps, "onClose"> & { run: BenchRunView | undefined; words: string }) {
  const standing = session.readings.filter((each) => each.runId === run?.id && run && each.supersededBy === null);
  const fields = readingFields(session, subject, standing);
  const { draft, type, clear } = useDraft(
    `bench ${session.id} ${subject.entryId ?? subject.baselineUnitId} ${cell.mountNumber} ${cell.setSpeed}`,
  );
  const { readings, names, wrong } = typedReadings(fields, draft);
  const add = useAddRun(session.id);
  const keep = useKeepReadings(run?.id ?? "");
  const error = add.error ?? keep.error;
  const busy = add.isPending || keep.isPending;
  const submit = () => {
    if (busy || Object.keys(wrong).length > 0) return;
    if (run) keep.mutate({ version: run.version, readings }, { onSuccess: clear });
    else
      add.mutate(
        { entryId: subject.entryId, baselineUnitId: subject.baselineUnitId, ...cell, readings },
        { onSuccess: clear },
      );
  };
  if (fields.length === 0) return null;
  return (
    <form
      className="grid gap-3"
      aria-label={`Readings, ${words}`}
      onSubmit={(event) => {
        event.preventDefault();
        submit();
      }}
    >
      <div className="grid gap-3 sm:grid-cols-2 lg:grid-cols-3">
        {fields.map((field) => (
          <Field
            key={field.name}
            figures
            label={field.label}
            unit={field.unit}
            hint={field.hint}
            inputMode="decimal"
            autoComplete="off"
            value={draft[field.name] ?? ""}
            onChange={(event) => type(field.name, event.currentTarget.value)}
            error={wrong[field.name] ?? error?.field(`readings[${names.indexOf(field.name)}].value`)}
          />
        ))}
      </div>
      <p>
        {run ? (
          <Button type="submit" kind="solid" busy={busy} busyWords="Keeping …" disabled={readings.length === 0}>
            Keep readings
          </Button>
        ) : (
          <Button type="submit" kind="solid" busy={busy} busyWords="Adding …">
            Add run
          </Button>
        )}
      </p>
      <Refusal error={error} fields={false} />
    </form>
  );
}
