"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Field } from "@/components/ui/field";
import { Fold } from "@/components/ui/fold";
import { Notice } from "@/components/ui/notice";
import { Progress } from "@/components/ui/progress";
import { Slot } from "@/components/ui/slot";
import { useCancelRecording, useKeepRecording, useListened } from "@/lib/client/bench-recordings";
import type { BenchRecording } from "@/lib/contracts/bench-recordings";
import type { BenchSession } from "@/lib/contracts/bench-session";
import { formatTime } from "@/lib/format/dates";
import { RecordingReport } from "./recording-report";
import { Refusal } from "./refusal";

const megabytes = (bytes: number): string => `${(bytes / 1_000_000).toFixed(1)} MB`;

/** One recording that was sent: how far the server is with it, what it says, whether it counts and was listened to. */
export function RecordingItem({ recording, session }: { recording: BenchRecording; session: BenchSession }) {
  const { name, state, refusal, report, calibrator, positionId, doneBytes, ofBytes } = recording;
  const position = session.positions.find((each) => each.id === positionId);
  const cancel = useCancelRecording(recording.id);
  const told = `${name}, ${position?.name ?? "a position"}, ${formatTime(recording.createdAt)}`;
  if (state === "waiting" || state === "reading") {
    return (
      <li>
        <Progress
          label={`The server reads ${name}`}
          done={doneBytes}
          words={state === "waiting" ? "waits for its turn" : `${megabytes(doneBytes)} of ${megabytes(ofBytes)}`}
          onCancel={() => cancel.mutate(undefined)}
          {...(state === "reading" && { of: ofBytes })}
        />
        <Refusal error={cancel.error} />
      </li>
    );
  }
  if (state === "cancelled") return <li className="docket">{told}: cancelled</li>;
  if (!report) {
    return (
      <li>
        <Notice kind="wrong" title={`${name} can’t be used`}>
          <p>
            {refusal?.message}
            {refusal?.at ? ` (at ${refusal.at})` : ""} Record again.
          </p>
        </Notice>
      </li>
    );
  }
  const level = calibrator ? `${calibrator.readDb.toFixed(2)} dB` : `${report.levelADba?.toFixed(1) ?? "no"} dB(A)`;
  return (
    <li className="grid min-w-0 gap-2">
      <Fold
        title={`${told}: ${level}, ${recording.keptAt ? "kept" : "read and not kept yet"}`}
        open={!recording.keptAt}
      >
        <RecordingReport report={report} calibrator={calibrator} distanceMm={position?.distanceMm ?? 100} />
        <p className="docket mt-2">SHA-256 {recording.sha256.slice(0, 16)}…</p>
      </Fold>
      {recording.keptAt === null && session.endedAt === null ? (
        <Keep recording={recording} session={session} level={level} />
      ) : null}
      <ListenedTick recording={recording} />
    </li>
  );
}

function Keep({ recording, session, level }: { recording: BenchRecording; session: BenchSession; level: string }) {
  const [reason, setReason] = useState("");
  const keep = useKeepRecording(recording.id);
  const version = session.runs.find((run) => run.id === recording.runId)?.version ?? null;
  const standing =
    recording.runId === null
      ? undefined
      : session.readings.find(
          (each) =>
            each.runId === recording.runId &&
            each.quantity === "level_dba" &&
            each.positionId === recording.positionId &&
            each.supersededBy === null,
        );
  return (
    <>
      {standing ? (
        <Field
          className="max-w-xl"
          label={`Reason to supersede ${standing.value} ${standing.unit}, ${standing.source}`}
          hint="the run has a level at this position already; it stays beside this one"
          value={reason}
          onChange={(event) => setReason(event.currentTarget.value)}
          error={keep.error?.field("reason")}
        />
      ) : null}
      <p>
        <Button
          kind="solid"
          busy={keep.isPending}
          busyWords="Keeping …"
          disabled={standing !== undefined && reason.trim() === ""}
          onClick={() => keep.mutate({ version, reason: standing ? reason : null })}
        >
          Keep {level} from {recording.name}
        </Button>
      </p>
      <Refusal error={keep.error} fields={false} />
    </>
  );
}

function ListenedTick({ recording }: { recording: BenchRecording }) {
  const { listenedAt, listenedBy, name } = recording;
  const listened = useListened(recording.id);
  if (listenedAt !== null) {
    const who = listenedBy?.handle ?? "an erased account";
    return (
      <p className="docket">
        Listened to by {who}, {formatTime(listenedAt)}: no voices. It may be published.
      </p>
    );
  }
  return (
    <>
      <Slot
        label={`I listened to all of ${name}; there are no voices in it, so it may be published`}
        checked={listened.isPending}
        onChange={() => listened.mutate(undefined)}
      />
      <p className="small-print">Without this tick only its figures are used, and the recording is given to nobody.</p>
      <Refusal error={listened.error} />
    </>
  );
}
