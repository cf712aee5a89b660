import type { Sheet, SheetRank } from "@/lib/contracts/sheet";
import { formatMeasured, type Measured } from "@/lib/format/measured";
import { formatDate } from "@/lib/format/dates";
import { formatRange, levelUnit } from "@/lib/format/quantities";
import { formatRank, formatRankRange } from "@/lib/format/ranks";
import { FigureBlock, type BigFigure } from "@/components/ui/figure-block";
import { Missing } from "@/components/ui/missing";
import { Section } from "@/components/ui/sheet";
import { copiesAndMounts, whyNotReached } from "./sheet-words";

function measured(
  label: string,
  figure: Measured,
  unit: string,
  href: string,
  heard: string,
  bound = false,
): BigFigure {
  const { value, uncertainty } = formatMeasured({ decimals: 1, ...figure });
  return {
    label,
    value: `${bound ? "≤ " : ""}${value}`,
    note: (
      <>
        ±{uncertainty} {unit} <a href={href}>{heard}</a>
      </>
    ),
  };
}

function place({ rank, low, high, of }: SheetRank): string {
  return rank === null || low === null || high === null
    ? "not ranked"
    : `${formatRank(rank)}, ${formatRankRange(low, high, of)}`;
}

function rankFigure({ ranks, season, round, bench }: Sheet): BigFigure {
  const { then, now } = ranks;
  const roundHref = `/seasons/${season.slug}/rounds/${round}`;
  const seasonHref = `/seasons/${season.slug}`;
  const label = `Rank in round ${round}, 95 % range`;
  const inSeason = ranks.season ? <a href={seasonHref}>now in the season {place(ranks.season)}</a> : null;
  if (!then || then.rank === null || then.low === null || then.high === null) {
    const why = (then?.whyNotRanked ?? "no standing has this entry").replace(
      "dB(A)",
      levelUnit(bench.microphoneDistanceMm),
    );
    return {
      label,
      value: <Missing why={`not ranked: ${why}`} />,
      note: (
        <>
          not ranked: {why} {inSeason}
        </>
      ),
    };
  }
  const moved = now && (now.rank !== then.rank || now.low !== then.low || now.high !== then.high);
  return {
    label,
    value: formatRank(then.rank),
    href: roundHref,
    note: (
      <>
        {formatRankRange(then.low, then.high, then.of)} at publication
        {moved ? (
          <>
            ;{" "}
            <a href={roundHref}>
              {place(now)} since {formatDate(now.asOf)}
            </a>
          </>
        ) : null}
        {inSeason ? <>; {inSeason}</> : null}
      </>
    ),
  };
}

/** The four figures that matter, big, each leading to where it comes from. */
export function FourFigures({ sheet }: { sheet: Sheet }) {
  const headline = sheet.equalNoise.find((reading) => reading.levelDba === sheet.headlineDba);
  const distance = sheet.bench.microphoneDistanceMm;
  const at = `${sheet.headlineDba} ${levelUnit(distance)}`;
  const noiseLabel = "ΔT against baseline, equal noise";
  const coolingLabel = "Level against baseline, equal ΔT";
  const equalNoise: BigFigure = headline?.reached
    ? measured(
        noiseLabel,
        { value: headline.reached.differenceK.value, uncertainty: headline.reached.differenceK.u95, signed: true },
        "K",
        "#budget",
        `at ${at}; how sure`,
        headline.reached.upperBound,
      )
    : {
        label: noiseLabel,
        value: <Missing why={whyNotReached(headline?.why ?? null)} />,
        note: `not reached at ${at}`,
      };
  const cooling = sheet.equalCooling;
  const equalCooling: BigFigure = cooling
    ? measured(
        coolingLabel,
        { value: cooling.differenceDb.value, uncertainty: cooling.differenceDb.u95, signed: true },
        "dB",
        sheet.budgets ? "#budget-equal-cooling" : "#cooling",
        `at the baseline’s ΔT at ${at}; how sure`,
      )
    : {
        label: coolingLabel,
        value: <Missing why="this design never runs at the baseline's ΔT at that level" />,
        note: `not reached at the baseline’s ΔT at ${at}`,
      };
  const { low, lowIsBound, high } = sheet.levelRangeDba;
  const range: BigFigure = {
    label: "Measured range",
    value: `${lowIsBound ? "≤ " : ""}${formatRange(low, high)}`,
    note: <a href="#readings">{levelUnit(distance)}</a>,
  };
  return (
    <Section id="figures" tone="bar" tight>
      <h2 className="sr-only">The four figures</h2>
      <FigureBlock figures={[equalNoise, equalCooling, rankFigure(sheet), range]} />
      <p className="small-print mt-2">
        ± is 95 % coverage; {copiesAndMounts(sheet)}
        {sheet.specimens.length <= 1 ? "; copy-to-copy spread is not included" : ""}. Minus is cooler, minus is quieter.
      </p>
    </Section>
  );
}
