import { BarsTable } from "@/components/ui/bars/bars-table";
import type { BarsCell, BarsRow } from "@/components/ui/bars/bars-model";
import { Section } from "@/components/ui/sheet";
import type { ComparedHead, ComparedRank } from "@/lib/contracts/compare";
import { nameOf } from "./names";

function rankCell(rank: ComparedRank | undefined): BarsCell {
  if (!rank) return { figure: { value: null, why: "no standing under this rule" } };
  const { rank: place, rankLow, rankHigh, ranked, whyNotRanked } = rank;
  if (place === null) return { figure: { value: null, why: `not ranked: ${whyNotRanked ?? "no reason was kept"}` } };
  return { words: `${place} (${rankLow}–${rankHigh}) of ${ranked}` };
}

/** Where each stands in its own round and season under every rule, with the 95 % range of its rank. */
export function RanksSection({ heads }: { heads: readonly ComparedHead[] }) {
  const kinds = [
    ...new Map(heads.flatMap(({ ranks }) => ranks).map(({ rule, of }) => [`${rule} ${of}`, { rule, of }])).values(),
  ];
  if (kinds.length === 0) return null;
  const rows = kinds.map(({ rule, of }): BarsRow => ({
    key: `${rule} ${of}`,
    cells: {
      rule: { words: `${rule}, ${of}` },
      ...Object.fromEntries(
        heads.map((head) => [head.entryId, rankCell(head.ranks.find((each) => each.rule === rule && each.of === of))]),
      ),
    },
  }));
  const seasons = new Set(heads.map((head) => head.seasonSlug)).size;
  return (
    <Section id="ranks" title="Rank under each rule">
      <BarsTable
        caption="Rank under each rule, with its 95 % range"
        columns={[
          { key: "rule", head: "Rule" },
          ...heads.map((head) => ({ key: head.entryId, head: nameOf(head, heads) })),
        ]}
        rows={rows}
      />
      <p className="small-print mt-2 max-w-3xl">
        The range holds the rank in 95 of 100 simulated repeats.
        {seasons > 1 || new Set(heads.map((head) => head.roundNumber)).size > 1
          ? " Each rank is among the entries of its own round or season: ranks of different rounds don’t compare."
          : null}
      </p>
    </Section>
  );
}
