/**
 * One published entry as the study reads it. Figures are those of its publication: ratios are to the baseline of the
 * entry's own session, at its season's headline level; undefined where the level was not reached or a trait isn't known.
 */
export interface StudyEntry {
  readonly entryId: string;
  readonly revisionId: string;
  readonly designId: string;
  readonly seasonNumber: number;
  readonly roundNumber: number;
  readonly benchVersionId: string;
  readonly protocolVersionId: string;
  readonly baselineUnitId: string;
  /** Who designed it, as one label: entries that share a label share a cluster. */
  readonly designer: string;
  readonly stages: number;
  readonly counterRotating: boolean;
  readonly bladesFirst: number;
  readonly bladesSecond: number | undefined;
  readonly handFirst: string;
  readonly inletStack: string;
  readonly inletStackMm: number;
  readonly spacerMm: number;
  readonly struts: number;
  readonly shroud: boolean;
  readonly frameKey: string;
  readonly material: string;
  readonly tipGapMm: number | undefined;
  readonly solidityMid: number | undefined;
  readonly pitchMidDeg: number | undefined;
  readonly massG: number | undefined;
  readonly printTimeMin: number | undefined;
  readonly equalNoiseRatio: Uncertain | undefined;
  readonly levelDifferenceDb: Uncertain;
  readonly resistanceRatio: Uncertain;
}

/** A figure with its standard uncertainty; degrees of freedom undefined: taken as known exactly. */
export interface Uncertain {
  readonly value: number;
  readonly u: number;
  readonly dof: number | undefined;
}

/**
 * The cell whose level the regression takes out: season × bench version × protocol, and the baseline unit where a
 * season ran two, since figures against different units don't stand on one scale.
 */
export function cellOf(entry: StudyEntry): string {
  return `${entry.seasonNumber} ${entry.benchVersionId} ${entry.protocolVersionId} ${entry.baselineUnitId}`;
}

/** Whether two entries share their cell. */
export function sameCell(a: StudyEntry, b: StudyEntry): boolean {
  return (
    a.seasonNumber === b.seasonNumber &&
    a.benchVersionId === b.benchVersionId &&
    a.protocolVersionId === b.protocolVersionId &&
    a.baselineUnitId === b.baselineUnitId
  );
}
