"use client";

import clsx from "clsx";
import { useState, type FormEvent, type ReactNode } from "react";
import { Button } from "../button";
import type { ButtonKind } from "../button-class";
import { Field, Select, TextArea } from "../field";
import { Notice } from "../notice";
import { Slot } from "../slot";
import { readTyped, type ActField, type ActProblems, type ActValues } from "./act-values";

/** What a mutation of the client gives, as far as a form needs it. */
export type ActWork = {
  mutate: (values: ActValues, options: { onSuccess: () => void }) => void;
  isPending: boolean;
  error: { detail: string; fields: readonly { path: string; message: string }[] } | null;
};

export type ActFormProps = {
  /** The form's name to those who hear the page. */
  label: string;
  fields: readonly ActField[];
  work: ActWork;
  /** What the button says, and what it says while it works. */
  words: string;
  busyWords: string;
  kind?: ButtonKind;
  /** Sent beside what was typed. */
  more?: ActValues;
  /** Two fields abreast where there is room: for long forms. */
  wide?: boolean;
  onDone?: () => void;
  /** Said once it is done. */
  doneWords?: string;
  children?: ReactNode;
};

/**
 * A few fields and one button that says what happens. Typing stays when the answer is no, each field shows what is
 * wrong with it, and a second press while the first is at work does nothing.
 */
export function ActForm(props: ActFormProps) {
  const { label, fields, work, words, busyWords, kind = "solid", more, wide, onDone, doneWords, children } = props;
  const [problems, setProblems] = useState<ActProblems>({});
  const [done, setDone] = useState(false);
  const submit = (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    if (work.isPending) return;
    const data = new FormData(event.currentTarget);
    const typed = Object.fromEntries(fields.map(({ name }) => [name, String(data.get(name) ?? "")]));
    const read = readTyped(fields, typed);
    setProblems(read.problems);
    setDone(false);
    if (Object.keys(read.problems).length > 0) return;
    work.mutate(
      { ...read.values, ...more },
      {
        onSuccess: () => {
          setDone(true);
          onDone?.();
        },
      },
    );
  };
  const told = (name: string) =>
    problems[name] ?? work.error?.fields.find(({ path }) => path.split(/[.[]/)[0] === name)?.message;
  const general = work.error && !work.error.fields.some(({ path }) => fields.some(({ name }) => path.startsWith(name)));
  return (
    <form
      aria-label={label}
      onSubmit={submit}
      noValidate
      method="post"
      className={clsx("grid gap-4", wide ? "max-w-4xl" : "max-w-xl")}
    >
      <div className={wide ? "grid items-start gap-x-8 gap-y-4 sm:grid-cols-2" : "contents"}>
        {fields.map((field) => (
          <OneField key={field.name} field={field} error={told(field.name)} />
        ))}
      </div>
      {children}
      {general ? (
        <Notice kind="wrong" title="not done" live="alert">
          <p>{work.error?.detail}</p>
        </Notice>
      ) : null}
      <p className="flex flex-wrap items-center gap-3">
        <Button type="submit" kind={kind} busy={work.isPending} busyWords={busyWords}>
          {words}
        </Button>
        <span role="status">{done && doneWords ? doneWords : null}</span>
      </p>
    </form>
  );
}

function OneField({ field, error }: { field: ActField; error: string | undefined }) {
  const { name, label, kind, unit, hint, optional, defaultValue, options } = field;
  const shared = { name, label, hint, error, defaultValue, required: !optional };
  if (kind === "area") return <TextArea {...shared} rows={3} />;
  if (kind === "choice") {
    const given = options ?? [];
    return <Select {...shared} options={optional ? [{ value: "", label: "–" }, ...given] : given} />;
  }
  if (kind === "tick") {
    return <Slot name={name} label={label} defaultChecked={defaultValue === "on"} />;
  }
  if (kind === "time") return <Field {...shared} type="datetime-local" />;
  const figures = kind === "number" || kind === "numbers";
  return <Field {...shared} unit={unit} figures={figures} inputMode={kind === "number" ? "decimal" : undefined} />;
}
