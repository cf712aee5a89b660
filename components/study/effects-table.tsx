import { BarsTable } from "@/components/ui/bars/bars-table";
import { Fold } from "@/components/ui/fold";
import { againstWords, chanceWords, effectName, figureWords, type EffectShown } from "./study-words";

function seasonsWords({ cellsDown = 0, cellsUp = 0 }: EffectShown): string {
  const all = cellsDown + cellsUp;
  return all === 0 ? "none large enough" : `${cellsDown} lower, ${cellsUp} higher`;
}

/** Each effect beside what the trait shows alone, over all and within seasons, and its adjusted p. */
export function EffectsTable({
  effects,
  figure,
}: {
  effects: readonly EffectShown[];
  figure: keyof typeof figureWords;
}) {
  const { unit } = figureWords[figure];
  const part = (value: number | undefined) => ({ figure: { value, decimals: 2, signed: true } });
  return (
    <Fold title="Each effect, alone and together, and which way each season points" className="mt-4">
      <BarsTable
        caption="Effects in the model, and each trait alone"
        columns={[
          { key: "name", head: "Trait" },
          { key: "n", head: "Entries" },
          { key: "estimate", head: "In the model", unit, tone: "strong" },
          { key: "low", head: "From", unit },
          { key: "high", head: "To", unit },
          { key: "p", head: "p" },
          { key: "q", head: "Adjusted p" },
          { key: "within", head: "Alone, within seasons", unit },
          { key: "pooled", head: "Alone, over all", unit },
          { key: "seasons", head: "Seasons, alone" },
          { key: "vif", head: "Variance inflation" },
        ]}
        rows={effects.map((effect) => ({
          key: effect.key,
          tone: effect.reversed ? "wrong" : undefined,
          cells: {
            name: { words: [effectName(effect), againstWords(effect)].filter(Boolean).join(", ") },
            n: { figure: { value: effect.n, decimals: 0 } },
            estimate: part(effect.estimate),
            low: part(effect.low),
            high: part(effect.high),
            p: { words: effect.p === undefined ? "–" : chanceWords(effect.p) },
            q: { words: effect.q === undefined ? "–" : chanceWords(effect.q) },
            within: part(effect.within),
            pooled: part(effect.pooled),
            seasons: { words: seasonsWords(effect) },
            vif: { figure: { value: effect.vif, decimals: 1 } },
          },
        }))}
      />
    </Fold>
  );
}
