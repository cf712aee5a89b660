import { RECORDING_BANDS } from "./bands";
import { backgroundCorrection } from "./levels";
import type { BackgroundReport, CorrectedBand, SoundGrade, Warning } from "./sound-report";
import type { SpectrumLevels } from "./spectrum-levels";

/**
 * Background taken out of a recording, in total and band by band.
 *
 * In: levels of both in dB; the grade. A band that either file can't know (beyond half the sample rate, or silent in the
 * recording) stays null. The total is corrected on the A-weighted levels, not summed from bands.
 * Source: ISO 3744:2010 8.2.3, ISO 3746:2010 8.3.3.
 */
export function backgroundReport(
  measured: SpectrumLevels,
  background: SpectrumLevels,
  grade: SoundGrade,
): { report: BackgroundReport; correctedDba: number; bands: CorrectedBand[]; warnings: Warning[] } {
  const total = backgroundCorrection({ measuredDb: measured.levelADba, backgroundDb: background.levelADba, grade });
  const bands = correctedBands(measured.bandsDb, background.bandsDb, grade);
  const warnings: Warning[] = [];
  if (total.upperBound) {
    const margin = total.marginDb.toFixed(1);
    const message = `The level is only ${margin} dB over the background: the corrected level is an upper bound.`;
    warnings.push({ code: "background-near", message });
  }
  return {
    report: {
      levelADba: background.levelADba,
      marginDb: total.marginDb,
      correctionDb: total.k1Db,
      upperBound: total.upperBound,
    },
    correctedDba: total.correctedDb,
    bands,
    warnings,
  };
}

/**
 * Background taken out band by band, for the bands that a recording is read into.
 *
 * In: levels in dB in the order of RECORDING_BANDS, undefined where not known; the grade. Out: null where either is not
 * known or the band is silent; a band too near the background is an upper bound. Levels of several runs and of several
 * background readings are averaged before.
 * Source: ISO 3744:2010 8.2.3, ISO 3746:2010 8.3.3.
 */
export function correctedBands(
  measuredBandsDb: readonly (number | undefined)[],
  backgroundBandsDb: readonly (number | undefined)[],
  grade: SoundGrade,
): CorrectedBand[] {
  return RECORDING_BANDS.map(({ nominalHz, midHz }, i) => {
    const measuredDb = measuredBandsDb[i];
    const backgroundDb = backgroundBandsDb[i];
    if (measuredDb === undefined || backgroundDb === undefined || measuredDb === -Infinity) {
      return { nominalHz, midHz, levelDb: null, marginDb: null, correctionDb: null, upperBound: null };
    }
    const { correctedDb, marginDb, k1Db, upperBound } = backgroundCorrection({ measuredDb, backgroundDb, grade });
    return { nominalHz, midHz, levelDb: correctedDb, marginDb, correctionDb: k1Db, upperBound };
  });
}
