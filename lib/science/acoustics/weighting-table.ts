export interface WeightingTableRow {
  nominalHz: number;
  /** Design goals rounded to 0.1 dB. */
  aDb: number;
  cDb: number;
  /** Acceptance limits in dB about the goal; a lower limit of undefined is minus infinity. */
  class1: { upperDb: number; lowerDb: number | undefined };
  class2: { upperDb: number; lowerDb: number | undefined };
}

type Row = readonly [number, number, number, number, number | undefined, number, number | undefined];

const ROWS: readonly Row[] = [
  [10, -70.4, -14.3, 3, undefined, 5, undefined],
  [12.5, -63.4, -11.2, 2.5, undefined, 5, undefined],
  [16, -56.7, -8.5, 2, -4, 5, undefined],
  [20, -50.5, -6.2, 2, -2, 3, -3],
  [25, -44.7, -4.4, 2, -1.5, 3, -3],
  [31.5, -39.4, -3, 1.5, -1.5, 3, -3],
  [40, -34.6, -2, 1, -1, 2, -2],
  [50, -30.2, -1.3, 1, -1, 2, -2],
  [63, -26.2, -0.8, 1, -1, 2, -2],
  [80, -22.5, -0.5, 1, -1, 2, -2],
  [100, -19.1, -0.3, 1, -1, 1.5, -1.5],
  [125, -16.1, -0.2, 1, -1, 1.5, -1.5],
  [160, -13.4, -0.1, 1, -1, 1.5, -1.5],
  [200, -10.9, 0, 1, -1, 1.5, -1.5],
  [250, -8.6, 0, 1, -1, 1.5, -1.5],
  [315, -6.6, 0, 1, -1, 1.5, -1.5],
  [400, -4.8, 0, 1, -1, 1.5, -1.5],
  [500, -3.2, 0, 1, -1, 1.5, -1.5],
  [630, -1.9, 0, 1, -1, 1.5, -1.5],
  [800, -0.8, 0, 1, -1, 1.5, -1.5],
  [1000, 0, 0, 0.7, -0.7, 1, -1],
  [1250, 0.6, 0, 1, -1, 1.5, -1.5],
  [1600, 1, -0.1, 1, -1, 2, -2],
  [2000, 1.2, -0.2, 1, -1, 2, -2],
  [2500, 1.3, -0.3, 1, -1, 2.5, -2.5],
  [3150, 1.2, -0.5, 1, -1, 2.5, -2.5],
  [4000, 1, -0.8, 1, -1, 3, -3],
  [5000, 0.5, -1.3, 1.5, -1.5, 3.5, -3.5],
  [6300, -0.1, -2, 1.5, -2, 4.5, -4.5],
  [8000, -1.1, -3, 1.5, -2.5, 5, -5],
  [10000, -2.5, -4.4, 2, -3, 5, undefined],
  [12500, -4.3, -6.2, 2, -5, 5, undefined],
  [16000, -6.6, -8.5, 2.5, -16, 5, undefined],
  [20000, -9.3, -11.2, 3, undefined, 5, undefined],
];

/**
 * Weightings and acceptance limits at the nominal one-third-octave mid-bands, 10 Hz to 20 kHz, in dB.
 * Source: IEC 61672-1:2013 Table 3 (the limits of the 2002 edition differ).
 */
export const WEIGHTING_TABLE: readonly WeightingTableRow[] = ROWS.map(
  ([nominalHz, aDb, cDb, upper1, lower1, upper2, lower2]) => ({
    nominalHz,
    aDb,
    cDb,
    class1: { upperDb: upper1, lowerDb: lower1 },
    class2: { upperDb: upper2, lowerDb: lower2 },
  }),
);
