import { RECORDING_BANDS, overallFromBands, type Band } from "@/lib/science/acoustics/bands";
import {
  criticalBand,
  isProminent,
  prominenceBands,
  prominenceRatioDb,
  toneToNoiseDb,
} from "@/lib/science/acoustics/ecma-tones";
import { predictTones, type PredictedTone, type RotorSet } from "@/lib/science/acoustics/fan-tones";
import { LOUDNESS_BANDS, stationaryLoudness } from "@/lib/science/acoustics/loudness";
import { energySubtract } from "@/lib/science/acoustics/levels";
import { matchTone } from "@/lib/science/acoustics/match-tones";
import type { ReportedTone } from "@/lib/science/acoustics/sound-report";
import type { Random } from "@/lib/science/statistics/random";
import type { ToyFan } from "./toy-model";

/** A band spectrum of the toy bench: levels in dB in the order of RECORDING_BANDS, and the tones in it. */
export interface ToySpectrum {
  bands: { nominalHz: number; midHz: number; levelDb: number }[];
  levelZDb: number;
  levelCDb: number;
  levelADba: number;
  tones: ReportedTone[];
  loudness: { sone: number; phon: number };
}

/** Spacing of the lines that an analysis of the toy bench would have, Hz: tones are matched within it. */
const LINE_HZ = 1.5;
const LOWEST_TONE_HZ = 40;

const round = (value: number, decimals: number): number => Number(value.toFixed(decimals));
const power = (levelDb: number): number => 10 ** (levelDb / 10);
const level = (mean: number): number => 10 * Math.log10(mean);

/** Shape of the fan's broadband sound, power per hertz without scale: flat to a knee that moves with speed, then falling. */
function fanDensity(frequencyHz: number, speedRpm: number): number {
  const knee = 700 * (speedRpm / 1800);
  return (1 / (1 + (frequencyHz / knee) ** 2.4)) * (1 / (1 + (45 / frequencyHz) ** 1.6));
}

/** Shape of the workshop's quiet: traffic low down, the meter's own hiss high up. */
function roomDensity(frequencyHz: number): number {
  return (60 / frequencyHz) ** 2 + 2e-4 + 1.5e-9 * frequencyHz ** 1.5;
}

const bandPower = (density: (hz: number) => number, { lowerHz, midHz, upperHz }: Band): number =>
  ((density(lowerHz * 1.06) + density(midHz) + density(upperHz / 1.06)) / 3) * (upperHz - lowerHz);

const overall = (bandsDb: readonly number[], weighting: "A" | "C" | "Z"): number =>
  overallFromBands(
    bandsDb.map((levelDb, i) => ({ index: i - 16, levelDb })),
    weighting,
  ) ?? -Infinity;

/** The bench with the fan stopped: bands whose A-weighted sum is the level read, to a hundredth of a decibel. */
export function toyBackground(random: Random, levelDba: number): ToySpectrum {
  const raw = RECORDING_BANDS.map((band) => level(bandPower(roomDensity, band)) + 0.3 * random.normal());
  return spectrumOf(shifted(raw, levelDba - overall(raw, "A")), levelDba, []);
}

/**
 * A run of the toy bench: broadband sound with a knee that moves with speed, blade-passing and rotor-interaction tones
 * whose strength follows the traits, the bench's background under it, and bands whose A-weighted sum is the level that the
 * run read, to a hundredth of a decibel. Invented, like the rest of the model.
 *
 * @param readDba level read at the microphone, background within, dB(A)
 * @param rpm speeds of the rotors as they ran
 */
