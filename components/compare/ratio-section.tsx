import { Notice } from "@/components/ui/notice";
import { Section } from "@/components/ui/sheet";
import type { ComparedHead } from "@/lib/contracts/compare";
import { compareFigures } from "@/lib/domain/results/compare-figures";
import type { Comparability } from "@/lib/domain/results/compare-levels";
import type { LaidEntry } from "@/lib/domain/results/lay-over";
import { formatLevel } from "@/lib/format/quantities";
import { listWords } from "@/lib/format/words";
import { equalNoiseWords } from "./compare-words";
import { RatioTable } from "./level-tables";
import { nameOf } from "./names";

export type RatioSectionProps = {
  heads: readonly ComparedHead[];
  laid: readonly LaidEntry[];
  comparability: Exclude<Comparability, "same-axis">;
};

const said = {
  ratios: {
    title: "Not on one axis: as ratios",
    text: "These were measured on different bench versions, by different protocols or against different baseline units, so no level and no ΔT of one stands beside another’s. What stands here is each against the baseline of its own session, at its own season’s headline level.",
  },
  "not-comparable": {
    title: "Not comparable with each other",
    text: "These ran against different baseline units, and there is no published bridge, a session that ran both, to carry one over to the other. Each figure holds against its own baseline only; no difference between the entries is given.",
  },
} as const;

/** Entries that share no axis: each against its own baseline, and why it goes no further. */
export function RatioSection({ heads, laid, comparability }: RatioSectionProps) {
  const headOf = (id: string) => heads.find((head) => head.entryId === id);
  const figures = compareFigures(
    laid,
    (id) => headOf(id)?.headlineDba ?? Number.NaN,
    (id) => headOf(id)?.bridge ?? undefined,
  );
  const bridged = heads.filter((head) => head.bridge !== null);
  const name = (id: string) => {
    const head = headOf(id);
    return head ? nameOf(head, heads) : id;
  };
  const place = (id: string) => {
    const head = headOf(id);
    if (!head) return "";
    const level = formatLevel(head.headlineDba, head.distanceMm, { decimals: 0 });
    return `${head.seasonTitle} at ${level}; ${head.bench}; ${head.baselineUnit}`;
  };
  const words = comparability === "ratios" ? equalNoiseWords(figures.pairs, name, false) : [];
  return (
    <Section id="ratios" title="Against each one’s own baseline">
      <Notice title={said[comparability].title} className="mb-4 max-w-3xl">
        <p>
          {said[comparability].text}
          {comparability === "ratios" && bridged.length === 0 ? " The baseline unit is the same." : null}
        </p>
        {bridged.length > 0 ? (
          <p className="mt-1">
            The sentences below carry {listWords(bridged.map((head) => nameOf(head, heads)))} over to{" "}
            {heads[0]?.baselineUnit} by a bridge, a session that ran both units; its uncertainty is added.
          </p>
        ) : null}
      </Notice>
      <RatioTable entries={figures.entries} name={name} place={place} />
      <div className="mt-3 grid gap-1">
        {words.map((sentence) => (
          <p key={sentence}>{sentence}</p>
        ))}
      </div>
    </Section>
  );
}
