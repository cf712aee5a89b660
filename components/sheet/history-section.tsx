import Link from "next/link";
import { BarsTable } from "@/components/ui/bars/bars-table";
import { Section } from "@/components/ui/sheet";
import type { Sheet } from "@/lib/contracts/sheet";
import { formatRank } from "@/lib/format/ranks";
import { listWords } from "@/lib/format/words";

/** Every public entry of the design, as ratios to each session's own baseline. */
export function HistorySection({ sheet }: { sheet: Sheet }) {
  const { history } = sheet;
  const benches = new Set(history.map((each) => each.bench));
  const units = [...new Set(history.flatMap((each) => each.baselineSerial ?? []))];
  return (
    <Section id="seasons" title="Season by season" note="as ratios to each session’s own baseline">
      <BarsTable
        caption="Entries of this design, the newest first"
        columns={[
          { key: "season", head: "Season" },
          { key: "revision", head: "Revision" },
          { key: "bench", head: "Bench" },
          { key: "baseline", head: "Baseline unit", tone: "baseline" },
          { key: "level", head: "Level against baseline, full speed", unit: "dB" },
          { key: "resistance", head: "ΔT/P against baseline, full speed", unit: "%" },
          { key: "equalNoise", head: "ΔT/P at equal noise", unit: "% of baseline" },
          { key: "rank", head: "Rank in its round" },
        ]}
        rows={history.map((each) => ({
          key: each.entryId,
          cells: {
            season: {
              words: (
                <Link
                  href={`/designs/${sheet.slug}?entry=${each.entryId}`}
                  aria-current={each.entryId === sheet.entryId ? "page" : undefined}
                >
                  {each.seasonTitle}, round {each.round}
                </Link>
              ),
            },
            revision: { words: each.letter },
            bench: { words: each.bench },
            baseline: { words: each.baselineSerial ?? "–" },
            level: { figure: { value: each.levelDifferenceDb, decimals: 1, signed: true } },
            resistance: { figure: { value: each.resistancePercent, decimals: 1 } },
            equalNoise: {
              figure: {
                value: each.equalNoisePercent,
                decimals: 1,
                why: `not reached at the season’s headline level, ${each.headlineDba}`,
              },
            },
            rank: {
              words:
                each.roundRank === null || each.roundOf === null
                  ? `not ranked: ${(each.whyNotRanked ?? "no figures").replace(" dB(A)", "")}`
                  : `${formatRank(each.roundRank)} of ${each.roundOf}`,
            },
          },
        }))}
      />
      <p className="small-print mt-2">
        {benches.size > 1 ? "The benches differ, so absolute levels and ΔT don’t stand side by side. " : ""}
        {units.length > 1
          ? `The baseline unit changed (${listWords(units)}): ratios to different units compare only through a bridge, a session that ran both.`
          : "Below 100 % is cooler than the baseline."}
      </p>
    </Section>
  );
}
