import type { BudgetLine, Budgets } from "@/lib/contracts/publication";
import type { Sheet, SheetPoint } from "@/lib/contracts/sheet";
import { formatNumber } from "@/lib/format/numbers";
import { levelUnit } from "@/lib/format/quantities";

type Stated = SheetPoint["levelDba"];

/** A figure with its budget, ready to be shown. */
export type FigureBudget = {
  id: string;
  title: string;
  stated: Stated;
  /** "" for a ratio. */
  unit: string;
  decimals: number;
  lines: BudgetLine[];
};

const kept = {
  "equal-cooling": { title: "Level against the baseline at equal ΔT", unit: "dB", decimals: 2 },
  level: { title: "Level", unit: "dB", decimals: 2 },
  "delta-t": { title: "ΔT", unit: "K", decimals: 2 },
  "level-difference": { title: "Level against the baseline", unit: "dB", decimals: 2 },
  "delta-t-difference": { title: "ΔT against the baseline", unit: "K", decimals: 2 },
  "resistance-ratio": { title: "ΔT/P over the baseline’s", unit: "", decimals: 4 },
} as const;

/** Budgets of the sheet's four figures beside the first, and of each set speed's figures. Empty where none were kept. */
export function budgetedFigures(sheet: Sheet): {
  four: FigureBudget[];
  bySpeed: { setSpeed: number; title: string; budgets: FigureBudget[] }[];
} {
  const all = sheet.budgets;
  if (!all) return { four: [], bySpeed: [] };
  const told = all.figures.flatMap(({ figure, setSpeed, lines }) => {
    const stated = statedOf(sheet, figure, setSpeed);
    if (!stated) return [];
    const id = `budget-${figure}${setSpeed === null ? "" : `-${setSpeed}`}`;
    return [{ figure, setSpeed, budget: { id, ...kept[figure], stated, lines: withParts(lines, all.parts) } }];
  });
  const unit = sheet.protocol.setting === "rpm" ? "rpm" : "% drive";
  const levels = told.filter((each) => each.figure === "level");
  const ends = [levels[0], levels.at(-1)].filter((each, n, both) => each && both.indexOf(each) === n);
  return {
    four: [
      ...told.filter((each) => each.figure === "equal-cooling").map((each) => each.budget),
      ...ends.flatMap((each) =>
        each
          ? [
              {
                ...each.budget,
                id: `budget-range-${each.setSpeed}`,
                title: `Measured range: level at ${formatNumber(each.setSpeed ?? 0)} ${unit}, ${levelUnit(sheet.bench.microphoneDistanceMm)}`,
              },
            ]
          : [],
      ),
    ],
    bySpeed: sheet.points.flatMap(({ setSpeed }) => {
      const budgets = told.filter((each) => each.setSpeed === setSpeed).map((each) => each.budget);
      const title = `Every figure at ${formatNumber(setSpeed)} ${unit}`;
      return budgets.length > 0 ? [{ setSpeed, title, budgets }] : [];
    }),
  };
}

function statedOf(sheet: Sheet, figure: keyof typeof kept, setSpeed: number | null): Stated | undefined {
  const point = sheet.points.find((each) => each.setSpeed === setSpeed);
  const against = sheet.against.find((each) => each.setSpeed === setSpeed);
  return {
    "equal-cooling": sheet.equalCooling?.differenceDb,
    level: point?.levelDba,
    "delta-t": point?.deltaTK,
    "level-difference": against?.levelDifferenceDb,
    "delta-t-difference": against?.deltaTDifferenceK,
    "resistance-ratio": against?.resistanceRatio,
  }[figure];
}

function withParts(lines: Budgets["figures"][number]["lines"], parts: Budgets["parts"]): BudgetLine[] {
  return lines.map((line) => ({
    ...line,
    parts: parts
      .filter((part) => part.quantity === line.quantity && part.kind === line.kind)
      .map(({ name, evaluation, u, source }) => ({ name, evaluation, u, source })),
  }));
}
