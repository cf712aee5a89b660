import { Fold } from "@/components/ui/fold";
import { Section } from "@/components/ui/sheet";
import type { Sheet } from "@/lib/contracts/sheet";
import { formatNumber } from "@/lib/format/numbers";
import { formatLevel } from "@/lib/format/quantities";
import { budgetedFigures, type FigureBudget } from "./budgeted-figures";
import { BudgetTable } from "./budget-table";

type Stated = { u: number; dof: number | null; k: number; u95: number };

function howSure({ u, dof, k, u95 }: Stated, unit: string, decimals: number): string {
  const said = (value: number) => `${formatNumber(value, { decimals })}${unit ? ` ${unit}` : ""}`;
  const freedom = dof === null ? "infinitely many" : formatNumber(dof);
  return `u = ${said(u)} with ${freedom} degrees of freedom, so k = ${formatNumber(k, { decimals: 2 })} and U = ±${said(u95)} at 95 % coverage.`;
}

function OneBudget({ budget }: { budget: FigureBudget }) {
  const { id, title, stated, unit, decimals, lines } = budget;
  return (
    <Fold title={title}>
      <div id={id}>
        <p className="mb-2">{howSure(stated, unit, decimals)}</p>
        <BudgetTable caption={`Uncertainty budget: ${title}`} unit={unit} lines={lines} decimals={decimals + 1} />
      </div>
    </Fold>
  );
}

/** The uncertainty of every figure, line by line; absent where a publication has none. */
export function BudgetSection({ sheet }: { sheet: Sheet }) {
  const difference = sheet.equalNoise.find((reading) => reading.levelDba === sheet.headlineDba)?.reached?.differenceK;
  const hasFirst = difference !== undefined && sheet.budget.length > 0;
  const { four, bySpeed } = budgetedFigures(sheet);
  if (!hasFirst && four.length === 0) return null;
  const level = formatLevel(sheet.headlineDba, sheet.bench.microphoneDistanceMm, { decimals: 0 });
  return (
    <Section id="uncertainty" title="How sure is each figure" note="budgets, line by line">
      {hasFirst ? (
        <>
          <p>
            ΔT against the baseline at {level}: {howSure(difference, "K", 2)} Left after this design and its baseline
            were set against each other in one session.
          </p>
          <Fold title={`ΔT against the baseline at equal noise, ${level}`} className="mt-3">
            <div id="budget">
              <BudgetTable
                caption="Uncertainty budget of ΔT against the baseline at equal noise, the largest line first"
                unit="K"
                lines={sheet.budget}
              />
            </div>
          </Fold>
        </>
      ) : null}
      {four.map((budget) => (
        <OneBudget key={budget.id} budget={budget} />
      ))}
      {sheet.ranks.then ? (
        <Fold title={`Rank in round ${sheet.round}: its range`}>
          <p>
            A rank has no budget of its own. Its range comes from the scores’ uncertainties, parts that entries of one
            session share moved together: the round is drawn again many times and the middle 95 % of the ranks are
            given. <a href={`/seasons/${sheet.season.slug}/rounds/${sheet.round}`}>The standing</a> says how many draws
            and which seed.
          </p>
        </Fold>
      ) : null}
      {bySpeed.map(({ setSpeed, title, budgets }) => (
        <Fold key={setSpeed} title={title}>
          {budgets.map((budget) => (
            <OneBudget key={budget.id} budget={budget} />
          ))}
        </Fold>
      ))}
      <p className="small-print mt-2">
        A: from repeats; B: from certificates, resolution, judgement. Sizes stand in the unit of the figure; in brackets
        each part in its own unit. Combined in squares (JCGM 100:2008, 5.1.2), degrees of freedom by Welch–Satterthwaite
        (G.4.1). ΔT/P has the relative uncertainty of ΔT. <a href="#readings">Each set speed opens to its raw runs.</a>
      </p>
    </Section>
  );
}
