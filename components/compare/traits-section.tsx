import { BarsTable } from "@/components/ui/bars/bars-table";
import type { BarsRow } from "@/components/ui/bars/bars-model";
import { Missing } from "@/components/ui/missing";
import { Fold } from "@/components/ui/fold";
import { Section } from "@/components/ui/sheet";
import type { ComparedHead, ComparedTrait } from "@/lib/contracts/compare";
import { nameOf } from "./names";

type Props = { heads: readonly ComparedHead[]; traits: readonly ComparedTrait[] };

const notDeclared = { words: <Missing why="not declared" /> };
const ofBaseline = { words: <Missing why="not declared for the baseline" /> };

function TraitTable({ heads, traits, caption }: Props & { caption: string }) {
  const rows = traits.map((trait): BarsRow => ({
    key: trait.key,
    cells: {
      trait: { words: trait.unit ? `${trait.label}, ${trait.unit}` : trait.label },
      ...Object.fromEntries(
        heads.map((head, index) => {
          const value = trait.values[index];
          return [head.entryId, value === null || value === undefined ? notDeclared : { words: value }];
        }),
      ),
      baseline: trait.baseline === null ? ofBaseline : { words: trait.baseline },
    },
  }));
  return (
    <BarsTable
      caption={caption}
      columns={[
        { key: "trait", head: "Trait" },
        ...heads.map((head) => ({ key: head.entryId, head: nameOf(head, heads) })),
        { key: "baseline", head: "Baseline", tone: "baseline" as const },
      ]}
      rows={rows}
    />
  );
}

/** Traits that differ between the entries, the baseline's beside them; those they share are folded away. */
export function TraitsSection({ heads, traits }: Props) {
  const differing = traits.filter((trait) => trait.differs);
  const shared = traits.filter((trait) => !trait.differs);
  return (
    <Section id="traits" title={heads.length > 1 ? "Traits that differ" : "Traits"}>
      {differing.length > 0 ? (
        <TraitTable heads={heads} traits={differing} caption="Traits that differ" />
      ) : heads.length > 1 ? (
        <p>All declared traits are the same.</p>
      ) : null}
      {heads.length === 1 ? (
        <TraitTable heads={heads} traits={shared} caption="Traits" />
      ) : (
        <Fold title={`Traits they share (${shared.length})`} className="mt-3">
          <TraitTable heads={heads} traits={shared} caption="Traits they share" />
        </Fold>
      )}
    </Section>
  );
}
