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

/** Said wherever a preset is shown. */
export const FRAME_PRESET_NOTE = "common practice, no source; edit to your frame";

/** What a class has alike at every depth, and the depths in which presets come. */
interface FrameClass extends Omit<FrameSpec, "depthMm"> {
  readonly depthsMm: readonly number[];
}

/**
 * Presets by class, the one truth of them: a database's first rows are made of these, and a bench edits those. Common
 * practice, no source: for hole spacings 105.0 and 104.8, 124.5 and 125 both circulate; bores are the narrow end of
 * what frames of a class leave, and the tolerance is that of a usual print.
 */
const classes: readonly FrameClass[] = [
  { sizeMm: 80, boreMm: 76.5, holeSpacingMm: 71.5, holeMm: 4.3, toleranceMm: 0.5, depthsMm: [25] },
  { sizeMm: 92, boreMm: 88, holeSpacingMm: 82.5, holeMm: 4.3, toleranceMm: 0.5, depthsMm: [25] },
  { sizeMm: 120, boreMm: 114, holeSpacingMm: 105, holeMm: 4.3, toleranceMm: 0.5, depthsMm: [25, 38] },
  { sizeMm: 140, boreMm: 134, holeSpacingMm: 124.5, holeMm: 4.3, toleranceMm: 0.5, depthsMm: [25] },
];

const atDepth = ({ depthsMm: _depths, ...frame }: FrameClass, depthMm: number): FrameSpec => ({ ...frame, depthMm });

/** Every preset with its name, such as "120x25". */
export const framePresets: readonly (FrameSpec & { readonly key: string })[] = classes.flatMap((frame) =>
  frame.depthsMm.map((depthMm) => ({ ...atDepth(frame, depthMm), key: `${frame.sizeMm}x${depthMm}` })),
);

/** Sizes that presets exist for, mm. */
export const frameSizesMm: readonly number[] = classes.map((frame) => frame.sizeMm);

/** The preset for a name such as "120x25" (size × depth, mm); undefined for a size without preset or a bad name. */
export function frameByName(name: string): FrameSpec | undefined {
  const match = /^(\d{2,3})\s*[x×]\s*(\d{1,3}(?:\.\d+)?)$/i.exec(name.trim());
  const frame = classes.find((candidate) => candidate.sizeMm === Number(match?.[1]));
  const depthMm = Number(match?.[2]);
  return frame && depthMm > 0 ? atDepth(frame, depthMm) : undefined;
}
