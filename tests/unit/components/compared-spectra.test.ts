import { describe, expect, it } from "vitest";
import { againstOwnBaseline, commonSpeeds, loudnessPercent, spectraAt } from "@/components/compare/spectra-model";
import type { ComparedHead } from "@/lib/contracts/compare";
import type { SetSpeedSpectrum } from "@/lib/contracts/publication";

const spectrum = (setSpeed: number, levels: (number | null)[], more: Partial<SetSpeedSpectrum> = {}) =>
  ({
    setSpeed,
    position: "on axis",
    bands: levels.map((levelDb, i) => ({
      nominalHz: 100 * (i + 1),
      midHz: 100 * (i + 1),
      levelDb,
      correctedDb: levelDb,
      upperBound: false,
    })),
    loudness: null,
    ...more,
  }) as unknown as SetSpeedSpectrum;

const head = (entryId: string, entry: SetSpeedSpectrum[], baseline: SetSpeedSpectrum[]) =>
  ({ entryId, spectra: entry.length > 0 ? { entry, baseline } : null }) as unknown as ComparedHead;

describe("spectra laid over each other", () => {
  it("stand at a set speed that all have that were measured at all", () => {
    const a = head("a", [spectrum(750, [1]), spectrum(1100, [1])], []);
    const b = head("b", [spectrum(1100, [1]), spectrum(1450, [1])], []);
    expect(commonSpeeds([a, b, head("c", [], [])])).toEqual([1100]);
    expect(spectraAt([a, b, head("c", [], [])], 1100).map((pair) => pair.head.entryId)).toEqual(["a", "b"]);
    expect(commonSpeeds([])).toEqual([]);
  });

  it("across benches are levels less the own baseline's, and nothing where one is a bound", () => {
    const own = spectrum(1100, [40, 41, null, 43]);
    const below = spectrum(1100, [38, 44, 40, 42]);
    const last = below.bands[3];
    if (last) last.upperBound = true;
    const [pair] = spectraAt([head("a", [own], [below])], 1100);
    if (!pair) throw new Error("no pair");
    // By hand: 40 − 38 and 41 − 44 dB.
    expect(againstOwnBaseline(pair).map((band) => band.levelDb)).toEqual([2, -3, undefined, undefined]);
  });

  it("tell loudness as a share of the own baseline's", () => {
    const own = spectrum(1100, [1], { loudness: { sone: 6, phon: 66 } });
    const below = spectrum(1100, [1], { loudness: { sone: 8, phon: 70 } });
    const [pair] = spectraAt([head("a", [own], [below])], 1100);
    if (!pair) throw new Error("no pair");
    expect(loudnessPercent(pair)).toBe(75);
    expect(loudnessPercent({ ...pair, baseline: undefined })).toBeUndefined();
  });
});
