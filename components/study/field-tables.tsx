import Link from "next/link";
import type { BarsCell } from "@/components/ui/bars/bars-model";
import { BarsTable } from "@/components/ui/bars/bars-table";
import { Section } from "@/components/ui/sheet";
import { CLASS_MIN, type Field } from "@/lib/domain/study/field";
import type { OutcomeKey } from "@/lib/domain/study/outcomes";
import { traitOf, type TraitKey } from "@/lib/domain/study/traits";
import { formatNumber } from "@/lib/format/numbers";
import { countWords } from "@/lib/format/words";
import { decimalsOfFigure, entryName, worth, type FieldName, type FieldNames } from "./field-words";
import { figureWords, valueWords } from "./study-words";

type FieldTableProps = { field: Field; names: FieldNames; figure: OutcomeKey };

/** Designs of the class that are most alike in their traits. */
export function FieldNeighbours({ field, names, figure }: FieldTableProps) {
  if (field.neighbours.length === 0) return null;
  return (
    <Section id="neighbours" title="Nearest by traits">
      <BarsTable
        caption="Nearest designs by traits"
        phone="fold"
        columns={[
          { key: "name", head: "Design" },
          { key: "distance", head: "Distance" },
          { key: "value", head: figureWords[figure].short, unit: figureWords[figure].unit },
          { key: "differs", head: "Differs in" },
        ]}
        rows={field.neighbours.map((each) => ({
          key: each.entryId,
          cells: {
            name: neighbourName(names[each.entryId]),
            distance: { figure: { value: each.distance, decimals: 2 } },
            value: {
              figure: {
                value: each.sameScale ? each.value : undefined,
                decimals: decimalsOfFigure(figure),
                why: each.sameScale ? "not reached" : "against another baseline unit",
              },
            },
            differs: {
              words: each.differing.map((key) => traitOf(key).label).join(", ") || "nothing beyond tolerance",
            },
          },
        }))}
      />
      <p className="small-print mt-2 max-w-3xl">
        Distance to your newest entry: the mean, over the traits that both have, of the difference over the field’s
        range for a measure, and of 0 or 1 for a choice (J. C. Gower, Biometrics 27 (1971) 857). 0 is alike, 1 as far
        apart as the field goes in every trait. Mass and print time follow from the others and don’t count.
      </p>
    </Section>
  );
}

const neighbourName = (name: FieldName | undefined): BarsCell =>
  name
    ? {
        words: (
          <Link href={`/designs/${name.slug}`}>
            {name.name} {name.letter}
          </Link>
        ),
      }
    : { figure: { value: null, why: "not public any more" } };

/** The best quarter of the class against the rest, trait by trait. */
export function FieldBest({ field: { best } }: { field: Field }) {
  if (best.traits.length === 0) {
    return (
      <Section id="best" title="What the best of its class do differently">
        <p>
          {countWords(best.designs, "design")} of its class reached the figure on this scale; from {CLASS_MIN} on the
          best quarter is set against the rest.
        </p>
      </Section>
    );
  }
  const percent = (share: number) => `${formatNumber(100 * share)} %`;
  const said = (trait: TraitKey, value: string | number, share: number | undefined) =>
    share === undefined ? valueWords(trait, value) : `${valueWords(trait, value)}: ${percent(share)}`;
  return (
    <Section id="best" title="What the best of its class do differently">
      <BarsTable
        caption="The best quarter against the rest"
        columns={[
          { key: "trait", head: "Trait" },
          { key: "best", head: "Best quarter", tone: "strong" },
          { key: "nBest", head: "n" },
          { key: "rest", head: "The rest" },
          { key: "nRest", head: "n" },
          { key: "own", head: "Your newest" },
        ]}
        rows={best.traits.map((each) => ({
          key: each.trait,
          cells: {
            trait: { words: traitOf(each.trait).label },
            best: { words: said(each.trait, each.best, each.bestShare) },
            nBest: { figure: { value: each.nBest, decimals: 0 } },
            rest: { words: said(each.trait, each.rest, each.restShare) },
            nRest: { figure: { value: each.nRest, decimals: 0 } },
            own: { words: worth(each.trait, each.own) },
          },
        }))}
      />
      <p className="small-print mt-2 max-w-3xl">
        Of {countWords(best.designs, "design")}, each by its best entry: medians of measures, shares of the best
        quarter’s most frequent choice. It describes who did well; it says nothing of why. Traits go together, a few
        designers may make up a quarter, and luck ranks too: a copy of these traits is no promise. What a trait goes
        with, others held alike, is in <Link href="/traits">the trait study</Link>.
      </p>
    </Section>
  );
}

/** What changed from one entry of the design to the next, and what came of it. */
export function FieldChanges({ field, names, figure }: FieldTableProps) {
  if (field.revisions.length === 0) return null;
  return (
    <Section id="changes" title="What changed from entry to entry">
      <BarsTable
        caption="Changes from entry to entry"
        phone="fold"
        columns={[
          { key: "step", head: "From, to" },
          { key: "traits", head: "Traits that changed" },
          { key: "change", head: "Change", unit: figureWords[figure].unit, tone: "strong" },
          { key: "together", head: "Measured" },
        ]}
        rows={field.revisions.map((each) => ({
          key: each.toEntryId,
          cells: {
            step: { words: `${entryName(names, each.fromEntryId)} → ${entryName(names, each.toEntryId)}` },
            traits: {
              words:
                each.traits
                  .map(({ trait, from, to }) => `${traitOf(trait).label} ${worth(trait, from)} → ${worth(trait, to)}`)
                  .join("; ") || "none beyond tolerance",
            },
            change: {
              figure: {
                value: each.change,
                uncertainty: each.expanded,
                decimals: decimalsOfFigure(figure),
                signed: true,
                why: "not reached, or against another baseline unit",
              },
            },
            together: { words: togetherWords[each.together ?? "none"] },
          },
        }))}
      />
      <p className="small-print mt-2 max-w-3xl">
        Lower is better. Intervals are 95 % with the two sessions taken as independent. Where several traits changed at
        once, the change belongs to all of them together.
      </p>
    </Section>
  );
}

const togetherWords = {
  round: "in one round",
  cell: "in one season, on one bench version",
  no: "in different seasons or on different bench versions",
  none: "against different baseline units, or not reached",
} as const;
