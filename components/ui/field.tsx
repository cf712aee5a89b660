"use client";

import clsx from "clsx";
import {
  useId,
  type InputHTMLAttributes,
  type ReactNode,
  type SelectHTMLAttributes,
  type TextareaHTMLAttributes,
} from "react";

export type FieldWords = {
  label: ReactNode;
  /** Stands inside the field's end. */
  unit?: ReactNode;
  hint?: ReactNode;
  /** What is wrong, where, and what to do; the typing is kept. */
  error?: ReactNode;
};

export type FieldIds = { id: string; "aria-describedby": string | undefined; "aria-invalid": true | undefined };

/** Ids that tie a control to its hint and error. */
export function useFieldIds(words: Pick<FieldWords, "hint" | "error">, given?: string): FieldIds {
  const made = useId();
  const id = given ?? made;
  const described = [words.hint ? `${id}-hint` : null, words.error ? `${id}-error` : null].filter(Boolean).join(" ");
  return { id, "aria-describedby": described || undefined, "aria-invalid": words.error ? true : undefined };
}

/** Label above, control on its blank, hint and error below. */
export function FieldFrame({
  id,
  label,
  hint,
  error,
  className,
  children,
}: FieldWords & { id: string; className?: string; children: ReactNode }) {
  return (
    <div className={clsx("field", className)}>
      <label className="field-label" htmlFor={id}>
        {label}
      </label>
      {children}
      {hint ? (
        <p className="field-hint" id={`${id}-hint`}>
          {hint}
        </p>
      ) : null}
      {/* Always there, so that a new error is read out when it comes. */}
      <p className="field-error empty:hidden" id={`${id}-error`} role="status">
        {error}
      </p>
    </div>
  );
}

export type FieldProps = FieldWords & InputHTMLAttributes<HTMLInputElement> & { figures?: boolean };

/** One line to fill in. */
export function Field({ label, unit, hint, error, figures, className, id, ...input }: FieldProps) {
  const ids = useFieldIds({ hint, error }, id);
  return (
    <FieldFrame id={ids.id} label={label} hint={hint} error={error} className={className}>
      <span className={clsx("blank", figures && "blank-figures")}>
        <input type="text" {...input} {...ids} />
        {unit ? <span className="blank-unit">{unit}</span> : null}
      </span>
    </FieldFrame>
  );
}

export type SelectProps = FieldWords &
  SelectHTMLAttributes<HTMLSelectElement> & {
    options: readonly { value: string; label: string; disabled?: boolean }[];
  };

/** One of a list, where slots would be too many. */
export function Select({ label, unit, hint, error, options, className, id, ...select }: SelectProps) {
  const ids = useFieldIds({ hint, error }, id);
  return (
    <FieldFrame id={ids.id} label={label} hint={hint} error={error} className={className}>
      <span className="blank">
        <select {...select} {...ids}>
          {options.map((option) => (
            <option key={option.value} value={option.value} disabled={option.disabled}>
              {option.label}
            </option>
          ))}
        </select>
        {unit ? <span className="blank-unit">{unit}</span> : null}
      </span>
    </FieldFrame>
  );
}

export type TextAreaProps = Omit<FieldWords, "unit"> & TextareaHTMLAttributes<HTMLTextAreaElement>;

/** Several lines to fill in. */
export function TextArea({ label, hint, error, className, id, rows = 4, ...area }: TextAreaProps) {
  const ids = useFieldIds({ hint, error }, id);
  return (
    <FieldFrame id={ids.id} label={label} hint={hint} error={error} className={className}>
      <span className="blank">
        <textarea rows={rows} {...area} {...ids} />
      </span>
    </FieldFrame>
  );
}
