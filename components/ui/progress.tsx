"use client";

import { useId } from "react";
import { Button } from "./button";

export type ProgressProps = {
  label: string;
  /** Done and whole, in the same unit; without a whole the bar only says that it is at work. */
  done: number;
  of?: number;
  /** What is counted, written out: "3.1 of 12 MB sent". */
  words: string;
  onCancel?: () => void;
  cancelWords?: string;
};

/** Progress that is true: it counts what was done, never time. */
export function Progress({ label, done, of, words, onCancel, cancelWords = "Cancel" }: ProgressProps) {
  const id = useId();
  return (
    <div className="grid max-w-xl gap-1">
      <div className="flex items-baseline justify-between gap-4">
        <label className="field-label" htmlFor={id}>
          {label}
        </label>
        <span className="docket" role="status">
          {words}
        </span>
      </div>
      <div className="flex items-center gap-3">
        <progress className="progress" id={id} max={of} value={of === undefined ? undefined : done} />
        {onCancel ? (
          <Button small onClick={onCancel}>
            {cancelWords}
          </Button>
        ) : null}
      </div>
    </div>
  );
}
