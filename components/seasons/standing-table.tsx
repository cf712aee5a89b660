import Link from "next/link";
import { BarsTable } from "@/components/ui/bars/bars-table";
import type { BarsColumn, BarsRow } from "@/components/ui/bars/bars-model";
import type { Standing, StandingRow } from "@/lib/contracts/seasons";
import { formatNumber } from "@/lib/format/numbers";
import { formatRank } from "@/lib/format/ranks";
import { listWords } from "@/lib/format/words";
import { RankRange } from "./rank-range";

/** The equal-noise score is a ratio: people read it in % of the baseline's. */
export function scoreOf(standing: Standing, score: number): string {
  return standing.rule.kind === "equal-noise"
    ? formatNumber(100 * score, { decimals: 1 })
    : formatNumber(score, { decimals: 2 });
}

export function scoreUnit(standing: Standing): string {
  return standing.rule.kind === "equal-noise" ? "% of baseline" : standing.rule.unit;
}

/** "< 0.01" for what 10 000 draws never or hardly saw. */
export function chance(pFirst: number | null): string {
  if (pFirst === null) return "–";
  return pFirst < 0.01 ? "< 0.01" : formatNumber(pFirst, { decimals: 2 });
}

export type StandingTableProps = {
  standing: Standing;
  caption: string;
  /** The unit of the levels that reasons name. */
  unit: string;
  /** The season's standing says in which round each entry was measured. */
  seasonSlug?: string;
};

function columns(standing: Standing, seasonSlug: string | undefined): BarsColumn[] {
  return [
    { key: "name", head: "Design" },
    { key: "rank", head: "Rank", short: true },
    { key: "range", head: "95 % range of the rank" },
    { key: "score", head: "Score", unit: scoreUnit(standing) },
    { key: "deltaT", head: "ΔT against baseline, equal noise", unit: "K" },
    ...(standing.rows.some((row) => row.letters) ? [{ key: "letters", head: "Not told apart", short: true }] : []),
    { key: "first", head: "Chance of first", short: true },
    ...(seasonSlug ? [{ key: "round", head: "Round", short: true }] : []),
    ...(standing.rule.kind === standing.seasonRule
      ? []
      : [{ key: "byRule", head: "Rank by the season’s rule", short: true }]),
    { key: "by", head: "By" },
  ];
}

function nameCell(row: StandingRow) {
  const words = `${row.name}\u00a0${row.letter}`;
  if (!row.slug) return <>{words} (withdrawn)</>;
  return <Link href={`/designs/${row.slug}?entry=${row.entryId}`}>{words}</Link>;
}

function rowOf(row: StandingRow, of: number, { standing, seasonSlug, unit }: StandingTableProps): BarsRow {
  const ranked = row.rank !== null && row.rankLow !== null && row.rankHigh !== null;
  const why = row.whyNotRanked ? `not ranked: ${row.whyNotRanked.replace("dB(A)", unit)}` : "not ranked";
  return {
    key: row.entryId,
    cells: {
      name: { words: nameCell(row) },
      rank: { words: ranked ? formatRank(row.rank ?? 1) : "–" },
      range: {
        words: ranked ? (
          <RankRange rank={row.rank ?? 1} low={row.rankLow ?? 1} high={row.rankHigh ?? 1} of={of} />
        ) : (
          why
        ),
      },
      score:
        row.score === null
          ? { figure: { value: null, why } }
          : { figure: { value: standing.rule.kind === "equal-noise" ? 100 * row.score : row.score, decimals: 2 } },
      deltaT: {
        figure: { value: row.equalNoiseK, decimals: 1, signed: true, why: "not reached at the headline level" },
      },
      letters: { words: <span className="figures">{row.letters ?? "–"}</span> },
      first: { words: <span className="figures">{chance(row.pFirst)}</span> },
      round: {
        words: row.round === null ? "–" : <Link href={`/seasons/${seasonSlug}/rounds/${row.round}`}>{row.round}</Link>,
      },
      byRule: { words: row.rankByRule === null ? "–" : formatRank(row.rankByRule) },
      by: { words: listWords(row.designers.length > 0 ? row.designers : ["–"]) },
    },
  };
}

/** Ranks with their ranges, best first; those not ranked last, with the reason. */
export function StandingTable(props: StandingTableProps) {
  const { standing, caption, seasonSlug } = props;
  const of = standing.rows.filter((row) => row.rank !== null).length;
  return (
    <BarsTable
      caption={caption}
      columns={columns(standing, seasonSlug)}
      rows={standing.rows.map((row) => rowOf(row, of, props))}
    />
  );
}
