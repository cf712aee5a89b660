import { DotIntervalChart, type DotInterval } from "@/components/charts/dot-interval-chart";
import { Notice } from "@/components/ui/notice";
import { Section } from "@/components/ui/sheet";
import { EmptyState } from "@/components/ui/states";
import type { StudyAnswer } from "@/lib/contracts/study";
import { countWords, listWords } from "@/lib/format/words";
import { DownloadLink } from "./download-links";
import { EffectsTable } from "./effects-table";
import { ModelNote } from "./model-note";
import { chartName, effectName, figureWords, whyWords, type EffectShown } from "./study-words";

/** A row of the chart; what isn't given stays off it and is said below. */
export function chartRow(effect: EffectShown, name = chartName(effect)): DotInterval {
  const { key, estimate, low, high, n, why } = effect;
  return { key, name, estimate, low, high, count: n, ...(why ? { why: whyWords[why] } : {}) };
}

function EffectsChart({
  title,
  effects,
  figure,
  tried,
  fileName,
}: {
  title: string;
  effects: readonly EffectShown[];
  figure: keyof typeof figureWords;
  tried: number;
  fileName: string;
}) {
  const { short, unit } = figureWords[figure];
  return (
    <div>
      <h3 className="mb-2">{title}</h3>
      <DotIntervalChart
        rows={effects.map((effect) => chartRow(effect))}
        quantity={`${short}, change`}
        unit={unit}
        countOf="entries"
        intervalWords={`95 % intervals, each by itself; ${tried} effects were tried on this page`}
        caption="Left is better. Hollow: the interval holds zero, so the data can’t tell which way."
        fileName={fileName}
      />
    </div>
  );
}

/** Effects whose direction over everything is against the one within seasons, said where they are shown. */
function Reversals({ effects }: { effects: readonly EffectShown[] }) {
  const names = effects.filter(({ reversed }) => reversed).map(effectName);
  if (names.length === 0) return null;
  return (
    <Notice title="Points one way over all, the other way within seasons" className="mb-4">
      {listWords(names, "and")}: the entries of all seasons together would mislead here (Simpson’s paradox). Go by what
      stands within seasons.
    </Notice>
  );
}

function refusals(effects: readonly EffectShown[]) {
  const said = effects.flatMap((effect) => (effect.why ? [`${effectName(effect)}: ${whyWords[effect.why]}`] : []));
  return said.length === 0 ? null : <p className="small-print mt-3 max-w-3xl">Not given: {said.join("; ")}.</p>;
}

/** Effects by regression, with intervals and counts, and what the model is. */
export function EffectsSection({ question, result }: Pick<StudyAnswer, "question" | "result">) {
  const { effects } = result.fit;
  const given = effects.filter(({ estimate }) => estimate !== undefined);
  const measures = given.filter(({ level }) => level === undefined);
  const choices = given.filter(({ level }) => level !== undefined);
  const chart = { figure: question.figure, tried: result.tried };
  return (
    <Section
      id="effects"
      title="Effects over all entries"
      note={`${countWords(result.fit.n, "entry", "entries")}, ${countWords(result.fit.designers, "designer")}`}
      aside={effects.length > 0 ? <DownloadLink question={question} table="effects" /> : null}
    >
      <Reversals effects={effects} />
      {given.length === 0 ? (
        <EmptyState title="Too few to tell">
          An effect needs five entries or more that differ in the trait within one season, by six designers or more. Ask
          of more seasons, frames or stages.
        </EmptyState>
      ) : (
        <div className="grid items-start gap-x-10 gap-y-6 lg:grid-cols-2">
          {measures.length > 0 ? (
            <EffectsChart title="One step more" effects={measures} fileName="effects-steps" {...chart} />
          ) : null}
          {choices.length > 0 ? (
            <EffectsChart title="One kind against another" effects={choices} fileName="effects-kinds" {...chart} />
          ) : null}
        </div>
      )}
      {refusals(effects)}
      {given.length > 0 ? <EffectsTable effects={given} figure={question.figure} /> : null}
      <ModelNote question={question} result={result} />
    </Section>
  );
}
