import { HistogramChart } from "@/components/charts/histogram-chart";
import { BarsTable } from "@/components/ui/bars/bars-table";
import { Section } from "@/components/ui/sheet";
import { EmptyState } from "@/components/ui/states";
import type { Field } from "@/lib/domain/study/field";
import type { OutcomeKey } from "@/lib/domain/study/outcomes";
import { decimalsOfFigure, entryName, type FieldNames } from "./field-words";
import { figureWords } from "./study-words";

export type FieldPlaceProps = { slug: string; field: Field; names: FieldNames; figure: OutcomeKey };

/** The class on one axis with the own entries as lines, and how many of it did better than each. */
export function FieldPlace({ slug, field, names, figure }: FieldPlaceProps) {
  const { short, unit } = figureWords[figure];
  const { bins } = field;
  return (
    <Section id="place" title="Where your entries stand">
      {field.oneScale > 0 ? (
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
          fileName={`${slug}-field`}
        />
      ) : (
        <EmptyState title="Nobody stands beside them yet">
          No other public entry of its class ran against the same baseline unit, so nothing is on one scale with it.
        </EmptyState>
      )}
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
            entry: { words: entryName(names, own.entryId) },
            value: { figure: { value: own.value, decimals: decimalsOfFigure(figure), why: "not reached" } },
            better: {
              figure: { value: own.better, decimals: 0, why: "against another baseline unit, or not reached" },
            },
            of: { figure: { value: own.of, decimals: 0, why: "against another baseline unit, or not reached" } },
          },
        }))}
      />
    </Section>
  );
}
