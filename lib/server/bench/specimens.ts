import { appDb } from "@/db/client/handles";
import { queueRow } from "@/db/queries/bench-queue";
import { hasRuns, insertSpecimen, specimenById, topSpeeds, updatePart } from "@/db/queries/bench-specimens";
import { seasonsOfRevision } from "@/db/queries/bench-specimens";
import type { NewSpecimen, PartRecord } from "@/lib/contracts/bench-prints";
import { spinUpItems } from "@/lib/domain/bench/cautions";
import { ExpectedError, type FieldProblem } from "@/lib/domain/expected-error";
import { note, type Asked } from "../audit/audit";
import { demand } from "../permission";

/** Records a printed copy of an entry that is being printed, with a part for each of its rotors. */
export async function addSpecimen(
  asked: Asked,
  { entryId, ...specimen }: NewSpecimen,
  at: Date,
): Promise<{ specimenId: string; number: number }> {
  const { actor } = asked;
  demand(actor, "print.work");
  return appDb().transaction(async (tx) => {
    const row = await queueRow(tx, { entryId, lock: true });
    if (!row) throw new ExpectedError("not_found", "There is no such entry.");
    if (row.state !== "printing") {
      throw new ExpectedError("moved_on", `The entry is ${row.state.replaceAll("_", " ")}, not printing.`);
    }
    const { revisionId, rotors } = row;
    const made = await insertSpecimen(tx, { revisionId, rotors, specimen, printedBy: actor.personId, at });
    await note(tx, asked, {
      action: "specimen.add",
      subjectKind: "specimen",
      subjectId: made.specimenId,
      after: { entryId },
    });
    return made;
  });
}

/**
 * Records mass, balance and spin-up of one rotor of a copy. A part passes at or above the season's highest set speed,
 * with the record of it and every caution ticked; one that has run is only written off.
 * @throws ExpectedError malformed naming what a passed part lacks; moved_on
 */
export async function recordPart(
  asked: Asked,
  { specimenId, rotorPosition, at, ...part }: { specimenId: string; rotorPosition: number; at: Date } & PartRecord,
): Promise<void> {
  const { actor } = asked;
  demand(actor, "print.work");
  await appDb().transaction(async (tx) => {
    const specimen = await specimenById(tx, { specimenId });
    const before = specimen?.parts.find((each) => each.rotorPosition === rotorPosition);
    if (!specimen || !before) throw new ExpectedError("not_found", "There is no such rotor of that copy.");
    if (part.state !== "written_off" && (await hasRuns(tx, { specimenId }))) {
      throw new ExpectedError("moved_on", "This copy has run at the bench: its record stays, or it is written off.");
    }
    const seasonIds = await seasonsOfRevision(tx, { revisionId: specimen.revisionId });
    const speeds = await topSpeeds(tx, { seasonIds });
    const fields = part.state === "passed" ? passedLacks(part, Math.max(0, ...speeds.values())) : [];
    if (fields.length > 0) throw new ExpectedError("malformed", "The part can't pass like this.", fields);
    const { massG = null, spinUpSpeedRpm = null, balanceRecord, spinUpRecord, state } = part;
    await updatePart(tx, {
      specimenId,
      rotorPosition,
      part: { massG, balanceRecord, spinUpSpeedRpm, spinUpRecord, state },
      spunUpBy: actor.personId,
      at,
    });
    await note(tx, asked, {
      action: `part.${state}`,
      subjectKind: "specimen",
      subjectId: specimenId,
      before: before.state,
      after: { rotorPosition, state, spinUpSpeedRpm },
    });
  });
}

function passedLacks(part: PartRecord, topSpeedRpm: number): FieldProblem[] {
  const missing = { message: "is missing" };
  const speed = part.spinUpSpeedRpm ?? 0;
  return [
    ...(part.massG ? [] : [{ path: "massG", ...missing }]),
    ...(part.balanceRecord === "" ? [{ path: "balanceRecord", ...missing }] : []),
    ...(speed > 0 && speed >= topSpeedRpm
      ? []
      : [{ path: "spinUpSpeedRpm", message: `is not at or above the highest set speed, ${topSpeedRpm} rpm` }]),
    ...(part.spinUpRecord === "" ? [{ path: "spinUpRecord", ...missing }] : []),
    ...Object.keys(spinUpItems)
      .filter((key) => part.cautions[key] !== true)
      .map((key) => ({ path: `cautions.${key}`, message: "is not ticked" })),
  ];
}
