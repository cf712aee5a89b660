"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { ActForm } from "@/components/ui/act/act-form";
import type { ActField, ActValues } from "@/components/ui/act/act-values";
import { Select } from "@/components/ui/field";
import { Progress } from "@/components/ui/progress";
import type { RotorTraits } from "@/lib/client/fit/messages";
import { forgetKeptModel } from "@/lib/client/fit/kept-model";
import { useCarrying } from "@/lib/client/fit/use-carrying";
import type { CarryChoices, CarryDesign } from "@/lib/contracts/carry";
import { licences, materials } from "@/lib/contracts/own-designs";
import { formatBytes } from "@/lib/format/bytes";

const NEW = "";
const options = (values: readonly string[]) => values.map((value) => ({ value, label: value }));

const nameField: ActField = {
  name: "name",
  label: "Name of the design",
  hint: "Its address is made of it and stays for ever.",
};

function revisionFields(choices: CarryChoices, frameKey: string, rotors: number): ActField[] {
  const frames = choices.frames.map(({ id, key }) => ({ value: id, label: key }));
  return [
    {
      name: "frameId",
      label: "Frame",
      kind: "choice",
      options: frames,
      defaultValue: choices.frames.find(({ key }) => key === frameKey)?.id ?? frames[0]?.value ?? "",
    },
    { name: "material", label: "Material", kind: "choice", options: options(materials) },
    { name: "licence", label: "Licence", kind: "choice", options: options(licences), defaultValue: "CC-BY-4.0" },
    ...(rotors > 1 ? [{ name: "counterRotating", label: "Counter-rotating", kind: "tick" as const }] : []),
  ];
}

/** The next revision as far as it must be declared; the rest is read from the file and confirmed on its page. */
const bodyOf = ({ frameId, material, licence, counterRotating }: ActValues, rotors: readonly RotorTraits[]) => ({
  licence,
  traits: {
    ...{ frameId, material, counterRotating: counterRotating === true },
    rotors: rotors.map(({ blades, hand, shroud }) => ({ blades, hand, shroud })),
  },
});

const named = ({ name, letter, draft }: CarryDesign) =>
  `${name}: ${draft ? `draft ${letter}` : `a new revision ${letter}`}`;

export type CarryFormProps = {
  model: { file: File; mmPerUnit: number };
  rotors: readonly RotorTraits[];
  frameKey: string;
  choices: CarryChoices;
};

/** Sends the model into a draft of one's own, and goes on to it: only from here on does anything leave the browser. */
export function CarryForm({ model, rotors, frameKey, choices }: CarryFormProps) {
  const router = useRouter();
  const [slug, setSlug] = useState(NEW);
  const { work, sent, cancel } = useCarrying();
  const chosen = choices.designs.find((design) => design.slug === slug);
  const fields = chosen?.draft ? [] : revisionFields(choices, frameKey, rotors.length);
  const { file } = model;
  return (
    <div className="grid gap-4">
      <Select
        label="Into which design"
        value={slug}
        onChange={(event) => setSlug(event.target.value)}
        options={[
          { value: NEW, label: "a new design" },
          ...choices.designs.map((design) => ({ value: design.slug, label: named(design) })),
        ]}
      />
      <ActForm
        key={slug}
        label="Carry the model into a draft"
        fields={chosen ? fields : [nameField, ...fields]}
        work={{
          isPending: work.isPending || work.isSuccess,
          error: work.error && {
            detail: work.error.detail,
            fields: work.error.fields.map(({ path, message }) => ({ path: path.replace(/^traits\./, ""), message })),
          },
          mutate: (values, { onSuccess }) =>
            work.mutate(
              {
                ...model,
                design: chosen ? { slug: chosen.slug } : { name: String(values["name"]) },
                revision: chosen?.draft ? { letter: chosen.letter } : { body: bodyOf(values, rotors) },
              },
              {
                onSuccess: (made) => {
                  onSuccess();
                  void forgetKeptModel();
                  router.push(`/my/designs/${made.slug}/revisions/${made.letter}`);
                },
              },
            ),
        }}
        words={`Send ${file.name} into ${chosen?.draft ? "the draft" : "a draft"}`}
        busyWords="Sending …"
      >
        <p className="small-print">
          {formatBytes(file.size)} leave this browser when you press. Owners and the bench see a draft, nobody else; the
          traits that the server reads wait there for your confirmation. Nothing is sent in yet.
        </p>
      </ActForm>
      {sent ? (
        <Progress
          label={`Sending ${file.name}`}
          done={sent.done}
          of={sent.of}
          words={`${formatBytes(sent.done)} of ${formatBytes(sent.of)} sent`}
          onCancel={cancel}
        />
      ) : null}
    </div>
  );
}
