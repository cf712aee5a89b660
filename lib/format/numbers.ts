/** The true minus sign (U+2212), as wide as a plus; a hyphen is no minus. */
export const minusSign = "\u2212";
/** Narrow no-break space (U+202F), which groups digits by three (ISO 80000-1:2022, 7.3.2). */
export const groupSpace = "\u202f";

export type NumberStyle = {
  /** Digits after the point; negative rounds to tens, hundreds. */
  decimals?: number;
  /** Always show the sign; zero has none. */
  signed?: boolean;
};

/** Rounds half away from zero at a decimal place as written in base ten: 2.675 at 2 gives 2.68; NaN stays NaN. */
export function roundTo(value: number, decimals: number): number {
  if (!Number.isFinite(value)) return value;
  const [digits = "0", exponent = "0"] = Math.abs(value).toExponential().split("e");
  const shifted = Math.round(Number(`${digits}e${Number(exponent) + decimals}`));
  const back = Number(`${shifted}e${-decimals}`);
  return back === 0 ? 0 : Math.sign(value) * back;
}

function grouped(digits: string): string {
  return digits.length < 4 ? digits : digits.replace(/\B(?=(\d{3})+$)/g, groupSpace);
}

/**
 * A finite number for people: point as decimal sign, digits grouped by three, true minus, never "−0".
 * Any unit; `decimals` 0 when not given. Throws a RangeError on NaN or infinity, which no page may print.
 */
export function formatNumber(value: number, { decimals = 0, signed = false }: NumberStyle = {}): string {
  if (!Number.isFinite(value)) throw new RangeError("Only a finite number can be written");
  const rounded = roundTo(value, decimals);
  const [whole = "0", part] = Math.abs(rounded).toFixed(Math.max(0, decimals)).split(".");
  const sign = rounded < 0 ? minusSign : signed && rounded > 0 ? "+" : "";
  return `${sign}${grouped(whole)}${part === undefined ? "" : `.${part}`}`;
}

/** A count: whole, zero or more. Throws a RangeError otherwise. */
export function formatCount(count: number): string {
  if (!Number.isInteger(count) || count < 0) throw new RangeError("A count is whole and not below zero");
  return formatNumber(count);
}

/** A p-value: "= 0.032", "under 0.001"; two figures where that says enough. */
export function formatP(p: number): string {
  return p < 0.001 ? "under 0.001" : `= ${formatNumber(p, { decimals: p < 0.095 ? 3 : 2 })}`;
}
