import { Refusal } from "../refusal";
import {
  BAND_ADAPTATION_DB,
  DIFFUSE_FIELD_DB,
  EAR_TRANSMISSION_DB,
  LOW_CORRECTIONS_DB,
  LOW_RANGES_DB,
  SLOPE_RANGES,
  SLOPES,
  THRESHOLD_DB,
  UPPER_LIMITS_BARK,
} from "./loudness-tables";
import { phonFromSone } from "./sone";

/** Bands that the method reads: 25 Hz to 12.5 kHz. */
export const LOUDNESS_BANDS = 28;
const CORE_BANDS = 20;

const at = (values: readonly number[], index: number): number => values[index] ?? 0;

/** Steps 1 and 2: the eleven bands up to 250 Hz, corrected for level and gathered into three critical bands, dB. */
function lowBands(bandsDb: readonly number[]): [number, number, number] {
  const power = (from: number, to: number): number => {
    let sum = 0;
    for (let band = from; band <= to; band += 1) {
      const level = at(bandsDb, band);
      const range = LOW_RANGES_DB.findIndex((top, r) => level <= top - at(LOW_CORRECTIONS_DB[r] ?? [], band));
      if (range < 0) throw new Refusal("loudness-too-loud", "A band below 300 Hz lies above the method's 120 dB.");
      sum += 10 ** ((level + at(LOW_CORRECTIONS_DB[range] ?? [], band)) / 10);
    }
    return 10 * Math.log10(sum);
  };
  return [power(0, 5), power(6, 8), power(9, 10)];
}

/** Steps 3 and 4: core loudness of 20 critical bands and a closing 0, sone/Bark. */
function coreLoudness(bandsDb: readonly number[], field: "free" | "diffuse"): number[] {
  const low = lowBands(bandsDb);
  const core = Array.from({ length: CORE_BANDS }, (_, k) => {
    const diffuseDb = field === "diffuse" ? at(DIFFUSE_FIELD_DB, k) : 0;
    const levelDb = (k < 3 ? at(low, k) : at(bandsDb, k + 8)) - at(EAR_TRANSMISSION_DB, k) + diffuseDb;
    const thresholdDb = at(THRESHOLD_DB, k);
    if (!(levelDb > thresholdDb)) return 0;
    const excess = 10 ** (0.1 * (levelDb - at(BAND_ADAPTATION_DB, k) - thresholdDb));
    return Math.max(0, 0.0635 * 10 ** (0.025 * thresholdDb) * ((0.75 + 0.25 * excess) ** 0.25 - 1));
  });
  core[0] = at(core, 0) * Math.min(1, 0.4 + 0.32 * at(core, 0) ** 0.2);
  return [...core, 0];
}

/** Step 5: area under core loudness and the upper slopes that mask the bands above, sone. */
function totalLoudness(core: readonly number[]): number {
  let total = 0;
  let n1 = 0;
  let z1 = 0;
  let range = 0;
  core.forEach((band, i) => {
    const top = at(UPPER_LIMITS_BARK, i) + 0.0001;
    const column = Math.min(i - 1, 7);
    let finished = false;
    while (!finished) {
      let n2: number;
      let z2: number;
      if (n1 > band) {
        const slope = at(SLOPES[range] ?? [], column);
        n2 = Math.max(at(SLOPE_RANGES, range), band);
        z2 = z1 + (n1 - n2) / slope;
        if (z2 > top) {
          z2 = top;
          n2 = n1 - (z2 - z1) * slope;
          finished = true;
        }
        total += ((z2 - z1) * (n1 + n2)) / 2;
      } else {
        if (n1 < band) range = SLOPE_RANGES.findIndex((limit) => limit < band);
        z2 = top;
        n2 = band;
        total += n2 * (z2 - z1);
        finished = true;
      }
      while (range < SLOPE_RANGES.length - 1 && n2 <= at(SLOPE_RANGES, range)) range += 1;
      z1 = z2;
      n1 = n2;
    }
  });
  return total;
}

/**
 * Loudness (sone) and loudness level (phon) of a stationary sound, Zwicker's method.
 *
 * In: 28 one-third-octave levels, 25 Hz to 12.5 kHz in rising order, dB unweighted; -Infinity counts as no sound. Out:
 * 0 sone and 3 phon below threshold. Another number of bands, NaN, or a low band above 120 dB is refused. It is the
 * loudness where the microphone stood; rectangular bands read strongly tonal sounds some per cent low.
 * Source: ISO 532-1:2017 clause 5 and Annex A (stationary method).
 */
export function stationaryLoudness(
  bandsDb: readonly number[],
  field: "free" | "diffuse" = "free",
): { sone: number; phon: number } {
  if (bandsDb.length !== LOUDNESS_BANDS) {
    throw new Refusal("loudness-bands", `Loudness needs ${LOUDNESS_BANDS} band levels, not ${bandsDb.length}.`);
  }
  const bad = bandsDb.findIndex((level) => Number.isNaN(level) || level === Infinity);
  if (bad >= 0) throw new Refusal("level-not-a-number", `Band ${bad + 1} has no level.`, bad + 1);
  const sone = Math.max(0, totalLoudness(coreLoudness(bandsDb, field)));
  return { sone, phon: phonFromSone(sone) };
}
