import clsx from "clsx";
import { formatMeasured } from "@/lib/format/measured";
import { Missing } from "./missing";

export type ValueProps = {
  /** Undefined or null: the value is missing, and `why` is said. */
  value: number | undefined | null;
  /** Expanded uncertainty, same unit. Rounds the value with it. */
  uncertainty?: number | undefined | null;
  /** Decimals at most (and without an uncertainty exactly). */
  decimals?: number;
  unit?: string;
  /** A difference: its sign is always shown. */
  signed?: boolean;
  /** "≤" before a value that is an upper bound. */
  bound?: "upper";
  why?: string;
  className?: string;
};

/** A measured value with its uncertainty, rounded together; or an en dash with the reason. */
export function Value(props: ValueProps) {
  const { value, uncertainty, decimals = 1, unit, signed, bound, why = "not measured", className } = props;
  if (value === undefined || value === null || !Number.isFinite(value)) return <Missing why={why} />;
  const text = formatMeasured({ value, uncertainty: uncertainty ?? undefined, decimals, signed });
  return (
    <span className={clsx("value", className)}>
      {bound === "upper" ? <span aria-label="at most">≤ </span> : null}
      {text.value}
      {text.uncertainty === undefined ? null : <span className="value-plus-minus"> ±{text.uncertainty}</span>}
      {unit ? ` ${unit}` : null}
    </span>
  );
}