export function toySpectrum(
  random: Random,
  fan: ToyFan,
  { rpm, readDba, backgroundDba }: { rpm: readonly number[]; readDba: number; backgroundDba: number },
): ToySpectrum {
  const first = rpm[0] ?? 1800;
  const set = rotorSet(fan, rpm);
  const predicted = predictTones(set);
  const density = (hz: number) => fanDensity(hz, first);
  const broad = RECORDING_BANDS.map((band) => bandPower(density, band) * power(0.35 * random.normal()));
  const scale = power(overall(broad.map(level), "A"));
  // What is heard drifts a little from the tachometer, as an estimate of speed does.
  const drift = 1 + 0.0004 * random.normal();
  const tones = toneStrengths(random, fan, predicted).map(({ tone, relativeDb }) => ({
    frequencyHz: tone.frequencyHz * drift,
    power: scale * power(relativeDb),
  }));
  const own = broad.map((noise, i) => noise + powerIn(tones, RECORDING_BANDS[i]?.lowerHz, RECORDING_BANDS[i]?.upperHz));
  const room = shifted(
    RECORDING_BANDS.map((band) => level(bandPower(roomDensity, band)) + 0.3 * random.normal()),
    0,
  );
  const roomDb = shifted(room, backgroundDba - overall(room, "A"));
  const ownDba = readDba > backgroundDba + 0.1 ? energySubtract(readDba, backgroundDba) : readDba - 15;
  const gainDb = ownDba - overall(own.map(level), "A");
  const heard = own.map((mean, i) => level(power(level(mean) + gainDb) + power(roomDb[i] ?? -Infinity)));
  const bandsDb = shifted(heard, readDba - overall(heard, "A"));
  const noiseAt = (hz: number) => density(hz) * power(gainDb) + roomDensityAt(roomDb, hz);
  const heardTones = tones.map((tone) => ({ ...tone, power: tone.power * power(gainDb) }));
  return spectrumOf(bandsDb, readDba, reportTones(heardTones, noiseAt, predicted));
}

/** Blade counts and speeds as the tone predictions take them. */
export function rotorSet(fan: ToyFan, rpm: readonly number[]): RotorSet {
  return {
    blades: fan.rotors.map((rotor) => rotor.blades),
    rpm,
    ...(fan.rotors.length > 1 && { rotation: fan.counterRotating ? ("counter" as const) : ("co" as const) }),
    ...(fan.struts > 0 && { struts: fan.struts }),
  };
}

/** Strength of each tone that the toy fan makes, dB relative to its whole A-weighted broadband power. */
function toneStrengths(random: Random, fan: ToyFan, predicted: readonly PredictedTone[]) {
  return predicted.flatMap((tone) => {
    const order = Math.abs(tone.m1) + Math.abs(tone.m2);
    const luck = 2.5 * random.normal();
    if (tone.kind === "blade-passing") {
      if (order > 4) return [];
      const struts = tone.strutModes?.[0] === 0 ? 7 : 0;
      return [{ tone, relativeDb: -1.5 - 5.5 * (order - 1) + struts + (fan.tipGapMm - 0.7) * 2 + luck }];
    }
    if (order > 4 || tone.m1 <= 0 || tone.m2 <= 0) return [];
    const near = 5 - 0.45 * Math.min(fan.spacerMm, 15);
    const swirl = Math.abs(tone.modeOrder ?? 9) <= 2 ? 3 : 0;
    return [{ tone, relativeDb: -10 - 3.5 * (order - 2) + near + swirl + luck }];
  });
}

function powerIn(tones: readonly { frequencyHz: number; power: number }[], lowerHz = 0, upperHz = 0): number {
  return tones.reduce(
    (sum, tone) => (tone.frequencyHz >= lowerHz && tone.frequencyHz < upperHz ? sum + tone.power : sum),
    0,
  );
}

function roomDensityAt(roomDb: readonly number[], hz: number): number {
  const i = RECORDING_BANDS.findIndex((band) => hz >= band.lowerHz && hz < band.upperHz);
  const band = RECORDING_BANDS[i];
  return band ? power(roomDb[i] ?? -Infinity) / (band.upperHz - band.lowerHz) : 0;
}

