import Link from "next/link";
import { BarsTable } from "@/components/ui/bars/bars-table";
import type { BarsColumn, BarsRow } from "@/components/ui/bars/bars-model";
import { LinkButton } from "@/components/ui/button";
import { Section } from "@/components/ui/sheet";
import type { IndexItem } from "@/lib/contracts/index-query";
import { entryToken } from "@/lib/domain/designs/entry-token";
import { formatDate } from "@/lib/format/dates";
import { formatLevel, levelUnit } from "@/lib/format/quantities";

export type LatestRoundProps = {
  seasonSlug: string;
  seasonTitle: string;
  headlineDba: number;
  number: number;
  publishedAt: Date;
  entries: number;
  /** One bench version, protocol and baseline unit: levels and ΔT may stand side by side. */
  oneScale: boolean;
  distanceMm: number | undefined;
  items: readonly IndexItem[];
};

function rowOf(item: IndexItem): BarsRow {
  const { roundRank, roundRankLow, roundRankHigh } = item;
  return {
    key: item.entryId,
    cells: {
      rank: { figure: { value: roundRank, decimals: 0 } },
      range: { words: `${roundRankLow ?? "–"} to ${roundRankHigh ?? "–"}` },
      name: {
        words: <Link href={`/designs/${item.slug}?entry=${item.entryId}`}>{`${item.name} ${item.letter}`}</Link>,
      },
      designer: { words: item.designers.join(", ") },
      equal: {
        figure: { value: item.equalNoiseK, uncertainty: item.uEqualNoiseK, decimals: 1, signed: true },
      },
      ratio: { figure: { value: item.equalNoisePercent, uncertainty: item.uEqualNoisePercent, decimals: 1 } },
      level: {
        figure: {
          value: item.levelFullDba,
          uncertainty: item.uLevelFullDb,
          decimals: 1,
          bound: item.levelFullBound ? "upper" : undefined,
        },
      },
      deltaT: { figure: { value: item.deltaTFullK, uncertainty: item.uDeltaTFullK, decimals: 1 } },
    },
  };
}

const name: BarsColumn = { key: "name", head: "Design" };
const rank: BarsColumn = { key: "rank", head: "Rank" };
const ends: readonly BarsColumn[] = [
  { key: "range", head: "95 % range" },
  { key: "designer", head: "Designer" },
];

/** The round published last and who leads it. */
export function LatestRound(props: LatestRoundProps) {
  const { seasonSlug, seasonTitle, headlineDba, number, publishedAt, entries, oneScale, distanceMm, items } = props;
  const level =
    distanceMm === undefined ? `${headlineDba} dB(A)` : formatLevel(headlineDba, distanceMm, { decimals: 0 });
  const middle: BarsColumn[] =
    oneScale && distanceMm !== undefined
      ? [
          { key: "equal", head: "At equal noise, against baseline", unit: "K", tone: "strong" },
          { key: "level", head: "Level, full speed", unit: levelUnit(distanceMm) },
          { key: "deltaT", head: "ΔT, full speed", unit: "K" },
        ]
      : [{ key: "ratio", head: "ΔT/P at equal noise, of baseline", unit: "%", tone: "strong" }];
  return (
    <Section
      id="latest"
      title={`${seasonTitle}, round ${number}`}
      note={`the latest, published ${formatDate(publishedAt)}`}
      aside={<Link href={`/seasons/${seasonSlug}/rounds/${number}`}>All {entries} entries of the round</Link>}
    >
      <BarsTable
        caption={`The first ${items.length} of ${seasonTitle}, round ${number}, with 95 % intervals`}
        nameColumn="name"
        columns={[rank, name, ...middle, ...ends]}
        rows={items.map(rowOf)}
      />
      <p className="small-print mt-2 max-w-3xl">
        Below zero is cooler than the baseline at the same {level}. Who shares a rank’s range may as well have come in
        the other order.
      </p>
      {items.length > 1 ? (
        <p className="screen-only mt-3">
          <LinkButton
            small
            href={`/compare?entries=${items
              .slice(0, 2)
              .map((item) => entryToken(item))
              .join(",")}`}
          >
            Lay the first two over the baseline
          </LinkButton>
        </p>
      ) : null}
    </Section>
  );
}
