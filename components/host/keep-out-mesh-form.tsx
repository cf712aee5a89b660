"use client";

import { useRouter } from "next/navigation";
import { useState, type FormEvent } from "react";
import { Button } from "@/components/ui/button";
import { Field, FieldFrame, Select, useFieldIds } from "@/components/ui/field";
import { Notice } from "@/components/ui/notice";
import { useAddKeepOutMesh } from "@/lib/client/host";
import { keepOutFileMaxBytes, keepOutUnits, type KeepOutUnit } from "@/lib/contracts/keep-outs";

const units: Record<KeepOutUnit, string> = {
  mm: "Millimetres",
  cm: "Centimetres",
  m: "Metres",
  in: "Inches",
  file: "The one that a 3MF names itself",
};
const isUnit = (text: string): text is KeepOutUnit => text in keepOutUnits;

type Problems = Partial<Record<"name" | "unit" | "file", string>>;

/** Adds a solid by its model file in cooler coordinates; its unit is asked for and never guessed. */
export function AddKeepOutMeshForm({ benchVersionId }: { benchVersionId: string }) {
  const router = useRouter();
  const add = useAddKeepOutMesh(benchVersionId);
  const [problems, setProblems] = useState<Problems>({});
  const submit = (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    if (add.isPending) return;
    const data = new FormData(event.currentTarget);
    const text = (name: string) => String(data.get(name) ?? "").trim();
    const [name, unit, file] = [text("name"), text("unit"), data.get("file")];
    const chosen = file instanceof File && file.name !== "" ? file : undefined;
    setProblems({
      ...(name === "" && { name: "Fill this in." }),
      ...(!isUnit(unit) && { unit: "Say which unit it was drawn in." }),
      ...(!chosen && { file: "Choose a file." }),
    });
    if (name === "" || !isUnit(unit) || !chosen) return;
    add.mutate({ file: chosen, query: { name, note: text("note"), unit } }, { onSuccess: () => router.refresh() });
  };
  const told = (path: keyof Problems | "note") =>
    (path === "note" ? undefined : problems[path]) ?? add.error?.field(path);
  const fileWords = {
    label: "Model file",
    hint: `STL or 3MF up to ${keepOutFileMaxBytes / 1_000_000} MB and 200,000 triangles, drawn in cooler coordinates.`,
    error: told("file"),
  };
  const fileIds = useFieldIds(fileWords);
  return (
    <form aria-label="Add a mesh" onSubmit={submit} noValidate method="post" className="grid max-w-4xl gap-4">
      <div className="grid items-start gap-x-8 gap-y-4 sm:grid-cols-2">
        <Field name="name" label="Name of the solid" error={told("name")} required />
        <Field name="note" label="Note to the solid" error={told("note")} />
        <FieldFrame id={fileIds.id} {...fileWords}>
          <input {...fileIds} type="file" name="file" accept=".stl,.3mf" required className="max-w-full" />
        </FieldFrame>
        <Select
          name="unit"
          label="Unit of the file"
          defaultValue=""
          error={told("unit")}
          required
          options={[{ value: "", label: "–" }, ...Object.entries(units).map(([value, label]) => ({ value, label }))]}
        />
      </div>
      {add.error && add.error.fields.length === 0 ? (
        <Notice kind="wrong" title="not done" live="alert">
          <p>{add.error.detail}</p>
        </Notice>
      ) : null}
      <p className="flex flex-wrap items-center gap-3">
        <Button type="submit" kind="solid" busy={add.isPending} busyWords="Sending and reading …">
          Add the mesh
        </Button>
        <span role="status">
          {add.isSuccess ? "Added: see above how far it reaches, and take it off again if that is wrong." : null}
        </span>
      </p>
    </form>
  );
}
