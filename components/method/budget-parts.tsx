import { BarsTable } from "@/components/ui/bars/bars-table";
import { Section } from "@/components/ui/sheet";
import type { BenchBudget, BudgetPart } from "@/lib/contracts/method";
import { formatNumber } from "@/lib/format/numbers";

const quantities = { level_dba: "Level", delta_t_k: "ΔT" } as const;
const kinds = {
  own_run: "run to run",
  own_mount: "mount to mount",
  shared_offset: "shared offset, cancels against the baseline",
  shared_gain: "shared gain, nearly cancels",
} as const;

/** A relative part is told in %, the others in their unit. */
function size({ u, unit }: BudgetPart): string {
  return unit === "relative"
    ? `${formatNumber(100 * u, { decimals: 2 })} %`
    : `${formatNumber(u, { decimals: 3 })} ${unit}`;
}

/** The parts that make up the uncertainty on each bench version, as its budget states them. */
export function BudgetParts({ budgets }: { budgets: readonly BenchBudget[] }) {
  if (budgets.length === 0) return null;
  return (
    <Section id="budgets" title="What the uncertainty is made of, bench by bench">
      <div className="grid gap-8">
        {budgets.map((budget) => (
          <div key={`${budget.bench} ${budget.budgetVersion}`}>
            <h3 className="mb-1">
              {budget.bench}, budget {budget.budgetVersion}
            </h3>
            <p className="small-print mb-2">
              {budget.microphone}, {formatNumber(budget.microphoneDistanceMm)} mm from the mounting flange
            </p>
            <BarsTable
              caption={`Uncertainty budget of ${budget.bench}, budget ${budget.budgetVersion}`}
              phone="fold"
              columns={[
                { key: "part", head: "Part" },
                { key: "quantity", head: "Of" },
                { key: "type", head: "Type" },
                { key: "u", head: "Standard uncertainty" },
                { key: "dof", head: "Degrees of freedom" },
                { key: "kind", head: "Acts" },
                { key: "source", head: "Source" },
              ]}
              rows={budget.parts.map((part) => ({
                key: `${part.quantity} ${part.name}`,
                cells: {
                  part: { words: part.name },
                  quantity: { words: quantities[part.quantity] },
                  type: { words: `${part.evaluation}, ${part.distribution}` },
                  u: { words: <span className="figures">{size(part)}</span> },
                  dof: { words: part.dof === null ? "taken as known" : formatNumber(part.dof) },
                  kind: { words: kinds[part.kind] },
                  source: { words: part.source },
                },
              }))}
            />
          </div>
        ))}
      </div>
    </Section>
  );
}
