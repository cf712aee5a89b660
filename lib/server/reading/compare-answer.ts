import { compareAnswerSchema, type CompareAnswer } from "@/lib/contracts/compare";
import { compareFigures, pointsWithIntervals } from "@/lib/domain/results/compare-figures";
import { readingLevel } from "@/lib/domain/results/compare-levels";
import { layOver } from "@/lib/domain/results/lay-over";
import { ExpectedError } from "@/lib/domain/expected-error";
import { findEntries } from "./find-entries";
import { readCompare, type CompareSheet } from "./read-compare";

/**
 * The comparison as programs get it: figures at one level where the entries share an axis, else each at its own
 * season's headline level. Without one axis there are no points and no K; without one baseline unit no differences
 * between entries.
 *
 * @param named entries by id or name, as the address has them
 * @throws ExpectedError not_found when none of them is public
 */
export async function compareAnswer({
  named,
  levelDba,
}: {
  named: readonly string[];
  levelDba: number | undefined;
}): Promise<CompareAnswer> {
  const { entries, missing } = await findEntries({ named });
  if (entries.length === 0) throw new ExpectedError("not_found", "None of these entries is public.");
  const sheet = await readCompare({ entryIds: entries.map((entry) => entry.entryId) });
  return answerAt({ ...sheet, missing }, levelDba);
}

function answerAt(sheet: CompareSheet, levelDba: number | undefined): CompareAnswer {
  const laid = layOver(sheet.laid);
  const oneAxis = sheet.comparability === "same-axis";
  const headline = new Map(sheet.entries.map((entry) => [entry.entryId, entry.headlineDba]));
  const common = readingLevel(laid, { asked: levelDba, headlineDba: sheet.entries[0]?.headlineDba ?? Number.NaN });
  const figures = compareFigures(
    laid,
    (id) => (oneAxis ? common : (headline.get(id) ?? Number.NaN)),
    (id) => sheet.entries.find((entry) => entry.entryId === id)?.bridge ?? undefined,
  );
  return compareAnswerSchema.parse({
    comparability: sheet.comparability,
    missing: sheet.missing,
    entries: sheet.entries.map((entry) => {
      const own = laid.find((each) => each.id === entry.entryId);
      const figure = figures.entries.find((each) => each.id === entry.entryId);
      if (!own || !figure) throw new Error(`the entry ${entry.entryId} has no session`);
      const { id: _id, deltaTK, differenceK, baselineDeltaTK, ...ratios } = figure;
      return {
        ...entry,
        // Levels of bands and tones and loudness are absolute.
        spectra: oneAxis ? entry.spectra : null,
        points: oneAxis ? pointsWithIntervals(own) : [],
        baselinePoints: oneAxis ? pointsWithIntervals(own.baseline) : [],
        atLevel: oneAxis ? { ...ratios, deltaTK, differenceK, baselineDeltaTK } : ratios,
      };
    }),
    pairs:
      sheet.comparability === "not-comparable"
        ? []
        : figures.pairs.map(({ deltaTK, coolingDb, ...pair }) => (oneAxis ? { ...pair, deltaTK, coolingDb } : pair)),
    traits: sheet.traits,
  });
}
