"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import { useConfirmTraits } from "@/lib/client/uploads";
import { rotorTraitNames, wholeTraitNames, type RevisionFiles, type TraitLine } from "@/lib/contracts/revision-files";
import { TraitRow, type TraitDraft } from "./trait-row";
import { rotorWords, textOf, typedValue, wholeWords, type TraitWords } from "./trait-words";

interface Row {
  path: string;
  words: TraitWords;
  line: TraitLine;
}

const nothing: TraitLine = { read: null, declared: null, holds: null };

function rowsOf({ whole, rotors }: RevisionFiles): { title: string; rows: Row[] }[] {
  return [
    ...rotors.map(({ position, seen, traits }, n) => ({
      title: `Rotor ${position}${seen ? "" : ", not seen in the file"}`,
      rows: rotorTraitNames.map((name) => ({
        path: `rotors[${n}].${name}`,
        words: rotorWords[name],
        line: traits[name] ?? nothing,
      })),
    })),
    {
      title: "The whole",
      rows: wholeTraitNames.map((name) => ({
        path: `whole.${name}`,
        words: wholeWords[name],
        line: whole[name] ?? nothing,
      })),
    },
  ];
}

/** What was read is offered; what a person confirmed otherwise before keeps its place. */
const firstDraft = ({ line: { read, declared, holds } }: Row): TraitDraft => ({
  from: read === null || holds === "declared" ? "declared" : "read",
  text: textOf(declared ?? read),
});

/** Confirms or overrides each trait: what the mesh tells beside what is declared. */
export function TraitConfirmation({ slug, revision }: { slug: string; revision: RevisionFiles }) {
  const { reading, rotors } = revision;
  const [drafts, setDrafts] = useState<Record<string, TraitDraft>>({});
  const [faults, setFaults] = useState<Record<string, string>>({});
  const confirm = useConfirmTraits(slug, revision.letter);
  const groups = rowsOf(revision);
  const draftOf = (row: Row) => drafts[row.path] ?? firstDraft(row);
  if (!reading) return <p>No model was measured yet: the traits hold as declared.</p>;

  const press = () => {
    const wrong: Record<string, string> = {};
    const choices = new Map<string, unknown>();
    for (const row of groups.flatMap((group) => group.rows)) {
      const { from, text } = draftOf(row);
      const value = from === "read" ? undefined : typedValue(text, row.words);
      if (from === "declared" && value === undefined) wrong[row.path] = "is no number";
      choices.set(row.path, from === "read" ? { from } : { from, value });
    }
    setFaults(wrong);
    if (Object.keys(wrong).length > 0) return;
    confirm.mutate({
      attachmentId: reading.attachmentId,
      whole: Object.fromEntries(wholeTraitNames.map((name) => [name, choices.get(`whole.${name}`)])),
      rotors: rotors.map((_, n) =>
        Object.fromEntries(rotorTraitNames.map((name) => [name, choices.get(`rotors[${n}].${name}`)])),
      ),
    });
  };
  const errorOf = (path: string) => faults[path] ?? confirm.error?.field(path) ?? confirm.error?.field(`${path}.value`);

  return (
    <div className="grid gap-5">
      {groups.map(({ title, rows }) => (
        <table key={title} className="w-full max-w-3xl">
          <caption className="field-label text-left">{title}</caption>
          <thead>
            <tr className="text-left">
              <th scope="col">Trait</th>
              <th scope="col">Read from the mesh</th>
              <th scope="col">Declared</th>
            </tr>
          </thead>
          <tbody>
            {rows.map((row) => (
              <TraitRow
                key={row.path}
                name={row.path}
                words={row.words}
                line={row.line}
                draft={draftOf(row)}
                error={errorOf(row.path)}
                onChange={(draft) => setDrafts((all) => ({ ...all, [row.path]: draft }))}
              />
            ))}
          </tbody>
        </table>
      ))}
      {confirm.error ? (
        <Notice kind="wrong" live="alert">
          <p>{confirm.error.detail}</p>
        </Notice>
      ) : null}
      <div className="flex items-center gap-4">
        <Button kind="solid" busy={confirm.isPending} busyWords="Confirming …" onClick={press}>
          Confirm these traits
        </Button>
        {confirm.isSuccess ? <p role="status">Confirmed: they hold for this revision.</p> : null}
      </div>
    </div>
  );
}
