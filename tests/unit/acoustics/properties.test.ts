import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { overallFromBands } from "@/lib/science/acoustics/bands";
import {
  BACKGROUND_GRADES,
  backgroundCorrection,
  energyMean,
  energySubtract,
  energySum,
} from "@/lib/science/acoustics/levels";
import { stationaryLoudness } from "@/lib/science/acoustics/loudness";
import { inletStackReadsHigh, positionMean } from "@/lib/science/acoustics/positions";
import { phonFromSone, soneFromPhon } from "@/lib/science/acoustics/sone";
import { spectrumLevels } from "@/lib/science/acoustics/spectrum-levels";
import { welch } from "@/lib/science/acoustics/welch";
import { hearingNotice } from "@/lib/science/acoustics/hearing";
import { Refusal } from "@/lib/science/refusal";
import { noise } from "./wav-bytes";

const level = fc.double({ min: -20, max: 140, noNaN: true });
const levels = fc.array(level, { minLength: 1, maxLength: 12 });
const of = (value: number | undefined): number => value ?? NaN;

describe("level arithmetic", () => {
  it("sums alike in any order, and no sum is below its largest part", () => {
    fc.assert(
      fc.property(levels, (list) => {
        const sum = of(energySum(list));
        expect(sum).toBeCloseTo(of(energySum([...list].reverse())), 9);
        expect(sum).toBeGreaterThanOrEqual(Math.max(...list) - 1e-9);
      }),
    );
  });

  it("shifts a sum and a mean with its levels, and keeps the mean between them", () => {
    fc.assert(
      fc.property(levels, level, (list, shift) => {
        const shifted = list.map((value) => value + shift);
        expect(of(energySum(shifted))).toBeCloseTo(of(energySum(list)) + shift, 8);
        const mean = of(energyMean(list));
        expect(of(energyMean(shifted))).toBeCloseTo(mean + shift, 8);
        expect(mean).toBeGreaterThanOrEqual(Math.min(...list) - 1e-9);
        expect(mean).toBeLessThanOrEqual(Math.max(...list) + 1e-9);
      }),
    );
  });

  it("counts a weight as so many equal levels", () => {
    fc.assert(
      fc.property(level, level, fc.integer({ min: 1, max: 6 }), (a, b, times) => {
        const repeated = [...Array.from({ length: times }, () => a), b];
        expect(of(energyMean([a, b], [times, 1]))).toBeCloseTo(of(energyMean(repeated)), 8);
      }),
    );
  });

  it("takes out what was put in", () => {
    fc.assert(
      fc.property(level, fc.double({ min: -30, max: 30, noNaN: true }), (a, offset) => {
        expect(energySubtract(of(energySum([a, a + offset])), a + offset)).toBeCloseTo(a, 5);
      }),
    );
  });

  it("refuses what has no answer, and gives nothing for nothing", () => {
    expect(energySum([])).toBeUndefined();
    expect(energyMean([])).toBeUndefined();
    expect(energySum([-Infinity])).toBe(-Infinity);
    expect(() => energySubtract(50, 50)).toThrow(Refusal);
    expect(() => energySum([NaN])).toThrow(Refusal);
    expect(() => energyMean([50], [1, 2])).toThrow(Refusal);
    expect(() => energyMean([50, 40], [0, 0])).toThrow(Refusal);
    expect(() => backgroundCorrection({ measuredDb: 50, backgroundDb: 40, grade: "precision" })).toThrow(Refusal);
  });
});

