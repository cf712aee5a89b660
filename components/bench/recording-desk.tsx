"use client";

import { Fold } from "@/components/ui/fold";
import { Notice } from "@/components/ui/notice";
import { useRecordings } from "@/lib/client/bench-recordings";
import type { BenchRecording } from "@/lib/contracts/bench-recordings";
import type { BenchSession } from "@/lib/contracts/bench-session";
import { positionsReadHigh } from "@/lib/domain/bench/recording-choice";
import { listWords } from "@/lib/format/words";
import { RecordingForm } from "./recording-form";
import { RecordingItem } from "./recording-item";
import { Refusal } from "./refusal";
import type { RecordingPlace } from "./use-recording-form";

const belongs = (recording: BenchRecording, place: RecordingPlace): boolean =>
  recording.purpose === place.purpose &&
  (place.purpose !== "run" || recording.runId === place.run.id) &&
  (place.purpose !== "calibration" || recording.phase === place.phase);

/** Recordings of one place of a session: those that were sent, and a way to bring another. */
export function RecordingDesk({ session, place }: { session: BenchSession; place: RecordingPlace }) {
  const { data: known, error } = useRecordings(session.id);
  if (error) return <Refusal error={error} />;
  if (!known) return <p className="docket">Recordings are being looked up …</p>;
  const own = known.items.filter((each) => belongs(each, place));
  const open = session.endedAt === null;
  const entryId = place.purpose === "run" ? place.run.entryId : null;
  const inletStackMm = known.subjects.find((each) => each.entryId === entryId)?.inletStackMm ?? 0;
  return (
    <div className="grid min-w-0 gap-3">
      <InletStackNote session={session} inletStackMm={inletStackMm} />
      {own.length > 0 ? (
        <ul className="grid min-w-0 gap-3">
          {own.map((each) => (
            <RecordingItem key={each.id} recording={each} session={session} />
          ))}
        </ul>
      ) : null}
      {open ? (
        <Fold title="Bring a recording (WAV)">
          <RecordingForm session={session} known={known} place={place} />
        </Fold>
      ) : null}
    </div>
  );
}

/** An inlet stack near the microphone may read high on the axis; it is said and never corrected for. */
function InletStackNote({ session, inletStackMm }: { session: BenchSession; inletStackMm: number }) {
  const high = positionsReadHigh(session.positions, inletStackMm);
  if (high.length === 0) return null;
  const off = session.positions.filter((each) => each.angleDeg !== 0).map((each) => each.name);
  return (
    <Notice kind="caution" title="inlet stack near the microphone">
      <p>
        The stack of {inletStackMm} mm takes a fifth or more of the microphone’s distance at{" "}
        {listWords(high.map((each) => each.name))}: it may read high there (house rule). Nothing is corrected for it.{" "}
        {off.length > 0
          ? `Record ${listWords(off)} as well: the sheet shows it beside.`
          : "This bench has no position off the axis to show beside."}
      </p>
    </Notice>
  );
}
