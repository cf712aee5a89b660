import Link from "next/link";
import { BarsTable } from "@/components/ui/bars/bars-table";
import { studyAddress, type StudyQuestion } from "@/lib/contracts/study-question";
import { traitOf } from "@/lib/domain/study/traits";
import { figureIn, figureWords, levelWords, type Result } from "./study-words";

type Distribution = Result["distributions"][number];

/** The levels of lowest and highest median, of those that have one. */
function ends({ levels }: Distribution, figure: StudyQuestion["figure"]) {
  const sorted = levels
    .flatMap((level) => {
      const { median, n } = level.spreads[figure];
      return median === undefined ? [] : [{ level, median, n }];
    })
    .sort((a, b) => a.median - b.median);
  return sorted.length < 2 ? undefined : { lowest: sorted[0], highest: sorted.at(-1) };
}

/** One line a trait, each leading to the trait by itself, where every level has its picture. */
export function SpreadOverview({
  question,
  distributions,
}: {
  question: StudyQuestion;
  distributions: readonly Distribution[];
}) {
  const { unit } = figureWords[question.figure];
  return (
    <BarsTable
      caption="Levels of each trait with the lowest and the highest median"
      columns={[
        { key: "trait", head: "Trait" },
        { key: "n", head: "Entries" },
        { key: "low", head: "Lowest median" },
        { key: "high", head: "Highest median" },
      ]}
      rows={distributions.map((distribution) => {
        const { trait, levels } = distribution;
        const found = ends(distribution, question.figure);
        const said = (end: NonNullable<typeof found>["lowest"]) =>
          end
            ? { words: `${levelWords(trait, end.level)}: ${figureIn(unit, end.median)}, n = ${end.n}` }
            : { figure: { value: undefined, why: "too few to tell: two levels of four entries are needed" } };
        return {
          key: trait,
          cells: {
            trait: { words: <Link href={studyAddress({ ...question, trait })}>{traitOf(trait).label}</Link> },
            n: {
              figure: {
                value: levels.reduce((total, { spreads }) => total + spreads[question.figure].n, 0),
                decimals: 0,
              },
            },
            low: said(found?.lowest),
            high: said(found?.highest),
          },
        };
      })}
    />
  );
}
