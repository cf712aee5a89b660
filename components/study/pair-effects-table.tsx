import { BarsTable } from "@/components/ui/bars/bars-table";
import { traitOf } from "@/lib/domain/study/traits";
import { formatNumber } from "@/lib/format/numbers";
import { chanceWords, figureWords, unitAfter, valueWords, type Result } from "./study-words";

type PairEffect = Result["pairEffects"][number];

function nameOf({ trait, from, to, growth }: PairEffect): string {
  const { label, unit } = traitOf(trait);
  if (from !== undefined && to !== undefined) return `${label}: ${valueWords(trait, from)} → ${valueWords(trait, to)}`;
  const by = growth === undefined ? "" : `, by ${formatNumber(growth, { decimals: Number.isInteger(growth) ? 0 : 1 })}`;
  return `${label} up${by}${by ? unitAfter(unit) : ""}`;
}

const few = "too few to tell: six designers are needed for an interval";

/** What the pairs of one change have in common: counts always, a mean from six designers on. */
export function PairEffectsTable({
  effects,
  figure,
}: {
  effects: readonly PairEffect[];
  figure: keyof typeof figureWords;
}) {
  const { unit, short } = figureWords[figure];
  return (
    <>
      <BarsTable
        caption="What pairs of one change have in common"
        columns={[
          { key: "name", head: "Change" },
          { key: "pairs", head: "Pairs" },
          { key: "designers", head: "Designers" },
          { key: "better", head: "Became better" },
          { key: "mean", head: `${short}, mean change`, unit, tone: "strong" },
          { key: "low", head: "From", unit },
          { key: "high", head: "To", unit },
          { key: "q", head: "Adjusted p" },
        ]}
        rows={effects.map((effect) => {
          const part = (value: number | undefined) => ({
            figure: { value, decimals: 2, signed: true, why: few },
          });
          return {
            key: effect.key,
            cells: {
              name: { words: nameOf(effect) },
              pairs: { figure: { value: effect.pairs, decimals: 0 } },
              designers: { figure: { value: effect.designers, decimals: 0 } },
              better: { words: `${effect.better} of ${effect.pairs}` },
              mean: part(effect.estimate),
              low: part(effect.low),
              high: part(effect.high),
              q: effect.q === undefined ? { figure: { value: undefined, why: few } } : { words: chanceWords(effect.q) },
            },
          };
        })}
      />
      <p className="small-print mt-2">
        Mean over designers, each one’s pairs averaged first; from and to: 95 % interval by t over designers. p by every
        flip of the designers’ signs up to sixteen of them, above by t. The typical step stands with each measure.
      </p>
    </>
  );
}
