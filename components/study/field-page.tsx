import Link from "next/link";
import { Section } from "@/components/ui/sheet";
import { EmptyState } from "@/components/ui/states";
import { HistogramChart } from "@/components/charts/histogram-chart";
import { BarsTable } from "@/components/ui/bars/bars-table";
import type { BarsCell } from "@/components/ui/bars/bars-model";
import { CLASS_MIN, type Field } from "@/lib/domain/study/field";
import { outcomeKeys, type OutcomeKey } from "@/lib/domain/study/outcomes";
import { traitOf, type TraitKey } from "@/lib/domain/study/traits";
import { formatNumber } from "@/lib/format/numbers";
import { countWords } from "@/lib/format/words";
import { figureWords, valueWords } from "./study-words";

type Name = { slug: string; name: string; letter: string; seasonSlug: string };

export type FieldPageProps = {
  design: { name: string; slug: string };
  className: { frame: string; rotation: string } | undefined;
  field: Field | undefined;
  names: Readonly<Record<string, Name>>;
  figure: OutcomeKey;
};

const rotations: Readonly<Record<string, string>> = {
  single: "one stage",
  co: "stages that turn the same way",
  counter: "counter-rotating stages",
};
const worth = (trait: TraitKey, value: string | number | null) => (value === null ? "none" : valueWords(trait, value));
const decimals = (figure: OutcomeKey) => (figureWords[figure].unit === "%" ? 1 : 2);

/** A designer's own entries against the field: where they stand, what lies near, what the best have, what changed. */
export function FieldPage({ design, className, field, names, figure }: FieldPageProps) {
  const path = `/my/designs/${design.slug}`;
  const { short, unit } = figureWords[figure];
  if (!field || !className) {
    return (
      <Section id="field" title={`${design.name} in its field`} level={1} aside={<Link href={path}>The design</Link>}>
        <EmptyState title="Nothing of it is published yet">
          Once a round with one of its entries is published, it stands here among those of its class.
        </EmptyState>
      </Section>
    );
  }
  const entryName = (id: string) => (names[id] ? `${names[id].letter}, ${names[id].seasonSlug}` : id);
  const { bins } = field;
  return (
    <>
      <Section id="field" title={`${design.name} in its field`} level={1} aside={<Link href={path}>The design</Link>}>
        <p>
          Its class: {countWords(field.entries, "public entry", "public entries")} for {className.frame} mm frames with{" "}
          {rotations[className.rotation] ?? className.rotation}, in the last three seasons. {field.oneScale} of them ran
          against the baseline unit of your newest entry; only those stand on one scale with it.
        </p>
        <nav aria-label="Figure" className="screen-only mt-3 flex flex-wrap gap-x-5">
          {outcomeKeys.map((key) => (
            <Link
              key={key}
              href={`${path}/field${key === "equal" ? "" : `?figure=${key}`}`}
              aria-current={key === figure ? "true" : undefined}
              className="aria-[current]:font-bold aria-[current]:decoration-double"
            >
              {figureWords[key].short}
            </Link>
          ))}
        </nav>
      </Section>
      <Section id="place" title="Where your entries stand">
        <HistogramChart
          bins={bins.counts.map((count, i) => ({
            from: bins.from + i * bins.width,
            to: bins.from + (i + 1) * bins.width,
            count,
          }))}
          quantity={short}
          unit={unit}
          countOf="entries of its class"
          marks={field.own.flatMap((own) =>
            own.value !== undefined && own.of !== undefined
              ? [{ value: own.value, name: names[own.entryId]?.letter ?? "" }]
              : [],
          )}
          caption="Further left is better. Lines: your own entries, by revision."
          fileName={`${design.slug}-field`}
        />
        <BarsTable
          caption="Your entries in their class"
          columns={[
            { key: "entry", head: "Entry" },
            { key: "value", head: short, unit, tone: "strong" },
            { key: "better", head: "Better ones" },
            { key: "of", head: "Of" },
          ]}
          rows={field.own.map((own) => ({
            key: own.entryId,
            cells: {
              entry: { words: entryName(own.entryId) },
              value: { figure: { value: own.value, decimals: decimals(figure), why: "not reached" } },
              better: {
                figure: { value: own.better, decimals: 0, why: "against another baseline unit, or not reached" },
              },
              of: { figure: { value: own.of, decimals: 0, why: "against another baseline unit, or not reached" } },
            },
          }))}
        />
      </Section>
      <Neighbours field={field} names={names} figure={figure} />
      <Best field={field} />
      <Changes field={field} name={entryName} figure={figure} />
    </>
  );
}

function Neighbours({ field, names, figure }: Pick<FieldPageProps, "names" | "figure"> & { field: Field }) {
  if (field.neighbours.length === 0) return null;
  return (
    <Section id="neighbours" title="Nearest by traits">
      <BarsTable
        caption="Nearest designs by traits"
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
                decimals: decimals(figure),
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

const neighbourName = (name: Name | undefined): BarsCell =>
  name
    ? {
        words: (
          <Link href={`/designs/${name.slug}`}>
            {name.name} {name.letter}
          </Link>
        ),
      }
    : { figure: { value: null, why: "not public any more" } };

function Best({ field: { best } }: { field: Field }) {
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

function Changes({ field, name, figure }: { field: Field; name: (id: string) => string; figure: OutcomeKey }) {
  if (field.revisions.length === 0) return null;
  return (
    <Section id="changes" title="What changed from entry to entry">
      <BarsTable
        caption="Changes from entry to entry"
        columns={[
          { key: "step", head: "From, to" },
          { key: "traits", head: "Traits that changed" },
          { key: "change", head: "Change", unit: figureWords[figure].unit, tone: "strong" },
          { key: "together", head: "Measured" },
        ]}
        rows={field.revisions.map((each) => ({
          key: each.toEntryId,
          cells: {
            step: { words: `${name(each.fromEntryId)} → ${name(each.toEntryId)}` },
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
                decimals: decimals(figure),
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
