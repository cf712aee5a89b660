import { describe, expect, it } from "vitest";
import { pairEffects } from "@/lib/domain/study/pair-effects";
import { chainsOf, differingTraits, pairsOf } from "@/lib/domain/study/pairs";
import type { StudyEntry } from "@/lib/domain/study/study-entry";
import { studyEntry } from "../../factories/study-entry";
import { nums, record, vector } from "../support/vectors";

const matched = vector("T10-31");
const differences = nums(matched.inputs.d);
const expected = record(matched.expected);

/** A revision A of seven blades and one B of nine by each designer; their levels differ by d dB. */
function blades(d: readonly number[]): {
  entries: StudyEntry[];
  derivations: { revisionId: string; fromRevisionId: string }[];
} {
  const entries = d.flatMap((change, i) =>
    (["a", "b"] as const).map((letter) =>
      studyEntry({
        entryId: `${letter}${i}`,
        revisionId: `${letter}${i}`,
        designer: `designer ${i}`,
        bladesFirst: letter === "a" ? 7 : 9,
        levelDifferenceDb: { value: letter === "a" ? 1 : 1 + change, u: 0.1, dof: 20 },
      }),
    ),
  );
  return { entries, derivations: d.map((_, i) => ({ revisionId: `b${i}`, fromRevisionId: `a${i}` })) };
}

describe("pairs of revisions that differ in one trait", () => {
  it(matched.title, () => {
    const { entries, derivations } = blades(differences);
    const { pairs } = pairsOf(derivations, entries, "level");
    const [effect] = pairEffects(pairs, "level");
    expect(effect).toMatchObject({ key: "blades", pairs: 6, designers: 6, growth: 2, better: 5, sameRound: 6 });
    expect(effect?.estimate).toBeCloseTo(Number(expected.mean), 8);
    const [low = Number.NaN, high = Number.NaN] = nums(expected.ci95);
    expect(effect?.low).toBeCloseTo(low, 8);
    expect(effect?.high).toBeCloseTo(high, 8);
    expect(effect).toMatchObject({ test: "signs", p: Number(expected.p_sign_flip) });
  });

  it("gives no mean of five designers, whose signs can't reach 0.05 (handbook 10.5: pairs ≥ 6)", () => {
    const { entries, derivations } = blades(differences.slice(0, 5));
    const [effect] = pairEffects(pairsOf(derivations, entries, "level").pairs, "level");
    expect(effect).toMatchObject({ pairs: 5, why: "too-few" });
    expect(effect?.estimate).toBeUndefined();
  });

  it("turns a pair that took blades away, so that all say what more blades go with", () => {
    const { entries, derivations } = blades(differences);
    const flipped = derivations.map(({ revisionId, fromRevisionId }) => ({
      revisionId: fromRevisionId,
      fromRevisionId: revisionId,
    }));
    const [effect] = pairEffects(pairsOf(flipped, entries, "level").pairs, "level");
    expect(effect?.estimate).toBeCloseTo(Number(expected.mean), 8);
  });

  it("takes no pair of two changes, of another baseline unit or of another designer, and counts them", () => {
    const from = studyEntry({ entryId: "0", revisionId: "0" });
    const made = (n: number, changes: Partial<StudyEntry>) =>
      studyEntry({ ...from, entryId: `${n}`, revisionId: `${n}`, ...changes });
    const entries = [
      from,
      made(1, { bladesFirst: 9, struts: 5 }),
      made(2, { bladesFirst: 9, baselineUnitId: "other" }),
      made(3, { bladesFirst: 9, designer: "tarn" }),
      made(4, {}),
      made(5, { bladesFirst: 9, solidityMid: (0.9 * 9) / 7, massG: 45 }),
    ];
    const derivations = [1, 2, 3, 4, 5].map((n) => ({ revisionId: `${n}`, fromRevisionId: "0" }));
    const { pairs, counts } = pairsOf(derivations, entries, "equal");
    expect(counts).toMatchObject({ derivations: 5, severalTraits: 1, otherBaseline: 1, otherDesigner: 1, noTrait: 1 });
    // Solidity that follows the number of blades, and mass, are no second difference.
    expect(pairs.map(({ toEntryId, trait }) => [toEntryId, trait])).toEqual([["5", "blades"]]);
  });

  it("sees a change of stack as one trait though its length goes with it", () => {
    const bare = studyEntry();
    expect(differingTraits(bare, studyEntry({ inletStack: "bellmouth", inletStackMm: 20 }))).toEqual(["inlet"]);
    expect(differingTraits(bare, studyEntry({ tipGapMm: 1.04 }))).toEqual([]);
    expect(differingTraits(bare, studyEntry({ tipGapMm: undefined }))).toEqual(["gap"]);
  });

  it("strings pairs that follow one another into a chain", () => {
    const entries = ["a", "b", "c"].map((letter, i) =>
      studyEntry({ entryId: letter, revisionId: letter, seasonNumber: i + 1, pitchMidDeg: 30 + 3 * i }),
    );
    const { pairs } = pairsOf(
      [
        { revisionId: "b", fromRevisionId: "a" },
        { revisionId: "c", fromRevisionId: "b" },
      ],
      entries,
      "equal",
    );
    expect(pairs.map(({ together }) => together)).toEqual(["no", "no"]);
    expect(chainsOf(pairs)).toEqual([[0, 1]]);
  });
});
