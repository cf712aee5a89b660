import { studyEntries, studyNames } from "@/db/queries/shown/study";
import type { StudyAnswer } from "@/lib/contracts/study";
import type { StudyQuestion, StudyTable } from "@/lib/contracts/study-question";
import { outcomes, shownValue } from "@/lib/domain/study/outcomes";
import { cellOf, type StudyEntry } from "@/lib/domain/study/study-entry";
import { traitKeys, traitOf } from "@/lib/domain/study/traits";
import { writeCsv, type CsvCell } from "@/lib/format/csv";
import { oneView, scopeOf } from "./compute-study";
import { readStudy } from "./read-study";

interface Table {
  head: readonly string[];
  rows: readonly (readonly CsvCell[])[];
}

const cell = (value: number | string | undefined): CsvCell => value ?? null;

function effects({ question, result }: StudyAnswer): Table {
  const { unit } = outcomes[question.figure];
  const two = result.two?.within ?? [];
  const all = [
    ...result.fit.effects.map((effect) => ({ where: "all", effect })),
    ...two.flatMap(({ level, effects: list }) => list.map((effect) => ({ where: level.key, effect }))),
  ];
  return {
    head: [
      "within_level",
      "trait",
      "level",
      "reference",
      "per_step",
      "step_unit",
      "effect",
      "effect_unit",
      "low_95",
      "high_95",
      "p",
      "q_benjamini_hochberg",
      "n",
      "vif",
      "pooled_alone",
      "within_cells_alone",
      "cells_lower",
      "cells_higher",
      "not_given_because",
    ],
    rows: all.map(({ where, effect }) => [
      where,
      effect.trait,
      cell(effect.level),
      cell(effect.reference),
      cell(effect.step),
      traitOf(effect.trait).unit || null,
      cell(effect.estimate),
      unit,
      cell(effect.low),
      cell(effect.high),
      cell(effect.p),
      cell(effect.q),
      effect.n,
      cell(effect.vif),
      cell(effect.pooled),
      cell(effect.within),
      cell(effect.cellsDown),
      cell(effect.cellsUp),
      cell(effect.why),
    ]),
  };
}

function pairs({ question, result, names }: StudyAnswer): Table {
  const { unit } = outcomes[question.figure];
  return {
    head: ["design", "from_revision", "from_season", "to_design", "to_revision", "to_season", "trait"].concat([
      "from",
      "to",
      "trait_unit",
      "change",
      "change_unit",
      "half_width_95",
      "measured_together",
    ]),
    rows: result.pairs.map((pair) => {
      const [from, to] = [names[pair.fromEntryId], names[pair.toEntryId]];
      return [
        cell(from?.slug),
        cell(from?.letter),
        cell(from?.seasonSlug),
        cell(to?.slug),
        cell(to?.letter),
        cell(to?.seasonSlug),
        pair.trait,
        pair.fromValue,
        pair.toValue,
        traitOf(pair.trait).unit || null,
        pair.change,
        unit,
        pair.expanded,
        pair.together,
      ];
    }),
  };
}

function distribution({ result }: StudyAnswer): Table {
  return {
    head: [
      "trait",
      "level",
      "from",
      "to",
      "figure",
      "unit",
      "n",
      "median",
      "low_95",
      "high_95",
      "quartile_1",
      "quartile_3",
    ],
    rows: result.distributions.flatMap(({ trait, levels }) =>
      levels.flatMap(({ key, from, to, spreads }) =>
        Object.entries(spreads).map(([figure, spread]) => [
          trait,
          key,
          cell(from),
          cell(to),
          figure,
          outcomes[figure as keyof typeof outcomes].unit,
          spread.n,
          cell(spread.median),
          cell(spread.low),
          cell(spread.high),
          cell(spread.quartileLow),
          cell(spread.quartileHigh),
        ]),
      ),
    ),
  };
}

/** The entries that the figures rest on, a row each, as the regression reads them; no names of people. */
async function entryTable(question: StudyQuestion): Promise<Table> {
  const { entries, names } = await oneView(async (db) => {
    const { scope } = await scopeOf(db, question);
    const named = scope ? await studyNames(db, scope) : [];
    return {
      entries: scope ? await studyEntries(db, scope) : [],
      names: new Map(named.map((each) => [each.entryId, each])),
    };
  });
  const cells = numbersOf(entries, cellOf);
  const designers = numbersOf(entries, ({ designer }) => designer);
  const { unit } = outcomes[question.figure];
  return {
    head: [
      "entry_id",
      "design",
      "revision",
      "season",
      "cell",
      "designer_number",
      ...traitKeys,
      `figure_${unit === "%" ? "percent" : "db"}`,
    ],
    rows: entries.map((entry) => {
      const name = names.get(entry.entryId);
      return [
        entry.entryId,
        cell(name?.slug),
        cell(name?.letter),
        entry.seasonNumber,
        cells.get(cellOf(entry)) ?? null,
        designers.get(entry.designer) ?? null,
        ...traitKeys.map((key) => cell(traitOf(key).of(entry))),
        cell(shownValue(question.figure, entry)),
      ];
    }),
  };
}

function numbersOf(entries: readonly StudyEntry[], keyOf: (entry: StudyEntry) => string): Map<string, number> {
  const numbers = new Map<string, number>();
  for (const entry of entries) if (!numbers.has(keyOf(entry))) numbers.set(keyOf(entry), numbers.size + 1);
  return numbers;
}

/** One of a study's tables as CSV, with a file name for it. Missing figures are empty cells. */
export async function studyCsv(question: StudyQuestion, table: StudyTable): Promise<{ name: string; text: string }> {
  const made =
    table === "entries"
      ? await entryTable(question)
      : { effects, pairs, distribution }[table](await readStudy(question));
  const about = [question.trait ?? "all", question.by].filter((part) => part !== null).join("-by-");
  return { name: `traits-${about}-${table}.csv`, text: writeCsv(made.head, made.rows) };
}
