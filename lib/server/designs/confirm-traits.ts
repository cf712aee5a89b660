import { appDb } from "@/db/client/handles";
import { keepTraits, type TraitsToKeep, type Values } from "@/db/queries/revision-traits";
import { rotorTraitNames, wholeTraitNames, type ConfirmTraits } from "@/lib/contracts/revision-files";
import { ExpectedError, type FieldProblem } from "@/lib/domain/expected-error";
import { note, type Asked } from "../audit/audit";
import { findOwnRevision, readingFor, traitKeyOf, type RevisionName } from "./revision-files";

type Choices = Record<string, { from: "read" } | { from: "declared"; value: Values[string] }>;

/**
 * Keeps which value of each trait holds: the one read from the file named, or the one a person declares. What was read
 * comes from the stored reading, never from the request.
 * @throws ExpectedError not_found; moved_on once sent in, or when another file was read meanwhile; malformed by fields
 */
export async function confirmRevisionTraits(asked: Asked, name: RevisionName, input: ConfirmTraits): Promise<void> {
  await appDb().transaction(async (tx) => {
    const revision = await findOwnRevision(tx, asked.actor, name, true);
    if (revision.sentIn)
      throw new ExpectedError("moved_on", "The revision was sent in: other traits are a new revision.");
    const reading = await readingFor(tx, revision);
    if (reading?.attachmentId !== input.attachmentId) {
      throw new ExpectedError("moved_on", "Another file was read meanwhile. Look at its values, then confirm again.");
    }
    const faults: FieldProblem[] = [];
    const { rotors: seen, ...seenOfWhole } = reading.traits;
    const before = { ...revision.whole.declared };
    const whole = settle(wholeTraitNames, input.whole, { ...seenOfWhole }, before, "whole", faults);
    const rotors = input.rotors.map((choices, n) => {
      const read: Values = { ...seen[n] };
      return settle(rotorTraitNames, choices, read, revision.rotors[n]?.declared ?? {}, `rotors[${n}]`, faults);
    });
    for (const [n, { held }] of rotors.entries()) {
      const { hubDiameterMm: hub, tipDiameterMm: tip } = held;
      if (typeof hub === "number" && typeof tip === "number" && hub >= tip)
        faults.push({ path: `rotors[${n}].hubDiameterMm`, message: "is no smaller than the tip's" });
    }
    const kind = whole.held.inletStack ?? revision.whole.inletStack;
    const lengthMm = whole.held.inletStackMm ?? revision.whole.inletStackMm;
    if ((kind === "none") !== (lengthMm === 0))
      faults.push({ path: "whole.inletStackMm", message: "is 0 without an inlet stack, and above 0 with one" });
    if (faults.length > 0) throw new ExpectedError("malformed", "Some traits can't hold as confirmed.", faults);
    await keepTraits(tx, { revisionId: revision.revisionId, whole, rotors });
    const { revisionId: subjectId } = revision;
    await note(tx, asked, { action: "revision.traits", subjectKind: "revision", subjectId, after: whole.holds });
  });
}

function settle(
  names: readonly string[],
  choices: Choices,
  read: Values,
  declaredBefore: Values,
  path: string,
  faults: FieldProblem[],
): TraitsToKeep {
  const kept: TraitsToKeep = { held: {}, read: {}, declared: { ...declaredBefore }, holds: {} };
  for (const name of names) {
    const choice = choices[name];
    const seen = read[name] ?? null;
    if (seen !== null) kept.read[name] = seen;
    if (!choice) continue;
    if (choice.from === "read" && seen === null)
      faults.push({ path: `${path}.${name}`, message: "was not read from the file" });
    if (choice.from === "declared") kept.declared[name] = choice.value;
    kept.held[name] = choice.from === "read" ? seen : choice.value;
    kept.holds[traitKeyOf(name)] = choice.from;
  }
  return kept;
}
