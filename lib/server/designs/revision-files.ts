import { appDb } from "@/db/client/handles";
import type { Handle } from "@/db/client/connect";
import { filesOfRevision } from "@/db/queries/files";
import { readingOfRevision } from "@/db/queries/mesh-readings";
import { ownRevision, type DraftRevision, type Holds, type Values } from "@/db/queries/revision-traits";
import { meshReadingResult } from "@/lib/contracts/mesh-reading";
import { revisionFiles, rotorTraitNames, type RevisionFiles, type TraitLine } from "@/lib/contracts/revision-files";
import type { Actor } from "@/lib/domain/accounts/actor";
import { traitsRead, type TraitsRead } from "@/lib/domain/designs/read-traits";
import { ExpectedError } from "@/lib/domain/expected-error";
import { printMaterials } from "@/lib/science/mechanics/materials";
import { demand } from "../permission";

export interface RevisionName {
  slug: string;
  letter: string;
}

/** A revision of a design of the actor's own. @throws ExpectedError not_found for another's as for none */
export async function findOwnRevision(
  db: Handle,
  actor: Actor,
  { slug, letter }: RevisionName,
  lock = false,
): Promise<DraftRevision> {
  demand(actor, "design.create");
  const found = await ownRevision(db, { slug, letter, personId: actor.personId, lock });
  if (!found) throw new ExpectedError("not_found", "You own no such revision.");
  return found;
}

/** What the newest model of a revision tells; undefined while none was measured. */
export async function readingFor(db: Handle, revision: DraftRevision) {
  const stored = await readingOfRevision(db, { revisionId: revision.revisionId });
  if (!stored) return undefined;
  const result = meshReadingResult.parse(stored.result);
  const range = printMaterials.find(({ name }) => name === revision.material)?.densityGCm3;
  return { ...stored, result, traits: traitsRead(result, range && (range[0] + range[1]) / 2) };
}

/** A revision's files, and each of its traits as read and as declared. */
export async function readRevisionFiles(actor: Actor, name: RevisionName): Promise<RevisionFiles> {
  const revision = await findOwnRevision(appDb(), actor, name);
  const { revisionId, designName, letter, sentIn } = revision;
  const [files, reading] = await Promise.all([filesOfRevision(appDb(), { revisionId }), readingFor(appDb(), revision)]);
  return revisionFiles.parse({
    ...{ revisionId, designName, letter, sentIn },
    files: files.map(({ attachmentId, role, name: file, bytes, kind, state }) => ({
      ...{ attachmentId, role, name: file, bytes, kind, gone: state === "taken_down" },
    })),
    reading: reading ? readingHead(reading) : null,
    ...traitLines(revision, reading?.traits),
  });
}

function readingHead({
  attachmentId,
  name,
  readerVersion,
  result,
}: NonNullable<Awaited<ReturnType<typeof readingFor>>>) {
  const { unit, triangles, watertight, warnings, rotors } = result;
  const confidence = rotors.length === 0 ? null : Math.min(...rotors.map((rotor) => rotor.confidence));
  const sure = {
    struts: result.strutsConfidence,
    inletStack: result.inletStack?.confidence ?? null,
    spacer: result.spacer?.confidence ?? null,
  };
  return { attachmentId, name, readerVersion, unit, triangles, watertight, confidence, sure, warnings };
}

function traitLines({ whole, rotors }: DraftRevision, read: TraitsRead | undefined) {
  const count = Math.max(rotors.length, read?.rotors.length ?? 0);
  return {
    whole: {
      spacerMm: line("spacerMm", read?.spacerMm, whole.spacerMm, whole),
      struts: line("struts", read?.struts, whole.struts, whole),
      inletStack: line("inletStack", read?.inletStack, whole.inletStack, whole),
      inletStackMm: line("inletStackMm", read?.inletStackMm, whole.inletStackMm, whole),
    },
    rotors: Array.from({ length: count }, (_, n) => {
      const [seen, kept] = [read?.rotors[n], rotors[n]];
      const traits = rotorTraitNames.map((name) => [name, line(name, seen?.[name], kept?.held[name], kept)]);
      return { position: n + 1, seen: seen !== undefined, traits: Object.fromEntries(traits) };
    }),
  };
}

/** Declared is what was declared, else what holds while nothing was read. */
function line(
  name: string,
  read: Values[string] | undefined,
  held: Values[string] | undefined,
  kept: { declared: Values; holds: Holds } | undefined,
): TraitLine {
  const said = kept?.holds[traitKeyOf(name)];
  const holds = said === "read" || said === "declared" ? said : null;
  const declared = kept?.declared[name] ?? (holds === "read" ? undefined : held);
  return { read: read ?? null, declared: declared ?? null, holds };
}

/** The trait's name in the vocabulary, which is what stands in `holds`: `hubDiameterMm` is `hub_diameter`. */
export function traitKeyOf(name: string): string {
  if (name === "inletStackMm") return "inlet_stack_length";
  return name.replace(/(Mm|Deg|G)$/, "").replace(/[A-Z]/g, (letter) => `_${letter.toLowerCase()}`);
}
