"use client";

import { useState } from "react";
import type { RecordingOrder } from "@/lib/client/bench-reader/messages";
import type { RecordingToSend } from "@/lib/client/bench-recordings";
import type { BenchRecording, BenchRecordings } from "@/lib/contracts/bench-recordings";
import type { BenchRunView, BenchSession } from "@/lib/contracts/bench-session";
import { typedRotors, type TypedRotors } from "@/lib/domain/bench/recording-choice";

/** What a recording is brought for. */
export type RecordingPlace =
  | { purpose: "calibration"; phase: "before" | "after" }
  | { purpose: "background" }
  | { purpose: "run"; run: BenchRunView };

export interface RecordingChoice {
  positionId: string;
  /** Empty: the first, with a word where there are more. */
  channel: string;
  /** Id of a kept calibrator recording, or "full-scale". */
  calibration: string;
  fullScaleDb: number | undefined;
  calibratorDb: number | undefined;
  backgroundId: string;
  heated: boolean;
  rotors: TypedRotors;
}

/** Recordings that are kept of a purpose at a position, the newest first. */
export const keptOf = (
  recordings: readonly BenchRecording[],
  purpose: BenchRecording["purpose"],
  positionId: string,
): BenchRecording[] =>
  recordings.filter((each) => each.purpose === purpose && each.positionId === positionId && each.keptAt).toReversed();

/** Blades, sense and struts as the entry's traits say; speeds as the tachometer read them, else as they were set. */
export function rotorsOf(session: BenchSession, known: BenchRecordings["subjects"], run: BenchRunView): TypedRotors {
  const subject = known.find((each) => each.entryId === run.entryId);
  const blades = subject?.blades.slice(0, 2) ?? [];
  const read = (rotor: number) =>
    session.readings.find(
      (each) =>
        each.runId === run.id &&
        each.quantity === "speed_rpm" &&
        each.rotorPosition === rotor &&
        each.supersededBy === null,
    )?.value;
  const set = session.protocol.setting === "rpm" ? run.setSpeed : undefined;
  const rpm = blades.map((_, i) => read(i + 1) ?? set);
  return {
    blades: blades.join(", "),
    rpm: rpm.every((each) => each !== undefined) ? rpm.join(", ") : "",
    rotation: (blades.length === 2 && subject?.rotation) || "",
    struts: subject && subject.struts > 0 ? String(subject.struts) : "",
  };
}

/** What is chosen for a recording, and from it what the browser reads it as and what the server is asked. */
export function useRecordingForm(session: BenchSession, known: BenchRecordings, place: RecordingPlace) {
  const used = session.positions.filter((each) => place.purpose === "run" || each.used);
  const firstPosition = (used.find((each) => each.used) ?? used[0])?.id ?? "";
  const calibrators = (positionId: string) => keptOf(known.items, "calibration", positionId);
  /** What fits as things stand, until a person chooses otherwise: a calibrator may be kept meanwhile. */
  const fitting = (positionId: string): RecordingChoice => ({
    positionId,
    calibration: calibrators(positionId).find((each) => each.phase === "before")?.id ?? "full-scale",
    backgroundId: keptOf(known.items, "background", positionId)[0]?.id ?? "",
    channel: "",
    fullScaleDb: undefined,
    calibratorDb: session.bench.calibratorLevelDb,
    heated: false,
    rotors:
      place.purpose === "run"
        ? rotorsOf(session, known.subjects, place.run)
        : { blades: "", rpm: "", rotation: "", struts: "" },
  });
  const [chosen, setChosen] = useState<Partial<RecordingChoice>>({});
  const choice = { ...fitting(chosen.positionId ?? firstPosition), ...chosen };
  const change = ({ positionId, ...changed }: Partial<RecordingChoice>) =>
    setChosen(({ calibration, backgroundId, ...now }) =>
      // What tells the level and the background are of one position.
      positionId === undefined
        ? {
            ...now,
            ...(calibration !== undefined && { calibration }),
            ...(backgroundId !== undefined && { backgroundId }),
            ...changed,
          }
        : { ...now, ...changed, positionId },
    );
  const { asked, wrong } = askedFor(place, choice, known, session.protocol.backgroundGrade);
  return { choice, change, positions: used, calibrators: calibrators(choice.positionId), asked, wrong };
}

type Grade = BenchSession["protocol"]["backgroundGrade"];

interface Asked {
  order: RecordingOrder;
  toSend: RecordingToSend;
}

function askedFor(
  place: RecordingPlace,
  choice: RecordingChoice,
  { items }: BenchRecordings,
  grade: Grade,
): { asked: Asked | undefined; wrong: Readonly<Record<string, string>> } {
  const { positionId } = choice;
  const channel = choice.channel === "" ? null : Number(choice.channel);
  const alone = place.purpose === "calibration" && place.phase === "before";
  const level = alone ? undefined : levelBy(choice, items);
  if (!alone && !level) {
    return { asked: undefined, wrong: { fullScale: "A level needs a calibrator recording or a full-scale level." } };
  }
  if (place.purpose === "calibration") {
    const { calibratorDb: levelDb } = choice;
    if (levelDb === undefined) return { asked: undefined, wrong: { calibratorDb: "What level does it give?" } };
    const toSend = { purpose: place.purpose, phase: place.phase, positionId, channel, levelDb };
    return {
      asked: {
        order: { purpose: place.purpose, channel, levelDb, against: level?.read ?? null },
        toSend: { ...toSend, against: level?.sent ?? null },
      },
      wrong: {},
    };
  }
  if (!level) return { asked: undefined, wrong: {} };
  const calibration = level.read;
  if (place.purpose === "background") {
    const { heated } = choice;
    const toSend = { purpose: place.purpose, positionId, channel, calibration: level.sent, heated };
    return { asked: { order: { purpose: place.purpose, channel, calibration }, toSend }, wrong: {} };
  }
  return runAsked(place.run, choice, items, level, { channel, grade });
}

type Level = { read: (RecordingOrder & { purpose: "background" })["calibration"]; sent: LevelSent };
type LevelSent = { recordingId: string } | { fullScaleDb: number };

function levelBy(choice: RecordingChoice, items: readonly BenchRecording[]): Level | undefined {
  const read = items.find((each) => each.id === choice.calibration)?.given?.calibrator;
  if (read) return { read: { read }, sent: { recordingId: choice.calibration } };
  const { fullScaleDb } = choice;
  return fullScaleDb === undefined ? undefined : { read: { fullScaleDb }, sent: { fullScaleDb } };
}

function runAsked(
  run: BenchRunView,
  choice: RecordingChoice,
  items: readonly BenchRecording[],
  level: Level,
  { channel, grade }: { channel: number | null; grade: Grade },
): { asked: Asked | undefined; wrong: Readonly<Record<string, string>> } {
  const typed = typedRotors(choice.rotors);
  if ("wrong" in typed) return { asked: undefined, wrong: typed.wrong };
  const { positionId, backgroundId } = choice;
  const { rotors } = typed;
  const background = items.find((each) => each.id === backgroundId)?.given?.background ?? null;
  const order = { purpose: "run" as const, channel, calibration: level.read, background, rotors, grade };
  const sentRotors = rotors && { ...rotors, blades: [...rotors.blades], rpm: [...rotors.rpm] };
  const toSend = {
    ...{ purpose: "run" as const, runId: run.id, positionId, channel, calibration: level.sent, rotors: sentRotors },
    backgroundId: backgroundId === "" ? null : backgroundId,
  };
  return { asked: { order, toSend }, wrong: {} };
}
