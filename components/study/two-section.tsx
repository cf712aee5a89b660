import { DotIntervalChart } from "@/components/charts/dot-interval-chart";
import { TraitScatterChart } from "@/components/charts/trait-scatter-chart";
import { BarsTable } from "@/components/ui/bars/bars-table";
import { Fold } from "@/components/ui/fold";
import { Missing } from "@/components/ui/missing";
import { Section } from "@/components/ui/sheet";
import type { StudyAnswer } from "@/lib/contracts/study";
import { traitOf } from "@/lib/domain/study/traits";
import { chartRow } from "./effects-section";
import { chartName, effectName, figureIn, figureWords, levelWords, whyWords, type Result } from "./study-words";

type Two = NonNullable<Result["two"]>;
type Figure = keyof typeof figureWords;

/** Medians where the levels of both meet, with their counts; none under four. */
function MeetingTable({ two, figure }: { two: Two; figure: Figure }) {
  const [first, second] = two.traits;
  const { unit, short } = figureWords[figure];
  return (
    <BarsTable
      caption={`${short}, median, by ${traitOf(first).label} and ${traitOf(second).label}`}
      columns={[
        { key: "level", head: traitOf(first).label },
        ...two.columns.map((level) => ({ key: level.key, head: levelWords(second, level) })),
      ]}
      rows={two.rows.map((row, i) => ({
        key: row.key,
        cells: {
          level: { words: levelWords(first, row) },
          ...Object.fromEntries(
            two.columns.map((level, j) => {
              const spread = two.grid[i]?.[j];
              const n = spread?.n ?? 0;
              if (spread?.median !== undefined)
                return [level.key, { words: `${figureIn(unit, spread.median)}, n = ${n}` }];
              const why = n === 0 ? "no entry has both" : `too few to tell: n = ${n}`;
              return [level.key, { words: <Missing why={why} /> }];
            }),
          ),
        },
      }))}
    />
  );
}

/** The scatter, a picture a level of the second trait, all on the same axes. */
function Scatters({ two, figure }: { two: Two; figure: Figure }) {
  const [first, second] = two.traits;
  const points = two.points.flatMap(({ x, y, level }) => (typeof x === "number" ? [{ x, y, level }] : []));
  if (points.length === 0) return null;
  const ends = (values: readonly number[], margin: number) => {
    const [low, high] = [Math.min(...values), Math.max(...values)];
    const room = (high - low || 1) * margin;
    return [low - room, high + room] as const;
  };
  const [xMin, xMax] = ends(
    points.map(({ x }) => x),
    0.08,
  );
  const [yMin, yMax] = ends(
    points.map(({ y }) => y),
    0.05,
  );
  const { label, unit: xUnit } = traitOf(first);
  const { short, unit } = figureWords[figure];
  return (
    <div className="grid gap-x-8 gap-y-6 md:grid-cols-2">
      {two.columns.map((level) => {
        const name = `${traitOf(second).label}: ${levelWords(second, level)}`;
        return (
          <div key={level.key} className="min-w-0">
            <h3 className="mb-1">{name}</h3>
            <TraitScatterChart
              name={name}
              points={points.filter((point) => point.level === level.key)}
              xQuantity={xUnit === "" ? label : `${label}, ${xUnit}`}
              yQuantity={short}
              yUnit={unit}
              countOf="entries"
              range={{ xMin, xMax, yMin, yMax }}
            />
          </div>
        );
      })}
    </div>
  );
}

/** Two traits against each other: where their levels meet, the first's effect within each level of the second, dots. */
export function TwoSection({ question, result }: Pick<StudyAnswer, "question" | "result">) {
  const { two } = result;
  if (!two) return null;
  const [first, second] = two.traits;
  const { figure } = question;
  const rows = two.within.flatMap(({ level, effects }) =>
    effects.map((effect) => {
      const where = levelWords(second, level);
      const several = effects.length > 1;
      return {
        ...chartRow(effect, several ? `${where}; ${chartName(effect)}` : where),
        key: `${level.key} ${effect.key}`,
      };
    }),
  );
  const given = rows.filter(({ estimate }) => estimate !== undefined);
  const not = two.within.flatMap(({ level, effects }) =>
    effects.flatMap(({ why }) => (why ? [`${levelWords(second, level)}, ${whyWords[why]}`] : [])),
  );
  return (
    <Section
      id="two"
      title={`${traitOf(first).label} × ${traitOf(second).label}`}
      note="does the first do the same wherever the second stands?"
    >
      {given.length > 0 ? (
        <DotIntervalChart
          rows={given}
          quantity={`${figureWords[figure].short}, change with ${traitOf(first).label.toLowerCase()}`}
          unit={figureWords[figure].unit}
          countOf="entries"
          intervalWords="95 % intervals, each by itself, a fit for every level"
          caption={`The effect of ${effectNameOf(two)} within each level of the second trait, a fit of its own with the same cells and clusters. Left is better; hollow can’t be told from none.`}
          fileName={`traits-${first}-by-${second}`}
        />
      ) : null}
      {not.length > 0 ? <p className="small-print mt-2 mb-4">Not given: {not.join("; ")}.</p> : null}
      <div className="mt-4 grid gap-6">
        <MeetingTable two={two} figure={figure} />
        <Fold title={`Entries one by one${two.everyNth > 1 ? `, one in ${two.everyNth}` : ""}`}>
          <Scatters two={two} figure={figure} />
        </Fold>
      </div>
    </Section>
  );
}

function effectNameOf({ within, traits: [first] }: Two): string {
  const step = within.flatMap(({ effects }) => effects).find((effect) => effect.step !== undefined)?.step;
  return step === undefined ? traitOf(first).label.toLowerCase() : effectName({ trait: first, step });
}
