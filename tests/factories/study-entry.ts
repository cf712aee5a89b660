import type { StudyEntry, Uncertain } from "@/lib/domain/study/study-entry";

const figure = (value: number): Uncertain => ({ value, u: 0.005, dof: 30 });

/** A published entry as the study reads it; a test says what matters to it. `ratio` sets the equal-noise ratio. */
export function studyEntry({ ratio = 1, ...changes }: Partial<StudyEntry> & { ratio?: number } = {}): StudyEntry {
  return {
    entryId: "entry",
    revisionId: "revision",
    designId: "design",
    seasonNumber: 1,
    roundNumber: 1,
    benchVersionId: "bench",
    protocolVersionId: "protocol",
    baselineUnitId: "baseline",
    designer: "osier",
    stages: 1,
    counterRotating: false,
    bladesFirst: 7,
    bladesSecond: undefined,
    handFirst: "right",
    inletStack: "none",
    inletStackMm: 0,
    spacerMm: 0,
    struts: 4,
    shroud: false,
    frameKey: "120x25",
    material: "PETG",
    tipGapMm: 1,
    solidityMid: 0.9,
    pitchMidDeg: 30,
    massG: 30,
    printTimeMin: 200,
    equalNoiseRatio: figure(ratio),
    levelDifferenceDb: figure(0),
    resistanceRatio: figure(1),
    ...changes,
  };
}
