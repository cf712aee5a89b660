import clsx from "clsx";
import type { InputHTMLAttributes, ReactNode } from "react";

export type SlotProps = Omit<InputHTMLAttributes<HTMLInputElement>, "type"> & {
  type?: "checkbox" | "radio";
  label: ReactNode;
  /** How many there are of it, said after the label. */
  count?: number;
  /** What the count counts, for those who hear it: "designs". */
  countOf?: string;
  /** Only heard: for a slot in a table's first column. */
  hideLabel?: boolean;
};

/** A punched slot, upright, filled when chosen; the input itself is a real checkbox or radio. */
export function Slot({ type = "checkbox", label, count, countOf, hideLabel, className, ...input }: SlotProps) {
  return (
    <label className={clsx("slot", className)}>
      <input {...input} type={type} />
      <span className={hideLabel ? "sr-only" : undefined}>{label}</span>
      {count === undefined ? null : (
        <span className="slot-count">
          {count}
          {countOf ? <span className="sr-only"> {countOf}</span> : null}
        </span>
      )}
    </label>
  );
}

export type SlotGroupProps = {
  legend: ReactNode;
  hideLegend?: boolean;
  hint?: ReactNode;
  error?: ReactNode;
  /** Side by side or one under the other. */
  flow?: "row" | "column";
  children: ReactNode;
};

/** Slots that answer one question. */
export function SlotGroup({ legend, hideLegend, hint, error, flow = "row", children }: SlotGroupProps) {
  return (
    <fieldset className="min-w-0">
      <legend className={hideLegend ? "sr-only" : "field-label mb-1"}>{legend}</legend>
      {hint ? <p className="field-hint">{hint}</p> : null}
      <div className={clsx("flex flex-wrap gap-x-7 gap-y-1", flow === "column" && "flex-col")}>{children}</div>
      {error ? <p className="field-error">{error}</p> : null}
    </fieldset>
  );
}
