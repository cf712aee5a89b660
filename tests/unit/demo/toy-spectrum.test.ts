import { describe, expect, it } from "vitest";
import { levelDba, referenceFan } from "@/db/seeds/demo/toy-model";
import { toyBackground, toySpectrum } from "@/db/seeds/demo/toy-spectrum";
import { drawWorld } from "@/db/seeds/demo/world";
import { createRandom } from "@/lib/science/statistics/random";

/**
 * A-weighted sum of band levels, by the closed form of IEC 61672-1:2013 Annex E with the four pole frequencies that it
 * prints, at the exact mid-bands of IEC 61260-1:2014, 1000·10^(k/10) Hz.
 */
function aWeightedSum(bands: readonly { levelDb: number }[]): number {
  const [f1, f2, f3, f4] = [20.598997, 107.65265, 737.86223, 12194.217].map((pole) => pole ** 2) as [
    number,
    number,
    number,
    number,
  ];
  const sum = bands.reduce((power, { levelDb }, i) => {
    const f = (1000 * 10 ** ((i - 16) / 10)) ** 2;
    const weight = (f4 * f ** 2) / ((f + f1) * Math.sqrt((f + f2) * (f + f3)) * (f + f4));
    return power + 10 ** ((levelDb + 20 * Math.log10(weight) + 2.0) / 10);
  }, 0);
  return 10 * Math.log10(sum);
}

const revisions = drawWorld(5, { seasons: 1, roundsPerSeason: 2, entriesPerRound: 12 }).designs.flatMap(
  (design) => design.revisions,
);
const speeds = [750, 1100, 1450, 1800];
const read = (fan: typeof referenceFan, rpm: number) =>
  Number((10 * Math.log10(10 ** (levelDba(fan, rpm) / 10) + 10 ** 2.76)).toFixed(1));
const measure = (seed: number, fan: typeof referenceFan, rpm: number) =>
  toySpectrum(createRandom(seed), fan, {
    rpm: fan.rotors.map(() => rpm),
    readDba: read(fan, rpm),
    backgroundDba: 27.6,
  });

describe("a toy spectrum", () => {
  it("sums, A-weighted, to the level that the run read", () => {
    // The rounding of 29 bands to 0.01 dB and the 2.00 dB of the printed normalisation leave under 0.01 dB.
    for (const [i, { fan }] of revisions.entries()) {
      for (const rpm of speeds) {
        const spectrum = measure(i, fan, rpm);
        expect(Math.abs(aWeightedSum(spectrum.bands) - read(fan, rpm))).toBeLessThan(0.01);
      }
    }
    expect(Math.abs(aWeightedSum(toyBackground(createRandom(3), 27.6).bands) - 27.6)).toBeLessThan(0.01);
  });

  it("has the nominal third-octave bands from 25 Hz to 16 kHz (IEC 61260-1:2014 Annex E)", () => {
    const nominal = measure(1, referenceFan, 1450).bands.map((band) => band.nominalHz);
    expect(nominal).toEqual([
      25, 31.5, 40, 50, 63, 80, 100, 125, 160, 200, 250, 315, 400, 500, 630, 800, 1000, 1250, 1600, 2000, 2500, 3150,
      4000, 5000, 6300, 8000, 10000, 12500, 16000,
    ]);
  });

  it("holds tones where blade counts and speeds put them (m·B·n/60, |m₁f₁ + m₂f₂|; kinematics)", () => {
    let tones = 0;
    for (const [i, { fan }] of revisions.entries()) {
      const [f1 = 0, f2 = 0] = fan.rotors.map((rotor) => (rotor.blades * 1800) / 60);
      for (const tone of measure(i, fan, 1800).tones) {
        tones += 1;
        const { match } = tone;
        expect(match).not.toBeNull();
        const atHz = Math.abs((match?.m1 ?? 0) * f1 + (match?.m2 ?? 0) * f2);
        expect(Math.abs(tone.frequencyHz - atHz)).toBeLessThanOrEqual(Math.max(1.5, 0.005 * atHz));
        // ECMA-418-1:2024 clause 8 reaches from 89.1 Hz up.
        expect(tone.prominent === null).toBe(tone.frequencyHz < 89.1);
      }
    }
    expect(tones).toBeGreaterThan(revisions.length);
  });

  it("has prominent tones for some designs and none for others, and is the same for the same seed", () => {
    const prominent = revisions.filter(({ fan }, i) => measure(i, fan, 1800).tones.some((tone) => tone.prominent));
    expect(prominent.length).toBeGreaterThan(0);
    expect(prominent.length).toBeLessThan(revisions.length);
    expect(measure(8, referenceFan, 1100)).toEqual(measure(8, referenceFan, 1100));
  });
});
