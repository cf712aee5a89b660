"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { ActForm } from "@/components/ui/act/act-form";
import { Select } from "@/components/ui/field";
import { useAddRevision } from "@/lib/client/own-designs";
import type { OwnChoices } from "@/lib/contracts/own-designs";
import { fieldOf, revisionBody, revisionFields } from "./revision-body";

const counts = [1, 2, 3, 4];

/** The next revision with what its designer declares of it. */
export function RevisionForm({ slug, letter, frames }: { slug: string; letter: string; frames: OwnChoices["frames"] }) {
  const router = useRouter();
  const [stages, setStages] = useState(1);
  const { mutate, isPending, error } = useAddRevision(slug);
  const told = error && {
    detail: error.detail,
    fields: error.fields.map(({ path, message }) => ({ path: fieldOf(path), message })),
  };
  return (
    <div className="grid gap-4">
      <Select
        label="Stages"
        className="max-w-40"
        value={String(stages)}
        onChange={(event) => setStages(Number(event.currentTarget.value))}
        options={counts.map((count) => ({ value: String(count), label: String(count) }))}
      />
      <ActForm
        label={`Revision ${letter}`}
        wide
        fields={revisionFields(frames, stages)}
        work={{
          isPending,
          error: told,
          mutate: (values, options) => mutate(revisionBody(values, stages), options),
        }}
        words={`Add revision ${letter}`}
        busyWords="Adding …"
        onDone={() => router.refresh()}
      />
    </div>
  );
}
