import { BarsTable } from "@/components/ui/bars/bars-table";
import { Section } from "@/components/ui/sheet";
import { SmallHistogram } from "@/components/ui/small-histogram";
import type { StudyAnswer } from "@/lib/contracts/study";
import { outcomeKeys } from "@/lib/domain/study/outcomes";
import { traitOf } from "@/lib/domain/study/traits";
import { formatNumber } from "@/lib/format/numbers";
import { formatRange } from "@/lib/format/quantities";
import { countWords } from "@/lib/format/words";
import { DownloadLink } from "./download-links";
import { SpreadOverview } from "./spread-overview";
import { figureIn, figureWords, levelWords, type Result, type SpreadShown } from "./study-words";

type Distribution = Result["distributions"][number];
type Figure = keyof typeof figureWords;

function medianWords(spread: SpreadShown, unit: string): string {
  if (spread.median === undefined)
    return spread.n === 0
      ? "none reached it"
      : `${(spread.values ?? []).map((v) => figureIn(unit, v)).join(", ")}: too few to tell`;
  const decimals = unit === "%" ? 1 : 2;
  const interval =
    spread.low === undefined || spread.high === undefined
      ? "too few for an interval"
      : `${formatRange(spread.low, spread.high, { decimals })}`;
  return `median ${figureIn(unit, spread.median)} (${interval})`;
}

/** One level: how its entries are spread, on the trait's common axis. */
function LevelPicture({
  distribution,
  level,
  figure,
}: {
  distribution: Distribution;
  level: Distribution["levels"][number];
  figure: Figure;
}) {
  const { from, width } = distribution.bins;
  const { unit } = figureWords[figure];
  const spread = level.spreads[figure];
  const name = levelWords(distribution.trait, level);
  const bins = (level.counts ?? []).map((count, i) => ({ from: from + i * width, to: from + (i + 1) * width, count }));
  return (
    <figure className="m-0 min-w-0">
      <figcaption>
        <span className="font-bold">{name}</span> <span className="figures text-soft">n = {spread.n}</span>
      </figcaption>
      {bins.length > 0 ? (
        <SmallHistogram
          bins={bins}
          summary={`${name}: ${countWords(spread.n, "entry", "entries")}, ${medianWords(spread, unit)}`}
        />
      ) : null}
      <p className="figures text-sm">{medianWords(spread, unit)}</p>
    </figure>
  );
}

function LevelsTable({ distribution }: { distribution: Distribution }) {
  const { label } = traitOf(distribution.trait);
  return (
    <BarsTable
      caption={`${label}: all three figures by level`}
      columns={[
        { key: "name", head: label },
        ...outcomeKeys.flatMap((key) => [
          { key: `${key}-n`, head: "n" },
          { key, head: `${figureWords[key].short}, median`, unit: figureWords[key].unit },
          { key: `${key}-low`, head: "From" },
          { key: `${key}-high`, head: "To" },
        ]),
      ]}
      rows={distribution.levels.map((level) => ({
        key: level.key,
        cells: {
          name: { words: levelWords(distribution.trait, level) },
          ...Object.fromEntries(
            outcomeKeys.flatMap((key) => {
              const { n, median, low, high } = level.spreads[key];
              const decimals = figureWords[key].unit === "%" ? 1 : 2;
              const part = (value: number | undefined, why: string) => ({ figure: { value, decimals, why } });
              return [
                [`${key}-n`, { figure: { value: n, decimals: 0 } }],
                [key, part(median, "too few to tell: fewer than four")],
                [`${key}-low`, part(low, "too few for an interval: fewer than six")],
                [`${key}-high`, part(high, "too few for an interval: fewer than six")],
              ];
            }),
          ),
        },
      }))}
    />
  );
}

function TraitSpread({ distribution, figure }: { distribution: Distribution; figure: Figure }) {
  const { bins } = distribution;
  const { unit } = figureWords[figure];
  const decimals = unit === "%" ? 1 : 2;
  return (
    <div className="grid gap-3">
      <div className="grid gap-x-6 gap-y-4 grid-cols-[repeat(auto-fill,minmax(11rem,1fr))]">
        {distribution.levels.map((level) => (
          <LevelPicture key={level.key} distribution={distribution} level={level} figure={figure} />
        ))}
      </div>
      {bins.count > 0 ? (
        <p className="small-print">
          All from {formatNumber(bins.from, { decimals })} to{" "}
          {formatNumber(bins.from + bins.count * bins.width, { decimals })} {unit}, left is better; each to its own
          height.
          {distribution.without > 0
            ? ` ${countWords(distribution.without, "entry has", "entries have")} none of it.`
            : ""}
        </p>
      ) : null}
      <LevelsTable distribution={distribution} />
    </div>
  );
}

/** How the figure is spread over the levels of each trait, on one scale of small pictures a trait. */
export function SpreadSection({ question, result }: Pick<StudyAnswer, "question" | "result">) {
  const { overall, otherBaseline } = result;
  const { unit, short } = figureWords[question.figure];
  return (
    <Section
      id="spread"
      title="How entries are spread"
      note="medians with 95 % intervals by order statistics"
      aside={<DownloadLink question={question} table="distribution" />}
    >
      <p className="mb-3 max-w-3xl">
        {short}, {unit === "%" ? "in % of the baseline’s" : "against the baseline’s"}: over all{" "}
        {countWords(overall.n, "entry", "entries")}, {medianWords(overall, unit)}.
        {otherBaseline > 0
          ? ` ${countWords(otherBaseline, "entry", "entries")} measured against another baseline unit are left out here: not comparable.`
          : ""}
      </p>
      {question.trait === null ? (
        <SpreadOverview question={question} distributions={result.distributions} />
      ) : (
        result.distributions.map((distribution) => (
          <div key={distribution.trait} className="mb-6">
            <h3 className="mb-2">{traitOf(distribution.trait).label}</h3>
            <TraitSpread distribution={distribution} figure={question.figure} />
          </div>
        ))
      )}
    </Section>
  );
}
