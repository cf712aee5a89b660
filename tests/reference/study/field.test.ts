import { describe, expect, it } from "vitest";
import { CLASS_MIN, fieldOf } from "@/lib/domain/study/field";
import { gowerDistance, nearestDesigns, rangesOf } from "@/lib/domain/study/nearest";
import { studyEntry } from "../../factories/study-entry";

/*
 * J. C. Gower, Biometrics 27 (1971) 857, eq. (1) and section 2: similarity of two individuals is the mean over characters
 * that both have of 1 − |x − y|/range (quantitative), of 1 or 0 (qualitative); distance here is 1 less that. The sums
 * below are by hand. A single-stage entry has these traits: stages, blades, hand, inlet, struts, shroud, frame, material,
 * gap, solidity, pitch.
 */
const own = studyEntry({ entryId: "own", designId: "own", bladesFirst: 7, tipGapMm: 1, material: "PETG" });
const near = studyEntry({ entryId: "near", designId: "near", bladesFirst: 9, tipGapMm: 1, material: "PETG" });
const far = studyEntry({ entryId: "far", designId: "far", bladesFirst: 11, tipGapMm: 0.5, material: "PLA" });

describe("Gower's distance", () => {
  const ranges = rangesOf([own, near, far]);

  it("divides a measure by the field's range and leaves out what doesn't vary", () => {
    // Vary: blades (range 4), gap (range 0.5). Choices: hand, inlet, shroud, frame, material. So 7 traits count.
    expect(gowerDistance(own, near, ranges)).toEqual({ distance: 2 / 4 / 7, traits: 7 });
    expect(gowerDistance(own, far, ranges)).toEqual({ distance: 3 / 7, traits: 7 });
  });

  it("is 0 to itself and the same both ways", () => {
    expect(gowerDistance(own, own, ranges)?.distance).toBe(0);
    expect(gowerDistance(far, near, ranges)).toEqual(gowerDistance(near, far, ranges));
  });

  it("counts nothing that one of them lacks", () => {
    const bare = studyEntry({ entryId: "bare", designId: "bare", bladesFirst: 9, tipGapMm: undefined });
    expect(gowerDistance(own, bare, ranges)).toEqual({ distance: 2 / 4 / 6, traits: 6 });
  });

  it("names each other design once, the nearest first, and never the own one", () => {
    const again = studyEntry({ ...far, entryId: "again", bladesFirst: 7, tipGapMm: 1 });
    const found = nearestDesigns(own, [own, far, again, near], 5);
    expect(found.map(({ entry }) => entry.entryId)).toEqual(["near", "again"]);
  });
});

describe("own entries in the field", () => {
  const many = Array.from({ length: CLASS_MIN }, (_, i) =>
    studyEntry({ entryId: `e${i}`, designId: `d${i}`, ratio: 0.8 + i / 100, tipGapMm: i < 5 ? 0.5 : 1 + i / 10 }),
  );

  it("count those that are better, on one baseline unit only", () => {
    const mine = studyEntry({ entryId: "mine", designId: "mine", ratio: 0.825 });
    const other = studyEntry({ entryId: "other", designId: "other", ratio: 0.1, baselineUnitId: "another" });
    const found = fieldOf([mine], [...many, mine, other], "equal");
    // 0.80, 0.81 and 0.82 lie below 0.825; the one against another unit counts nowhere.
    expect(found?.own).toEqual([{ entryId: "mine", seasonNumber: 1, value: 82.5, better: 3, of: CLASS_MIN + 1 }]);
  });

  it("set the best quarter against the rest, and only from the least count on", () => {
    const mine = studyEntry({ entryId: "mine", designId: "d0", ratio: 0.9, tipGapMm: 2 });
    const gap = fieldOf([mine], many, "equal")?.best.traits.find(({ trait }) => trait === "gap");
    // The best 5 of 20 designs have 0.5 mm; the other 15 have 1.5 to 2.9 mm, the middle one 2.2 mm.
    expect(gap).toMatchObject({ best: 0.5, nBest: 5, nRest: 15, own: 2 });
    expect(gap?.rest).toBeCloseTo(2.2, 12);
    expect(fieldOf([mine], many.slice(1), "equal")?.best).toEqual({ designs: CLASS_MIN - 1, traits: [] });
  });

  it("tell what changed between two entries, and no figure across baseline units", () => {
    const a = studyEntry({ entryId: "a", designId: "own", ratio: 1, tipGapMm: 1 });
    const b = studyEntry({ entryId: "b", designId: "own", ratio: 0.95, tipGapMm: 0.7 });
    const c = studyEntry({ ...b, entryId: "c", baselineUnitId: "another" });
    const [first, second] = fieldOf([a, b, c], [a, b, c], "equal")?.revisions ?? [];
    expect(first?.traits).toEqual([{ trait: "gap", from: 1, to: 0.7 }]);
    expect(first?.change).toBeCloseTo(-5, 9);
    expect(second?.traits).toEqual([]);
    expect(second?.change).toBeUndefined();
  });
});
