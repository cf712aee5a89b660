"use client";

import { useState, useSyncExternalStore, type ReactNode } from "react";
import { roundTo } from "@/lib/format/numbers";
import { parseTypedNumber } from "@/lib/format/typed-number";
import { convertUnit } from "@/lib/format/units";
import { FieldFrame, useFieldIds } from "./field";

export type NumberFieldProps = {
  label: ReactNode;
  name?: string;
  /** The unit that is stored and handed out. */
  unit: string;
  /** Other units of the same kind to type in; what is stored doesn't change with them. */
  otherUnits?: readonly string[];
  defaultValue?: number;
  /** Called with the value in `unit`, or undefined while there is none that can be read. */
  onValue?: (value: number | undefined) => void;
  min?: number;
  max?: number;
  required?: boolean;
  disabled?: boolean;
  hint?: ReactNode;
  /** From the server; what the field finds itself comes first. */
  error?: ReactNode;
  className?: string;
};

const never = () => () => undefined;
const write = (value: number | undefined) => (value === undefined ? "" : String(roundTo(value, 6)));

/** A reading to type: "54,3" and "54.3 °C" are understood, and checked gently, when one leaves the field. */
export function NumberField(props: NumberFieldProps) {
  const { label, name, unit, otherUnits, defaultValue, onValue, min, max, required, disabled, hint, className } = props;
  const live = useSyncExternalStore(
    never,
    () => true,
    () => false,
  );
  const [shownUnit, setShownUnit] = useState(unit);
  const [text, setText] = useState(write(defaultValue));
  const [checked, setChecked] = useState(false);

  const read = (typed: string, inUnit: string): { value?: number; why?: string } => {
    if (typed.trim() === "") return required ? { why: "Fill this in." } : {};
    const answer = parseTypedNumber(typed, inUnit);
    if (answer.value === undefined) return { why: answer.why };
    const value = roundTo(convertUnit(answer.value, inUnit, unit), 9);
    const limit = (bound: number) => `${roundTo(convertUnit(bound, unit, inUnit), 3)} ${inUnit}`;
    if (min !== undefined && value < min) return { value, why: `Below ${limit(min)}, the least this can be.` };
    if (max !== undefined && value > max) return { value, why: `Above ${limit(max)}, the most this can be.` };
    return { value };
  };

  const now = read(text, shownUnit);
  const error = (checked && now.why) || props.error;
  const ids = useFieldIds({ hint, error });

  const type = (typed: string) => {
    setText(typed);
    const next = read(typed, shownUnit);
    if (next.why === undefined) setChecked(false);
    onValue?.(next.why === undefined ? next.value : undefined);
  };
  const switchUnit = (to: string) => {
    if (now.value !== undefined) setText(write(convertUnit(now.value, unit, to)));
    setShownUnit(to);
  };

  return (
    <FieldFrame id={ids.id} label={label} hint={hint} error={error} className={className}>
      <span className="blank blank-figures">
        <input
          {...ids}
          // Without scripts the typing itself is sent, and the server reads it by the same rules.
          name={live ? undefined : name}
          inputMode="decimal"
          autoComplete="off"
          type="text"
          value={text}
          required={required}
          disabled={disabled}
          onChange={(event) => type(event.target.value)}
          onBlur={() => setChecked(true)}
        />
        {otherUnits && otherUnits.length > 0 ? (
          <select
            aria-label="Unit"
            className="unit-choice"
            value={shownUnit}
            disabled={disabled}
            onChange={(event) => switchUnit(event.target.value)}
          >
            {[unit, ...otherUnits].map((each) => (
              <option key={each}>{each}</option>
            ))}
          </select>
        ) : (
          <span className="blank-unit">{unit}</span>
        )}
      </span>
      {live && name ? (
        <input type="hidden" name={name} value={now.value === undefined ? text : String(now.value)} />
      ) : null}
    </FieldFrame>
  );
}