describe("background correction", () => {
  it("never raises a level, never corrects by more than the grade holds, and falls as the margin grows", () => {
    const held = { engineering: 6, survey: 3, "engineering-position": 6, "survey-position": 3, precision: 10 } as const;
    fc.assert(
      fc.property(
        level,
        fc.double({ min: -10, max: 40, noNaN: true }),
        fc.constantFrom(...BACKGROUND_GRADES),
        (l, m, grade) => {
          const at = (margin: number) =>
            backgroundCorrection({ measuredDb: l, backgroundDb: l - margin, grade, frequencyHz: 1000 });
          const { k1Db, correctedDb } = at(m);
          expect(correctedDb).toBeLessThanOrEqual(l);
          expect(k1Db).toBeGreaterThanOrEqual(0);
          expect(k1Db).toBeLessThanOrEqual(-10 * Math.log10(1 - 10 ** (-held[grade] / 10)) + 1e-9);
          expect(at(m + 0.5).k1Db).toBeLessThanOrEqual(k1Db + 1e-12);
        },
      ),
    );
  });

  it("compares the margin after rounding: 20.4 − 14.4 is 6 (ISO 3744:2010 8.2.3, both ends inside)", () => {
    expect(20.4 - 14.4).toBeLessThan(6);
    expect(backgroundCorrection({ measuredDb: 20.4, backgroundDb: 14.4, grade: "engineering" }).upperBound).toBe(false);
    expect(backgroundCorrection({ measuredDb: 50, backgroundDb: -Infinity, grade: "survey" }).k1Db).toBe(0);
  });
});

describe("spectra, bands and loudness", () => {
  it("scales by 20 lg and conserves power between bands and total", () => {
    const samples = noise(31, 65536, 0.1);
    const base = welch(samples, { sampleRateHz: 48000, blockLength: 8192 });
    const twice = welch(
      samples.map((value) => 2 * value),
      { sampleRateHz: 48000, blockLength: 8192 },
    );
    if (base === undefined || twice === undefined) throw new Error("no spectrum");
    const [a, b] = [spectrumLevels(base, 0), spectrumLevels(twice, 0)];
    expect(b.levelADba - a.levelADba).toBeCloseTo(20 * Math.log10(2), 9);
    expect(b.levelCDb - a.levelCDb).toBeCloseTo(20 * Math.log10(2), 9);
    expect(of(energySum(a.bandsDb.map((band) => band ?? -Infinity)))).toBeLessThan(a.levelZDb);
  });

  it("gives louder for more: raising any band never lowers loudness", () => {
    const band = fc.double({ min: -20, max: 90, noNaN: true });
    fc.assert(
      fc.property(
        fc.array(band, { minLength: 28, maxLength: 28 }),
        fc.integer({ min: 0, max: 27 }),
        fc.double({ min: 0.1, max: 20, noNaN: true }),
        (bands, at, more) => {
          const raised = bands.map((value, i) => (i === at ? value + more : value));
          expect(stationaryLoudness(raised).sone).toBeGreaterThanOrEqual(stationaryLoudness(bands).sone * 0.98 - 1e-9);
        },
      ),
    );
  });

  it("inverts sone and phon", () => {
    fc.assert(
      fc.property(fc.double({ min: 5, max: 120, noNaN: true }), (phon) => {
        expect(phonFromSone(soneFromPhon(phon))).toBeCloseTo(phon, 1);
      }),
    );
  });

  it("sums equal bands as equal levels (10 lg N)", () => {
    expect(
      of(
        overallFromBands(
          [0, 1, 2, 3].map((index) => ({ index, levelDb: 40 })),
          "Z",
        ),
      ),
    ).toBeCloseTo(46.0206, 4);
  });
});

describe("positions and notices", () => {
  it("means positions by energy, keeps bounds and unknown bands", () => {
    const mean = positionMean([
      { levelDba: 60, bandsDb: [50, null], upperBound: false },
      { levelDba: 70, bandsDb: [60, 40], upperBound: true },
    ]);
    // 67.4036 dB: energy mean of 60 and 70 dB, handbook L-mean-1.
    expect(mean?.levelDba).toBeCloseTo(67.403627, 6);
    expect(mean).toMatchObject({ upperBound: true });
    expect(mean?.bandsDb[1]).toBeNull();
    expect(positionMean([])).toBeUndefined();
  });

  it("notes an inlet stack of a fifth of the distance (house rule, no source)", () => {
    expect([19.9, 20, 25].map((stackMm) => inletStackReadsHigh(stackMm, 100))).toEqual([false, true, true]);
  });

  it("gives a notice from 80 and asks for protection from 85 dB(A) (Directive 2003/10/EC Article 3)", () => {
    expect([79.9, 80, 84.9, 85, 99].map(hearingNotice)).toEqual(["none", "notice", "notice", "protect", "protect"]);
  });
});
