/** A fan frame: a square of `sizeMm` with a round bore, mounted by four holes. Editable presets of a bench. */
export interface FrameSpec {
  readonly sizeMm: number;
  readonly depthMm: number;
  readonly boreMm: number;
  readonly holeSpacingMm: number;
  readonly holeMm: number;
  /** Tolerance of the printed and of the moulded part together, taken off every clearance. */
  readonly toleranceMm: number;
}

/**
 * Presets by class. Hole spacings are common practice without a source (105.0 against 104.8 and 124.5 against 125 both
 * circulate); bores are what common frames of the class leave, also without a source. A bench edits them.
 */
const classes: readonly Omit<FrameSpec, "depthMm">[] = [
  { sizeMm: 80, boreMm: 76, holeSpacingMm: 71.5, holeMm: 4.3, toleranceMm: 0.2 },
  { sizeMm: 92, boreMm: 88, holeSpacingMm: 82.5, holeMm: 4.3, toleranceMm: 0.2 },
  { sizeMm: 120, boreMm: 116.5, holeSpacingMm: 105, holeMm: 4.3, toleranceMm: 0.3 },
  { sizeMm: 140, boreMm: 136, holeSpacingMm: 124.5, holeMm: 4.3, toleranceMm: 0.3 },
];

/** Sizes that presets exist for, mm. */
export const frameSizesMm: readonly number[] = classes.map((frame) => frame.sizeMm);

/** The preset for a name such as "120x25" (size × depth, mm); undefined for a size without preset or a bad name. */
export function frameByName(name: string): FrameSpec | undefined {
  const match = /^(\d{2,3})\s*[x×]\s*(\d{1,3}(?:\.\d+)?)$/i.exec(name.trim());
  const frame = classes.find((candidate) => candidate.sizeMm === Number(match?.[1]));
  const depthMm = Number(match?.[2]);
  return frame && depthMm > 0 ? { ...frame, depthMm } : undefined;
}
