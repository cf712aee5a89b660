import { formatNumber, roundTo } from "./numbers";

export type Measured = {
  value: number;
  /** Standard or expanded uncertainty, same unit, zero or more. */
  uncertainty?: number;
  /** Decimals at most; without an uncertainty, exactly these (1 when not given). */
  decimals?: number;
  signed?: boolean;
  /** Significant digits of the uncertainty at most. */
  digits?: 1 | 2;
};

export type MeasuredText = { value: string; uncertainty: string | undefined };

/** Decimal places that leave `digits` significant digits of a positive number, after rounding (9.96 → 10, no decimals). */
export function decimalsForDigits(uncertainty: number, digits: number): number {
  const decimals = digits - 1 - Math.floor(Math.log10(uncertainty));
  const rounded = roundTo(uncertainty, decimals);
  return digits - 1 - Math.floor(Math.log10(rounded));
}

/**
 * Value and uncertainty rounded together: at most two significant digits of u, and the value to the same place
 * (JCGM 100:2008 (GUM), 7.2.6). `decimals` may shorten this further, but never until a real uncertainty reads ±0.
 * Without an uncertainty `uncertainty` is undefined. Throws a RangeError on a value that is not finite, or u < 0.
 */
export function formatMeasured({ value, uncertainty, decimals, signed, digits = 2 }: Measured): MeasuredText {
  if (uncertainty === undefined) {
    return { value: formatNumber(value, { decimals: decimals ?? 1, signed }), uncertainty: undefined };
  }
  if (!Number.isFinite(uncertainty) || uncertainty < 0)
    throw new RangeError("An uncertainty is finite and not below 0");
  let places = decimals ?? 1;
  if (uncertainty > 0) {
    const wanted = decimalsForDigits(uncertainty, digits);
    places = Math.min(decimals ?? wanted, wanted);
    if (roundTo(uncertainty, places) === 0) places = decimalsForDigits(uncertainty, 1);
  }
  return {
    value: formatNumber(value, { decimals: places, signed }),
    uncertainty: formatNumber(uncertainty, { decimals: places }),
  };
}

/** "−2.4 ±0.8 K": one string for titles, captions and those who hear the page. Same rules as formatMeasured. */
export function writeMeasured(measured: Measured, unit?: string): string {
  const text = formatMeasured(measured);
  const plusMinus = text.uncertainty === undefined ? "" : ` ±${text.uncertainty}`;
  return `${text.value}${plusMinus}${unit ? ` ${unit}` : ""}`;
}
