/** Units that a person can name for a file that has none. */
export const lengthUnits = ["mm", "cm", "m", "in"] as const;
export type LengthUnit = (typeof lengthUnits)[number];

/** Millimetres in one unit. */
export const mmPerUnit: Readonly<Record<LengthUnit, number>> = { mm: 1, cm: 10, m: 1000, in: 25.4 };

/**
 * What unit a file without units may be in, from its largest extent in file units, for fans of 40 to 400 mm: only to
 * ask, never to convert silently (house heuristic, no source). "unknown" where nothing fits; centimetres are named as a
 * question because 8 to 20 may be inches of a duct as well.
 */
export function guessUnit(extent: number): LengthUnit | "cm?" | "unknown" {
  if (extent >= 25 && extent <= 600) return "mm";
  if (extent >= 1.5 && extent < 7.9) return "in";
  if (extent >= 7.9 && extent < 25) return "cm?";
  if (extent >= 0.03 && extent <= 0.6) return "m";
  return "unknown";
}