/** Tones with the ratios of ECMA-418-1 over the model's smooth noise, as an analysis would list them: from 40 Hz up. */
function reportTones(
  tones: readonly { frequencyHz: number; power: number }[],
  noiseAt: (hz: number) => number,
  predicted: readonly PredictedTone[],
): ReportedTone[] {
  const noise = (fromHz: number, toHz: number) => noiseAt((fromHz + toHz) / 2) * (toHz - fromHz);
  const merged = strongestOfEachLine(tones);
  return merged
    .filter((tone) => tone.frequencyHz >= LOWEST_TONE_HZ)
    .flatMap((tone): ReportedTone[] => {
      const { frequencyHz } = tone;
      const { lowerHz, upperHz, widthHz } = criticalBand(frequencyHz);
      const bands = prominenceBands(frequencyHz);
      const around = noise(Math.max(lowerHz, 20), upperHz);
      const toneToNoise = toneToNoiseDb({
        toneHz: frequencyHz,
        tonePower: tone.power,
        bandPower: tone.power + around,
        summedHz: Math.min(widthHz, upperHz - Math.max(lowerHz, 20)),
      });
      const prominence = prominenceRatioDb({
        toneHz: frequencyHz,
        middlePower: around + powerIn(merged, Math.max(lowerHz, 20), upperHz),
        lowerPower:
          bands.middleFromHz > bands.lowerFromHz
            ? noise(bands.lowerFromHz, bands.middleFromHz) + powerIn(merged, bands.lowerFromHz, bands.middleFromHz)
            : 0,
        upperPower: noise(bands.middleToHz, bands.upperToHz) + powerIn(merged, bands.middleToHz, bands.upperToHz),
      });
      if (toneToNoise <= 0 && prominence <= 0) return [];
      const leads = !merged.some(
        (other) => other.power > tone.power && other.frequencyHz > lowerHz && other.frequencyHz <= upperHz,
      );
      const [best, ...alsoMatches] = matchTone(frequencyHz, predicted, LINE_HZ);
      return [
        {
          frequencyHz: round(frequencyHz, 1),
          levelDb: round(level(tone.power), 2),
          toneToNoiseDb: round(toneToNoise, 2),
          prominenceDb: round(prominence, 2),
          prominent: isProminent(frequencyHz, toneToNoise, leads ? prominence : undefined),
          match:
            best === undefined
              ? null
              : {
                  ...best,
                  residualHz: round(best.residualHz, 2),
                  alsoMatches: alsoMatches.map((each) => ({ ...each, residualHz: round(each.residualHz, 2) })),
                },
        },
      ];
    });
}

/** Tones nearer than a few lines run into one, as they would in an analysis. */
function strongestOfEachLine(tones: readonly { frequencyHz: number; power: number }[]) {
  const merged: { frequencyHz: number; power: number }[] = [];
  for (const tone of tones.toSorted((a, b) => a.frequencyHz - b.frequencyHz)) {
    const last = merged.at(-1);
    if (last && tone.frequencyHz - last.frequencyHz < 3 * LINE_HZ) {
      if (tone.power > last.power) last.frequencyHz = tone.frequencyHz;
      last.power += tone.power;
    } else merged.push({ ...tone });
  }
  return merged;
}

const shifted = (levels: readonly number[], byDb: number): number[] => levels.map((each) => each + byDb);

function spectrumOf(bandsDb: readonly number[], levelADba: number, tones: ReportedTone[]): ToySpectrum {
  const levels = bandsDb.map((each) => round(each, 2));
  const { sone, phon } = stationaryLoudness(levels.slice(0, LOUDNESS_BANDS));
  return {
    bands: RECORDING_BANDS.map(({ nominalHz, midHz }, i) => ({
      nominalHz,
      midHz: round(midHz, 6),
      levelDb: levels[i] ?? 0,
    })),
    levelZDb: round(overall(levels, "Z"), 2),
    levelCDb: round(overall(levels, "C"), 2),
    levelADba,
    tones,
    loudness: { sone: round(sone, 4), phon: round(phon, 3) },
  };
}
