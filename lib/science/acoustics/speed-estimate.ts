import { bladePassingHz, HARMONICS } from "./fan-tones";
import type { FoundTone } from "./found-tones";
import { matchToleranceHz } from "./match-tones";

/** The estimate is looked for this far either side of the tachometer, as a share. Threshold of the house, no source. */
export const SPEED_SEARCH = 0.05;
/** One harmonic alone, other than the first, has to lie within this share. Threshold of the house, no source. */
const LONE_HARMONIC = 0.01;
/** What a candidate loses for each per cent that it lies off the tachometer, dB. Threshold of the house, no source. */
const DISTANCE_COST_DB = 0.5;

interface Family {
  rpm: number;
  scoreDb: number;
  tones: FoundTone[];
}

type RatedTone = Pick<FoundTone, "frequencyHz" | "power" | "toneToNoiseDb">;

/** 10 lg(1 + tone/noise): what a tone adds to a family. Bounded, so that one tone without noise doesn't decide all. */
function weightDb(tone: RatedTone): number {
  return tone.toneToNoiseDb === Infinity ? 60 : Math.min(60, 10 * Math.log10(1 + 10 ** (tone.toneToNoiseDb / 10)));
}

interface Member<T> {
  tone: T;
  harmonic: number;
}

function members<T extends RatedTone>(
  tones: readonly T[],
  blades: number,
  rpm: number,
  spacingHz: number,
): Member<T>[] {
  const found: Member<T>[] = [];
  for (let harmonic = 1; harmonic <= HARMONICS; harmonic += 1) {
    const expectedHz = bladePassingHz(blades, rpm, harmonic);
    const near = tones.filter(
      ({ frequencyHz }) => Math.abs(frequencyHz - expectedHz) <= matchToleranceHz(expectedHz, spacingHz),
    );
    const best = near.reduce<T | undefined>((top, tone) => (tone.power > (top?.power ?? 0) ? tone : top), undefined);
    if (best !== undefined) found.push({ tone: best, harmonic });
  }
  return found;
}

/** Least squares of f = m·B·n/60 over a family, each tone weighted by its share over the noise. */
function refine<T extends RatedTone>(family: readonly Member<T>[], blades: number): number {
  let over = 0;
  let under = 0;
  for (const { tone, harmonic } of family) {
    const share = tone.toneToNoiseDb === Infinity ? 1 : 1 / (1 + 10 ** (-tone.toneToNoiseDb / 10));
    const step = (harmonic * blades) / 60;
    over += share * tone.frequencyHz * step;
    under += share * step * step;
  }
  return over / under;
}

function strongestFamily(
  tones: readonly FoundTone[],
  blades: number,
  tachometerRpm: number,
  spacingHz: number,
): Family | undefined {
  let best: Family | undefined;
  for (const { frequencyHz } of tones) {
    for (let harmonic = 1; harmonic <= HARMONICS; harmonic += 1) {
      const candidateRpm = (60 * frequencyHz) / (harmonic * blades);
      if (Math.abs(candidateRpm / tachometerRpm - 1) > SPEED_SEARCH) continue;
      const family = members(tones, blades, candidateRpm, spacingHz);
      const rpm = refine(family, blades);
      const off = Math.abs(rpm / tachometerRpm - 1);
      const lone = family.length === 1 && family[0]?.harmonic !== 1;
      if (family.length === 0 || (lone && off > LONE_HARMONIC)) continue;
      const scoreDb = family.reduce((sum, { tone }) => sum + weightDb(tone), 0) - DISTANCE_COST_DB * 100 * off;
      if (best === undefined || scoreDb > best.scoreDb) best = { rpm, scoreDb, tones: family.map(({ tone }) => tone) };
    }
  }
  return best;
}

export interface SpeedEstimate {
  /** One a rotor, rpm. */
  speedsRpm: number[];
  /** Rotors (1, 2) without a family of their own: the tachometer's speed, scaled as the strongest family's. */
  carriedOver: number[];
}

/**
 * Speeds in rpm from the tones found, as a check on the tachometer; undefined where no blade-passing family is found.
 *
 * The strongest family comes first; the other rotor is looked for in the tones that it leaves. In: tones, blade counts,
 * tachometer speeds in rpm (one a rotor), line spacing in Hz. Source: f = m·B·n (kinematics); rule of the house.
 */
export function estimateSpeeds(
  tones: readonly FoundTone[],
  blades: readonly number[],
  tachometerRpm: readonly number[],
  spacingHz: number,
): SpeedEstimate | undefined {
  const rotors = blades.map((count, index) => ({ index, count, rpm: tachometerRpm[index] ?? 0 }));
  const first = rotors
    .map((rotor) => ({ rotor, family: strongestFamily(tones, rotor.count, rotor.rpm, spacingHz) }))
    .reduce<{ rotor: (typeof rotors)[number]; family: Family } | undefined>((top, { rotor, family }) => {
      return family !== undefined && family.scoreDb > (top?.family.scoreDb ?? -Infinity) ? { rotor, family } : top;
    }, undefined);
  if (first === undefined) return undefined;
  const left = tones.filter((tone) => !first.family.tones.includes(tone));
  const carriedOver: number[] = [];
  const speedsRpm = rotors.map((rotor) => {
    if (rotor.index === first.rotor.index) return first.family.rpm;
    const own = strongestFamily(left, rotor.count, rotor.rpm, spacingHz);
    if (own !== undefined) return own.rpm;
    carriedOver.push(rotor.index + 1);
    return (rotor.rpm * first.family.rpm) / first.rotor.rpm;
  });
  return { speedsRpm, carriedOver };
}
