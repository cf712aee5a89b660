"use client";

import { useState, type FormEvent, type InputHTMLAttributes, type ReactNode } from "react";
import { Button } from "@/components/ui/button";
import type { ButtonKind } from "@/components/ui/button-class";
import { Field } from "@/components/ui/field";
import { Notice } from "@/components/ui/notice";
import type { FormMutation, Typed } from "@/lib/client/accounts";

export type ActField = {
  name: string;
  label: string;
  hint?: string;
} & Pick<InputHTMLAttributes<HTMLInputElement>, "type" | "autoComplete" | "defaultValue" | "maxLength" | "inputMode">;

export type ActFormProps = {
  fields: readonly ActField[];
  mutation: FormMutation;
  /** What the button says, and what it says while it works. */
  words: string;
  busyWords: string;
  kind?: ButtonKind;
  /** Stands in the form's place once it is done. */
  done?: ReactNode;
  onDone?: (typed: Typed) => void;
  children?: ReactNode;
};

/**
 * A few fields and one button that says what happens. What was typed stays when the answer is no, each field shows what
 * is wrong with it, and a second press while the first is at work does nothing.
 */
export function ActForm({ fields, mutation, words, busyWords, kind = "solid", done, onDone, children }: ActFormProps) {
  const [finished, setFinished] = useState(false);
  const submit = (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    if (mutation.isPending) return;
    const data = new FormData(event.currentTarget);
    const typed = Object.fromEntries(fields.map(({ name }) => [name, String(data.get(name) ?? "")]));
    mutation.mutate(typed, {
      onSuccess: () => {
        setFinished(true);
        onDone?.(typed);
      },
    });
  };
  if (finished && done) return <div role="status">{done}</div>;
  const { error } = mutation;
  const known = new Set(fields.map(({ name }) => name));
  const general = error && !error.fields.some(({ path }) => known.has(path)) ? error : null;
  return (
    <form onSubmit={submit} noValidate className="grid max-w-md gap-4" method="post">
      {fields.map((field) => (
        <Field key={field.name} required {...field} error={error?.field(field.name)} />
      ))}
      {general ? (
        <Notice kind="wrong" title="not done" live="alert">
          <p>{general.detail}</p>
          {general.code === "unexpected" && general.requestId ? <p>Request {general.requestId}</p> : null}
        </Notice>
      ) : null}
      {children}
      <p>
        <Button type="submit" kind={kind} busy={mutation.isPending} busyWords={busyWords}>
          {words}
        </Button>
      </p>
    </form>
  );
}
