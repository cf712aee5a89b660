import { BarsTable } from "@/components/ui/bars/bars-table";
import type { BarsRow } from "@/components/ui/bars/bars-model";
import { Fold } from "@/components/ui/fold";
import { Section } from "@/components/ui/sheet";
import type { BudgetLine } from "@/lib/contracts/publication";
import type { Sheet } from "@/lib/contracts/sheet";
import { formatNumber } from "@/lib/format/numbers";
import { formatLevel } from "@/lib/format/quantities";

const quantities = { level: "Level", delta_t: "ΔT", ratio: "Ratio" } as const;
const kinds = {
  own_run: "run to run",
  own_mount: "mount to mount",
  shared_offset: "shared offset",
  shared_gain: "shared gain",
  bridge: "bridge between baselines",
} as const;
const owners = { entry: "this design", baseline: "the baseline", session: "the whole session" } as const;
const cancelling = {
  fully: "fully: both share it",
  partly: "partly: both share it",
  no: "no",
} as const;

function types(line: BudgetLine): string {
  const found = [...new Set(line.parts.map((part) => part.evaluation))].sort();
  return found.length > 0 ? found.join(" + ") : "A";
}

function budgetRow(line: BudgetLine, index: number): BarsRow {
  return {
    key: `${line.quantity}-${line.kind}-${line.of}-${index}`,
    tone: line.of === "baseline" ? "baseline" : undefined,
    cells: {
      part: { words: `${quantities[line.quantity]}, ${kinds[line.kind]}, ${owners[line.of]}` },
      type: { words: types(line) },
      u: { figure: { value: line.u, decimals: 3 } },
      share: { figure: { value: 100 * line.share, decimals: 1 } },
      dof:
        line.dof === null
          ? { words: <span aria-label="infinite: taken as known">∞</span> }
          : { figure: { value: line.dof, decimals: 0 } },
      cancels: { words: cancelling[line.cancels] },
      source: {
        words:
          line.parts.length === 0
            ? "spread of the readings"
            : line.parts
                .map(({ name, u, source }) => `${name} (${formatNumber(u, { decimals: 3 })}; ${source})`)
                .join("; "),
      },
    },
  };
}

/** The uncertainty of ΔT against the baseline at equal noise, line by line; absent where there is no such figure. */
export function BudgetSection({ sheet }: { sheet: Sheet }) {
  const difference = sheet.equalNoise.find((reading) => reading.levelDba === sheet.headlineDba)?.reached?.differenceK;
  if (!difference || sheet.budget.length === 0) return null;
  const level = formatLevel(sheet.headlineDba, sheet.bench.microphoneDistanceMm, { decimals: 0 });
  const dof = difference.dof === null ? "infinitely many" : formatNumber(difference.dof);
  return (
    <Section id="uncertainty" title="How sure is the first figure" note={`ΔT against the baseline at ${level}`}>
      <p>
        u = {formatNumber(difference.u, { decimals: 2 })} K with {dof} degrees of freedom, so k ={" "}
        {formatNumber(difference.k, { decimals: 2 })} and U = ±{formatNumber(difference.u95, { decimals: 2 })} K at 95 %
        coverage. Left after this design and its baseline were set against each other in one session.
      </p>
      <Fold title="The budget, line by line" className="mt-3">
        <div id="budget">
          <BarsTable
            caption="Uncertainty budget of ΔT against the baseline at equal noise, the largest line first"
            phone="fold"
            columns={[
              { key: "part", head: "Part" },
              { key: "type", head: "Type" },
              { key: "u", head: "Size", unit: "K" },
              { key: "share", head: "Share of u²", unit: "%" },
              { key: "dof", head: "Degrees of freedom" },
              { key: "cancels", head: "Cancels" },
              { key: "source", head: "Source" },
            ]}
            rows={sheet.budget.map(budgetRow)}
          />
          <p className="small-print mt-2">
            A: from repeats; B: from certificates, resolution, judgement. Sizes stand in the unit of the figure, K; in
            brackets each part in its own unit. Combined in squares (JCGM 100:2008, 5.1.2), degrees of freedom by
            Welch–Satterthwaite (G.4.1).
          </p>
        </div>
      </Fold>
    </Section>
  );
}
