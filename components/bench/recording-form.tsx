"use client";

import { useEffect, useMemo, useState } from "react";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import { Progress } from "@/components/ui/progress";
import { useBenchReader } from "@/lib/client/bench-reader/use-bench-reader";
import { useSendRecording } from "@/lib/client/bench-recordings";
import type { BenchRecordings } from "@/lib/contracts/bench-recordings";
import type { BenchSession } from "@/lib/contracts/bench-session";
import { uploadPurposes } from "@/lib/contracts/uploads";
import { RecordingFields } from "./recording-fields";
import { RecordingReport } from "./recording-report";
import { Refusal } from "./refusal";
import { useRecordingForm, type RecordingPlace } from "./use-recording-form";

const megabytes = (bytes: number): string => `${(bytes / 1_000_000).toFixed(1)} MB`;
const { maxBytes } = uploadPurposes.recording;

/** A WAV for a calibrator, a background or a run: read in this browser first, listened to, then sent. */
export function RecordingForm({
  session,
  known,
  place,
}: {
  session: BenchSession;
  known: BenchRecordings;
  place: RecordingPlace;
}) {
  const [file, setFile] = useState<File>();
  const [round, setRound] = useState(0);
  const form = useRecordingForm(session, known, place);
  const reader = useBenchReader("recording");
  const sender = useSendRecording(session.id);
  const { asked, choice } = form;
  const distanceMm = session.positions.find((each) => each.id === choice.positionId)?.distanceMm ?? 100;
  const tooLarge = file !== undefined && file.size > maxBytes;
  const busy = sender.sending !== undefined || sender.waiting;
  const clear = reader.clear;
  const change: typeof form.change = (changed) => {
    form.change(changed);
    clear();
  };
  const { state } = reader;
  return (
    <div className="grid min-w-0 gap-4">
      <label className="grid gap-1">
        <span className="field-label">Recording (WAV)</span>
        <input
          key={round}
          type="file"
          className="max-w-full"
          accept=".wav,audio/wav,audio/vnd.wave"
          onChange={(event) => {
            setFile(event.currentTarget.files?.[0]);
            clear();
          }}
        />
      </label>
      <RecordingFields form={{ ...form, change }} place={place} known={known} />
      {tooLarge ? (
        <Notice kind="wrong" title="too large">
          <p>
            {file.name} has {megabytes(file.size)}; up to {maxBytes / 1_000_000} MB are taken. Cut it to the run.
          </p>
        </Notice>
      ) : null}
      <p>
        <Button
          busy={state.step === "reading"}
          busyWords="Reading …"
          disabled={!file || !asked || tooLarge || busy}
          onClick={() => file && asked && reader.read(file, asked.order)}
        >
          Read it here
        </Button>
      </p>
      {state.step === "reading" ? (
        <Progress
          label="Reading in this browser"
          done={state.done}
          of={state.of}
          words={`${megabytes(state.done)} of ${megabytes(state.of)} gone through`}
          onCancel={clear}
        />
      ) : null}
      {state.step === "refused" ? (
        <Notice kind="wrong" title="this recording can’t be used" live="alert">
          <p>
            {state.refused.message}
            {state.refused.at ? ` (at ${state.refused.at})` : ""} Nothing was sent.
          </p>
        </Notice>
      ) : null}
      {state.step === "found" && file && asked ? (
        <>
          <p role="status">Read in this browser; nothing is sent yet.</p>
          <RecordingReport {...state.found.result} distanceMm={distanceMm} />
          <Listen file={file} />
          <p>
            <Button
              kind="solid"
              busy={busy}
              busyWords="Sending …"
              onClick={() =>
                sender.send(file, asked.toSend, () => {
                  setFile(undefined);
                  setRound(round + 1);
                  clear();
                })
              }
            >
              Send it to be kept
            </Button>
          </p>
        </>
      ) : null}
      {sender.sending ? (
        <Progress
          label={`Sending ${sender.sending.name}`}
          done={sender.sending.sentBytes}
          of={sender.sending.bytes}
          words={`${megabytes(sender.sending.sentBytes)} of ${megabytes(sender.sending.bytes)} sent`}
          onCancel={sender.cancel}
        />
      ) : null}
      {sender.waiting && file ? <Progress label={`Looking at ${file.name}`} done={0} words="all sent" /> : null}
      <Refusal error={sender.error} />
    </div>
  );
}

/** The file as it lies on this computer, to be listened to. */
function Listen({ file }: { file: File }) {
  const address = useMemo(() => URL.createObjectURL(file), [file]);
  useEffect(() => () => URL.revokeObjectURL(address), [address]);
  return (
    <div className="grid gap-1">
      <span className="field-label">Listen for voices before it may be published</span>
      {/* No words are spoken in it that a caption could give. */}
      <audio controls preload="metadata" src={address} className="w-full max-w-xl" />
    </div>
  );
}
